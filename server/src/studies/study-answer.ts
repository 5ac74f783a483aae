import { asPersonRef } from '../account/person-ref.ts';
import type { Study, StudyFile, WorkingCopy } from '../contract/study.ts';
import type { Core } from '../core.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { listParts, listStandings } from './part-repository.ts';
import { asMoment, asStudyRow, getStudy, type StoredStudy } from './study-repository.ts';

/** A study with its working copy. @throws {HttpProblem} `NOT_FOUND` */
export async function readStudy(core: Core, access: WorkspaceAccess, studyId: string): Promise<Study> {
  const stored = await getStudy(core, access, studyId);
  const { packName: _pack, stationName: _station, ...head } = asStudyRow(stored);
  return { ...head, working: await workingCopyOf(core, access, stored) };
}

/** The working copy, and how the library stands to it now. */
export async function workingCopyOf(core: Core, access: WorkspaceAccess, stored: StoredStudy): Promise<WorkingCopy> {
  const inputs = JSON.parse(stored.workingInputs) as StudyFile;
  return {
    version: stored.workingVersion,
    inputs,
    pending: JSON.parse(stored.workingPending) as WorkingCopy['pending'],
    parts: await listStandings(core, access, inputs, await listParts(core, access, stored.id)),
    changedAt: asMoment(stored.changedAt),
    changedBy: asPersonRef(stored.changedBy, stored.changerName),
    isChanged: stored.isChanged === 1,
  };
}
