import type { StudyRow } from '../../../../../server/src/contract/study.ts';
import type { StudyKind } from '../../../../../server/src/contract/study-words.ts';

const kindNames: Record<StudyKind, string> = { session: 'Session', trip: 'Trip', sweep: 'Sweep', fit: 'Fit' };

/** "Session: Vicuña 86, Salar Tola 150". */
export function partsLine({
  kind,
  packName,
  stationName,
}: Pick<StudyRow, 'kind' | 'packName' | 'stationName'>): string {
  const parts = [packName, stationName].filter(Boolean).join(', ');
  return parts ? `${kindNames[kind]}: ${parts}` : kindNames[kind];
}

/** The number of a study, as registers write it: "007". */
export function numberWords(number: number): string {
  return String(number).padStart(3, '0');
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
