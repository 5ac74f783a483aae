import type { SessionStudy, SessionStudyInput, StudyIssue } from '@voltiplano/engine';
import { changedPaths } from './changes.ts';
import { checkedStudy } from './checked-study.ts';
import type { Sheet } from './desk-state.ts';
import { draftIssues, type Draft } from './draft.ts';
import { remembered } from './remembered.ts';

const NONE: readonly never[] = [];

/** What is wrong with a draft's waiting entries; the same empty list wherever nothing waits. */
export const issuesOf = remembered((draft: Draft): readonly StudyIssue[] => {
  const issues = draftIssues(draft);
  return issues.length > 0 ? issues : NONE;
});

/**
 * A study with every default filled in, as the engine runs it.
 *
 * @throws {Error} for a study that cannot be run: no such study comes onto the desk
 */
export function filledOf(study: SessionStudyInput): SessionStudy {
  const checked = checkedStudy(study);
  if ('issues' in checked) throw new Error(`Not a study: ${checked.issues.map((one) => one.message).join('; ')}`);
  return checked.study;
}

/** Paths in which the present study differs from the baseline; none without one. */
export const changesOf = remembered((sheet: Sheet): readonly string[] =>
  sheet.baseline ? changedPaths(sheet.draft.study, sheet.baseline) : NONE,
);
