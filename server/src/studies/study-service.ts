import type { PartReference, Study, StudyFile, StudyRevision, WorkingCopy } from '../contract/study.ts';
import type { Headline } from '../contract/study.ts';
import { asPersonRef } from '../account/person-ref.ts';
import { type Deed, recordDeed } from '../activity/activity-repository.ts';
import type { Core } from '../core.ts';
import { inTransaction } from '../db/database.ts';
import { etagOf, requireMatch } from '../http/if-match.ts';
import { HttpProblem, invalidField } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { canonicalJson } from './canonical-json.ts';
import { judgeParts, listParts, listStandings, replaceParts } from './part-repository.ts';
import { getRevision, insertRevision } from './revision-repository.ts';
import { contentHash, judgeInputs, wordsOf } from './study-content.ts';
import {
  asMoment,
  asStudyRow,
  getStudy,
  insertStudy,
  setArchived,
  setNewestRevision,
  type StoredStudy,
  updateWorkingCopy,
} from './study-repository.ts';

/** Longest title that the engine takes. */
const LONGEST_TITLE = 300;

/** A study with its working copy. @throws {HttpProblem} `NOT_FOUND` */
export async function readStudy(core: Core, access: WorkspaceAccess, studyId: string): Promise<Study> {
  const stored = await getStudy(core, access, studyId);
  const { packName: _pack, stationName: _station, ...head } = asStudyRow(stored);
  return { ...head, working: await workingCopyOf(core, access, stored) };
}

async function workingCopyOf(core: Core, access: WorkspaceAccess, stored: StoredStudy): Promise<WorkingCopy> {
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

/** What a study begins with. */
export type Beginning = { inputs: StudyFile; parts: PartReference[]; message: string };

/**
 * Judges what a study is to begin with and runs it. Takes as long as the run.
 *
 * @throws {HttpProblem} `INVALID_INPUT`
 */
export async function prepareStudy(core: Core, access: WorkspaceAccess, beginning: Beginning): Promise<Headline> {
  judgeInputs(beginning.inputs);
  await judgeParts(core, access, beginning.inputs, beginning.parts);
  return core.runs.headlineOf(beginning.inputs);
}

/** Makes a study with its first revision. Needs the caller's transaction. @param beginning  prepared */
export async function createStudy(
  core: Core,
  access: WorkspaceAccess,
  beginning: Beginning,
  headline: Headline,
): Promise<Study> {
  const { id, number } = await begin(core, access, beginning, headline);
  await record(core, access, 'study.created', id, { number, title: beginning.inputs.title ?? '' });
  return readStudy(core, access, id);
}

async function begin(core: Core, access: WorkspaceAccess, { inputs, parts, message }: Beginning, headline: Headline) {
  const hash = contentHash(inputs, parts);
  const { id, number } = await insertStudy(core, access, { inputs, words: wordsOf(inputs), hash, headline });
  await insertRevision(core, access, { studyId: id, revision: 1, message, inputs, parts, headline });
  await replaceParts(core, access, id, parts);
  return { id, number };
}

/** What a copy begins with, and its headline. Takes as long as the run. @throws {HttpProblem} `NOT_FOUND` */
export async function prepareCopy(
  core: Core,
  access: WorkspaceAccess,
  studyId: string,
  { title, revision }: { title?: string | undefined; revision?: number | undefined },
): Promise<{ beginning: Beginning; headline: Headline }> {
  const { number, newestRevision } = await getStudy(core, access, studyId);
  const from = await getRevision(core, access, studyId, revision ?? newestRevision);
  const inputs = { ...from.inputs, title: title || copiedTitle(from.title) };
  const message = `Copy of study ${number}, revision ${from.revision}`;
  return { beginning: { inputs, parts: from.parts, message }, headline: await core.runs.headlineOf(inputs) };
}

function copiedTitle(title: string): string {
  const ending = ' copy';
  // Half of a character of two units is none.
  const begun = title.slice(0, LONGEST_TITLE - ending.length).replace(/[\uD800-\uDBFF]$/, '');
  return `${begun}${ending}`.trim();
}

/** Makes a copy. Needs the caller's transaction. */
export async function copyStudy(
  core: Core,
  access: WorkspaceAccess,
  { beginning, headline }: { beginning: Beginning; headline: Headline },
): Promise<Study> {
  const { id, number } = await begin(core, access, beginning, headline);
  const { inputs, message } = beginning;
  await record(core, access, 'study.copied', id, { number, title: inputs.title ?? '', message });
  return readStudy(core, access, id);
}

/** A working copy as its writer has it. */
export type WorkingContent = { inputs: StudyFile; pending: WorkingCopy['pending']; parts: PartReference[] };

/**
 * Writes a working copy over the version that the writer made it from. What is there already is not written again, from
 * whatever version: so an answer that was lost on its way can be asked for once more.
 *
 * @param ifMatch  ETag of that version
 * @throws {HttpProblem} `INVALID_INPUT`, `NOT_FOUND`, `ARCHIVED`, `EDIT_CONFLICT`
 */
export function writeWorkingCopy(
  core: Core,
  access: WorkspaceAccess,
  studyId: string,
  content: WorkingContent,
  ifMatch: string,
): Promise<WorkingCopy> {
  const { inputs, parts, pending } = content;
  judgeInputs(inputs);
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const stored = await getStudy(inner, access, studyId);
    requireInUse(stored);
    if (await says(inner, access, stored, content)) return workingCopyOf(inner, access, stored);
    requireMatch(ifMatch, etagOf('w', stored.workingVersion));
    requireKind(stored, inputs);
    await judgeParts(inner, access, inputs, parts);
    const hash = contentHash(inputs, parts);
    await updateWorkingCopy(inner, access, studyId, { inputs, pending, words: wordsOf(inputs), hash });
    await replaceParts(inner, access, studyId, parts);
    return workingCopyOf(inner, access, await getStudy(inner, access, studyId));
  });
}

