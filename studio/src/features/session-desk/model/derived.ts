import { parseSessionStudy, type SessionStudy, type SessionStudyInput, type StudyIssue } from '@voltiplano/engine';
import { changedPaths } from './changes.ts';
import type { Sheet } from './desk-state.ts';
import { draftIssues, type Draft } from './draft.ts';

/** What is wrong with a draft's waiting entries; worked out once per draft. */
export const issuesOf = remembered((draft: Draft): readonly StudyIssue[] => draftIssues(draft));

/** A study with every default filled in, as the engine runs it; worked out once per study. */
export const filledOf = remembered((study: SessionStudyInput): SessionStudy => parseSessionStudy(study));

/** Paths in which the present study differs from the baseline; none without one. */
export const changesOf = remembered((sheet: Sheet): readonly string[] =>
  sheet.baseline ? changedPaths(sheet.draft.study, sheet.baseline) : [],
);

function remembered<K extends object, V>(of: (key: K) => V): (key: K) => V {
  const known = new WeakMap<K, V>();
  return (key) => {
    const value = known.get(key) ?? of(key);
    known.set(key, value);
    return value;
  };
}
