import type { Headline, PartReference, Study, StudyFile } from '../contract/study.ts';
import type { Core } from '../core.ts';
import { inTransaction } from '../db/database.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { judgeParts, replaceParts } from './part-repository.ts';
import { getRevision, insertRevision } from './revision-repository.ts';
import { readStudy } from './study-answer.ts';
import { contentHash, judgeInputs, wordsOf } from './study-content.ts';
import { recordStudyDeed } from './study-deed.ts';
import { getStudy, insertStudy, setArchived } from './study-repository.ts';

/** Longest title that the engine takes. */
const LONGEST_TITLE = 300;

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
  await recordStudyDeed(core, access, 'study.created', id, { number, title: beginning.inputs.title ?? '' });
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
  await recordStudyDeed(core, access, 'study.copied', id, { number, title: inputs.title ?? '', message });
  return readStudy(core, access, id);
}

/** Puts a study into the archive, or takes it out; one that is there already stays as it is. */
export function moveStudy(core: Core, access: WorkspaceAccess, studyId: string, to: 'archive' | 'use'): Promise<Study> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { archivedAt, number, title } = await getStudy(inner, access, studyId);
    if ((archivedAt === null) === (to === 'archive')) {
      await setArchived(inner, access, studyId, to === 'archive' ? core.now() : null);
      const action = to === 'archive' ? 'study.archived' : 'study.unarchived';
      await recordStudyDeed(inner, access, action, studyId, { number, title });
    }
    return readStudy(inner, access, studyId);
  });
}
