import type { Headline, Study, StudyFile, StudyRevision } from '../contract/study.ts';
import type { Core } from '../core.ts';
import { etagOf, requireMatch } from '../http/if-match.ts';
import { HttpProblem } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { listParts, listStandings } from './part-repository.ts';
import { getRevision, insertRevision } from './revision-repository.ts';
import { readStudy } from './study-answer.ts';
import { recordStudyDeed } from './study-deed.ts';
import { getStudy, requireInUse, setNewestRevision, type StoredStudy } from './study-repository.ts';

/** One revision, and how the library stands to it now. @throws {HttpProblem} `NOT_FOUND` */
export async function readRevision(
  core: Core,
  access: WorkspaceAccess,
  studyId: string,
  revision: number,
): Promise<StudyRevision> {
  const found = await getRevision(core, access, studyId, revision);
  return { ...found, parts: await listStandings(core, access, found.inputs, found.parts) };
}

/**
 * Runs the working copy that is to become a revision. Takes as long as the run.
 *
 * @param ifMatch  ETag of the working copy
 * @throws {HttpProblem} `NOT_FOUND`, `ARCHIVED`, `EDIT_CONFLICT`, `ENTRIES_PENDING`, `UNCHANGED`
 */
export async function prepareRevision(
  core: Core,
  access: WorkspaceAccess,
  studyId: string,
  ifMatch: string,
): Promise<Headline> {
  const stored = await getStudy(core, access, studyId);
  requireSavable(stored, ifMatch);
  return core.runs.headlineOf(JSON.parse(stored.workingInputs) as StudyFile);
}

/**
 * Makes the working copy a revision. Needs the caller's transaction.
 *
 * @param headline  of this version of the working copy
 * @throws {HttpProblem} as `prepareRevision`, for what has happened since
 */
export async function saveRevision(
  core: Core,
  access: WorkspaceAccess,
  studyId: string,
  { ifMatch, message, headline }: { ifMatch: string; message: string; headline: Headline },
): Promise<Study> {
  const stored = await getStudy(core, access, studyId);
  requireSavable(stored, ifMatch);
  const revision = stored.newestRevision + 1;
  const inputs = JSON.parse(stored.workingInputs) as StudyFile;
  const parts = await listParts(core, access, studyId);
  await insertRevision(core, access, { studyId, revision, message, inputs, parts, headline });
  await setNewestRevision(core, access, studyId, { revision, hash: stored.workingHash, headline });
  const { number, title } = stored;
  await recordStudyDeed(core, access, 'study.revised', studyId, { number, title, revision, message });
  return readStudy(core, access, studyId);
}

function requireSavable(stored: StoredStudy, ifMatch: string): void {
  requireInUse(stored);
  requireMatch(ifMatch, etagOf('w', stored.workingVersion));
  if (stored.hasPending) {
    throw new HttpProblem('ENTRIES_PENDING', 'Some entries break a rule. Mend or undo them before saving a revision.');
  }
  if (stored.workingHash === stored.revisionHash) {
    throw new HttpProblem('UNCHANGED', `Nothing has changed since revision ${stored.newestRevision}.`);
  }
}
