import type { StudyKind, StudyState } from '../../../server/src/contract/study-words.ts';

/** What the kinds are called at the head of a line. */
export const kindNames: Record<StudyKind, string> = { session: 'Session', trip: 'Trip', sweep: 'Sweep', fit: 'Fit' };

export const stateWords: Record<StudyState, string> = {
  draft: 'draft',
  'in-review': 'in review',
  released: 'released',
};

/** The number of a study, as registers write it: "007". */
export function studyNumber(number: number): string {
  return String(number).padStart(3, '0');
}
