import type { Study } from '../../../../../server/src/contract/study.ts';
import type { StudyKind, StudyState } from '../../../../../server/src/contract/study-words.ts';

const KINDS: Record<StudyKind, string> = { session: 'Session', trip: 'Trip', sweep: 'Sweep', fit: 'Fit' };

export const stateWords: Record<StudyState, string> = {
  draft: 'draft',
  'in-review': 'in review',
  released: 'released',
};

/** "Session study No. 031" */
export function studyKindLine({ kind, number }: Pick<Study, 'kind' | 'number'>): string {
  return `${KINDS[kind]} study No. ${String(number).padStart(3, '0')}`;
}
