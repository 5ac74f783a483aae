import type { PartReference, StudyFile, WorkingCopy } from '../contract/study.ts';
import type { Core } from '../core.ts';
import { inTransaction } from '../db/database.ts';
import { etagOf, requireMatch } from '../http/if-match.ts';
import { invalidField } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { canonicalJson } from './canonical-json.ts';
import { judgeParts, listParts, replaceParts } from './part-repository.ts';
import { workingCopyOf } from './study-answer.ts';
import { contentHash, judgeInputs, wordsOf } from './study-content.ts';
import { getStudy, requireInUse, type StoredStudy, updateWorkingCopy } from './study-repository.ts';

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

function requireKind({ kind }: StoredStudy, inputs: StudyFile): void {
  if (inputs.kind === kind) return;
  const message = `The kind of a study never changes: must be "${kind}", but is "${inputs.kind}"`;
  throw invalidField('body.inputs.kind', message);
}
