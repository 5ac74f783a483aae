import type { StudyRow } from '../../../../../server/src/contract/study.ts';
import { kindNames } from '../../../lib/study-names.ts';

/** "Session: Vicuña 86, Salar Tola 150". */
export function partsLine({
  kind,
  packName,
  stationName,
}: Pick<StudyRow, 'kind' | 'packName' | 'stationName'>): string {
  const parts = [packName, stationName].filter(Boolean).join(', ');
  return parts ? `${kindNames[kind]}: ${parts}` : kindNames[kind];
}

type Counts = { total: number; inReviewTotal: number };

/** "31 in Puna Mobility, 4 waiting for a review"; with a filter, how many of them are shown. */
export function countLine(workspaceName: string, { total, inReviewTotal }: Counts, found: number | null): string {
  const shown = found === null ? `${total}` : `${found} of ${total}`;
  const waiting = inReviewTotal === 0 ? 'none' : String(inReviewTotal);
  return `${shown} in ${workspaceName}, ${waiting} waiting for a review`;
}

/** "12 studies", "1 study". */
export function studiesWord(count: number): string {
  return `${count} ${count === 1 ? 'study' : 'studies'}`;
}
