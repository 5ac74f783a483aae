import { partSchemas } from '@voltiplano/engine';
import type { LibraryKind } from '../contract/library.ts';
import type { PartReference, PartStanding, StudyFile } from '../contract/study.ts';
import type { Core } from '../core.ts';
import type { FieldError } from '../contract/problem.ts';
import { invalidFields } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { canonicalJson } from './canonical-json.ts';
import { partOf } from './study-content.ts';

/** What the working copy of a study was taken from. */
export async function listParts({ db }: Core, access: WorkspaceAccess, studyId: string): Promise<PartReference[]> {
  access.require('read');
  return db
    .selectFrom('studyParts')
    .innerJoin('studies', 'studies.id', 'studyParts.studyId')
    .select(['part', 'itemId', 'revision', 'keptAgainst'])
    .where('studies.workspaceId', '=', access.workspaceId)
    .where('studyParts.studyId', '=', studyId)
    .orderBy('part')
    .execute();
}

/**
 * Puts other references in place of those of a working copy.
 *
 * @param studyId  a study of the workspace
 * @param parts    judged by `judgeParts`
 */
export async function replaceParts(
  { db }: Core,
  access: WorkspaceAccess,
  studyId: string,
  parts: readonly PartReference[],
): Promise<void> {
  access.require('edit-studies');
  const ofStudy = db.selectFrom('studies').select('id').where('workspaceId', '=', access.workspaceId);
  await db
    .deleteFrom('studyParts')
    .where('studyId', 'in', ofStudy.where('id', '=', studyId))
    .execute();
  if (parts.length === 0) return;
  await db
    .insertInto('studyParts')
    .values(parts.map(({ part, itemId, revision, keptAgainst }) => ({ studyId, part, itemId, revision, keptAgainst })))
    .execute();
}

/** @throws {HttpProblem} `INVALID_INPUT` for references to what the library or the study does not have */
export async function judgeParts(
  core: Core,
  access: WorkspaceAccess,
  inputs: StudyFile,
  parts: readonly PartReference[],
): Promise<void> {
  const found = await findTaken(core, access, parts);
  const errors = parts.flatMap((reference, i): FieldError[] => {
    const message = whyNot(inputs, reference, found[i] ?? null);
    return message === null ? [] : [{ path: `body.parts.${i}.itemId`, message }];
  });
  if (errors.length > 0) throw invalidFields(errors);
}

function whyNot(inputs: StudyFile, { part, itemId, revision }: PartReference, taken: Taken | null): string | null {
  if (!taken) return `The library has no item ${itemId}`;
  if (taken.kind !== part) return `Must be of kind ${part}, but ${taken.name} is of kind ${taken.kind}`;
  if (taken.body === null) return `${taken.name} has revisions 1 to ${taken.newestRevision}, but no ${revision}`;
  if (partOf(inputs, part) === undefined) return `The study has no ${part} that could be taken from ${taken.name}`;
  return null;
}

/** References, and how the library stands to them now. @param inputs  what the study says for these parts */
export async function listStandings(
  core: Core,
  access: WorkspaceAccess,
  inputs: StudyFile,
  parts: readonly PartReference[],
): Promise<PartStanding[]> {
  const found = await findTaken(core, access, parts);
  return parts.flatMap((reference, i) => {
    const taken = found[i];
    if (!taken) return [];
    const { name: itemName, newestRevision, archivedAt, body } = taken;
    const own = partOf(inputs, reference.part);
    const isChanged = body === null || sense(reference.part, own) !== sense(reference.part, JSON.parse(body));
    return { ...reference, itemName, newestRevision, isArchived: archivedAt !== null, isChanged };
  });
}

/** What a part says, whatever the order of its keys, with its defaults filled in. */
function sense(part: LibraryKind, value: unknown): string {
  const parsed = partSchemas[part].safeParse(value);
  return canonicalJson(parsed.success ? parsed.data : value);
}

type Taken = {
  kind: LibraryKind;
  name: string;
  newestRevision: number;
  archivedAt: number | null;
  /** JSON of the revision referred to; null where there is none. */
  body: string | null;
};

/** What references name in the library of the workspace, in their order; null where it has no such item. */
async function findTaken(
  { db }: Core,
  access: WorkspaceAccess,
  parts: readonly PartReference[],
): Promise<(Taken | null)[]> {
  access.require('read');
  const found: (Taken | null)[] = [];
  for (const { itemId, revision } of parts) {
    const taken = await db
      .selectFrom('libraryItems')
      .leftJoin('libraryRevisions', (join) =>
        join.onRef('libraryRevisions.itemId', '=', 'libraryItems.id').on('libraryRevisions.revision', '=', revision),
      )
      .select(['kind', 'libraryItems.name', 'libraryItems.revision as newestRevision', 'archivedAt', 'body'])
      .where('libraryItems.workspaceId', '=', access.workspaceId)
      .where('libraryItems.id', '=', itemId)
      .executeTakeFirst();
    found.push(taken ?? null);
  }
  return found;
}
