import { parseSessionStudy, StudyError, type SessionStudy, type StudyIssue } from '@voltiplano/engine';
import { remembered } from './remembered.ts';

type Checked = { study: SessionStudy } | { issues: StudyIssue[] };

/** What the engine makes of a value: a study with every default filled in, or what is wrong with it. */
export const checkedStudy = remembered((json: object): Checked => {
  try {
    return { study: parseSessionStudy(json) };
  } catch (error) {
    if (error instanceof StudyError) return { issues: error.issues };
    throw error;
  }
});

/** Issues of a value as a session study; none where it can be run. */
export function studyIssues(json: object): StudyIssue[] {
  const checked = checkedStudy(json);
  return 'issues' in checked ? checked.issues : [];
}