/** Whether a working copy says this already. */
async function says(core: Core, access: WorkspaceAccess, stored: StoredStudy, content: WorkingContent) {
  const { inputs, pending, parts } = content;
  if (stored.workingHash !== contentHash(inputs, parts)) return false;
  if (canonicalJson(JSON.parse(stored.workingPending)) !== canonicalJson(pending)) return false;
  const kept = (of: readonly PartReference[]) => of.map((one) => `${one.part} ${one.keptAgainst}`).sort();
  return canonicalJson(kept(await listParts(core, access, stored.id))) === canonicalJson(kept(parts));
}

function requireInUse({ archivedAt }: StoredStudy): void {
  if (archivedAt === null) return;
  throw new HttpProblem('ARCHIVED', 'The study lies in the archive. Take it out before changing it.');
}

function requireKind({ kind }: StoredStudy, inputs: StudyFile): void {
  if (inputs.kind === kind) return;
  const message = `The kind of a study never changes: must be "${kind}", but is "${inputs.kind}"`;
  throw invalidField('body.inputs.kind', message);
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
  await record(core, access, 'study.revised', studyId, { number, title, revision, message });
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

/** Puts a study into the archive, or takes it out; one that is there already stays as it is. */
export function moveStudy(core: Core, access: WorkspaceAccess, studyId: string, to: 'archive' | 'use'): Promise<Study> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { archivedAt, number, title } = await getStudy(inner, access, studyId);
    if ((archivedAt === null) === (to === 'archive')) {
      await setArchived(inner, access, studyId, to === 'archive' ? core.now() : null);
      const action = to === 'archive' ? 'study.archived' : 'study.unarchived';
      await record(inner, access, action, studyId, { number, title });
    }
    return readStudy(inner, access, studyId);
  });
}

async function record(
  core: Core,
  access: WorkspaceAccess,
  action: Deed['action'],
  subjectId: string,
  detail: Record<string, string | number>,
): Promise<void> {
  const texts = Object.fromEntries(Object.entries(detail).map(([name, value]) => [name, String(value)]));
  const { workspaceId, actor } = access;
  await recordDeed(core, { workspaceId, personId: actor.personId, action, subjectId, detail: texts });
}
