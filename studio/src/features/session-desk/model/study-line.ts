import type { Study } from '../../../../../server/src/contract/study.ts';
import { kindNames, studyNumber } from '../../../lib/study-names.ts';

/** "Session study No. 031" */
export function studyKindLine({ kind, number }: Pick<Study, 'kind' | 'number'>): string {
  return `${kindNames[kind]} study No. ${studyNumber(number)}`;
}
