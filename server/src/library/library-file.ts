import type { AnswerOf, BodyOf, QueryOf } from '../contract/endpoint.ts';
import type { libraryEndpoints, LibraryFile, LibraryItem } from '../contract/library.ts';
import type { Core } from '../core.ts';
import { inTransaction } from '../db/database.ts';
import { HttpProblem, invalidFields } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { judgeContent, sameContent } from './library-content.ts';
import { asItem, insertItem, selectItems } from './library-repository.ts';
import { record, saveRevision } from './library-service.ts';

type FileItem = LibraryFile['items'][number];
type Import = BodyOf<typeof libraryEndpoints.importLibrary>;
type ImportAnswer = AnswerOf<typeof libraryEndpoints.importLibrary>;

const MESSAGE = 'Imported';

/**
 * Items as a file, sorted by kind and name.
 *
 * @throws {HttpProblem} `NOT_FOUND` if one is asked for that is not there
 */
export async function exportItems(
  core: Core,
  access: WorkspaceAccess,
  { kind, itemId }: QueryOf<typeof libraryEndpoints.exportLibrary>,
): Promise<LibraryFile> {
  let query = selectItems(core, access).orderBy('item.kind').orderBy('item.sortName').orderBy('item.id');
  if (kind) query = query.where('item.kind', '=', kind);
  query = itemId ? query.where('item.id', '=', itemId) : query.where('item.archivedAt', 'is', null);
  const items = (await query.execute()).map(asItem);
  if (itemId && items.length === 0) throw new HttpProblem('NOT_FOUND', 'The library has no such part.');
  return {
    format: 'voltiplano/library',
    version: 1,
    items: items.map(({ kind: of, name, notes, source, body }) => ({ kind: of, name, notes, source, body })),
  };
}

/** Takes the items of a file in, or none of them. @throws {HttpProblem} `INVALID_INPUT` that names each wrong field */
export function importItems(core: Core, access: WorkspaceAccess, { file, sameName }: Import): Promise<ImportAnswer> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const sent = judgeAll(file.items);
    const present = await selectItems(inner, access)
      .where('item.archivedAt', 'is', null)
      .orderBy('item.changedAt', 'desc')
      .execute();
    const pairs = pairUp(sent, present.map(asItem), sameName !== 'add');
    const answer: ImportAnswer = { added: [], revised: [], left: 0 };
    for (const [i, item] of sent.entries()) {
      const there = pairs[i];
      if (!there) answer.added.push(await add(inner, access, item));
      else if (sameName === 'skip' || sameContent(there, item)) answer.left += 1;
      else {
        const deed = { action: 'library.imported', message: MESSAGE } as const;
        answer.revised.push(await saveRevision(inner, access, there, item, deed));
      }
    }
    return answer;
  });
}

async function add(core: Core, access: WorkspaceAccess, { kind, ...content }: FileItem): Promise<LibraryItem> {
  const item = await insertItem(core, access, kind, content, MESSAGE);
  await record(core, access, 'library.imported', item, MESSAGE);
  return item;
}

function judgeAll(items: readonly FileItem[]): FileItem[] {
  const judged = items.map(({ kind, ...sent }, i) => ({ kind, ...judgeContent(kind, sent, `body.file.items.${i}`) }));
  const errors = judged.flatMap((one) => one.errors);
  if (errors.length > 0) throw invalidFields(errors);
  return judged.map(({ kind, content }) => ({ kind, ...content }));
}

/**
 * For each item of a file the one that is there already, or none. Each of those is taken once, so that two of one name
 * in the file do not become revisions of each other; first by those that say the same.
 */
function pairUp(sent: readonly FileItem[], present: readonly LibraryItem[], byName: boolean): (LibraryItem | null)[] {
  const free = new Set(present);
  const take = (isIt: (there: LibraryItem) => boolean) => {
    const found = [...free].find(isIt) ?? null;
    if (found) free.delete(found);
    return found;
  };
  const named = (item: FileItem) => (there: LibraryItem) => there.kind === item.kind && there.name === item.name;
  const equal = sent.map((item) => take((there) => named(item)(there) && sameContent(there, item)));
  return sent.map((item, i) => equal[i] ?? (byName ? take(named(item)) : null));
}
