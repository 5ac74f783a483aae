import { type Deed, recordDeed } from '../activity/activity-repository.ts';
import type { BodyOf } from '../contract/endpoint.ts';
import type { libraryEndpoints, LibraryItem } from '../contract/library.ts';
import type { Core } from '../core.ts';
import { inTransaction } from '../db/database.ts';
import { etagOf, requireMatch } from '../http/if-match.ts';
import { HttpProblem, invalidFields } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { judgeContent, type LibraryContent, sameContent } from './library-content.ts';
import { addRevision, getItem, insertItem, setArchived } from './library-repository.ts';
import { getRevision } from './revision-repository.ts';

type LibraryDeed = Extract<Deed['action'], `library.${string}`>;

/** @throws {HttpProblem} `INVALID_INPUT` */
export function createItem(
  core: Core,
  access: WorkspaceAccess,
  { kind, message, ...sent }: BodyOf<typeof libraryEndpoints.createLibraryItem>,
): Promise<LibraryItem> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { content, errors } = judgeContent(kind, sent, 'body');
    if (errors.length > 0) throw invalidFields(errors);
    const item = await insertItem(inner, access, kind, content, message);
    await record(inner, access, 'library.added', item, message);
    return item;
  });
}

/** @throws {HttpProblem} `NOT_FOUND`, `EDIT_CONFLICT`, `ARCHIVED`, `INVALID_INPUT`, `UNCHANGED` */
export function reviseItem(
  core: Core,
  access: WorkspaceAccess,
  { itemId, ifMatch }: { itemId: string; ifMatch: string },
  { message, ...sent }: BodyOf<typeof libraryEndpoints.reviseLibraryItem>,
): Promise<LibraryItem> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const item = await getEditable(inner, access, itemId, ifMatch);
    const { content, errors } = judgeContent(item.kind, sent, 'body');
    if (errors.length > 0) throw invalidFields(errors);
    return saveRevision(inner, access, item, content, { action: 'library.revised', message });
  });
}

/** @throws {HttpProblem} `NOT_FOUND`, `EDIT_CONFLICT`, `ARCHIVED`, `UNCHANGED` */
export function restoreRevision(
  core: Core,
  access: WorkspaceAccess,
  { itemId, revision, ifMatch }: { itemId: string; revision: number; ifMatch: string },
): Promise<LibraryItem> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const item = await getEditable(inner, access, itemId, ifMatch);
    const older = await getRevision(inner, access, itemId, revision);
    const message = `Restored revision ${revision}`;
    return saveRevision(inner, access, item, older, { action: 'library.restored', message });
  });
}

/** Puts an item into the archive or takes it out; it may be there already. @throws {HttpProblem} `NOT_FOUND` */
export function archiveItem(core: Core, access: WorkspaceAccess, itemId: string, into: boolean): Promise<LibraryItem> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const item = await getItem(inner, access, itemId);
    if ((item.archivedAt !== null) === into) return item;
    await setArchived(inner, access, itemId, into ? core.now() : null);
    await record(inner, access, into ? 'library.archived' : 'library.unarchived', item);
    return getItem(inner, access, itemId);
  });
}

/** Saves what a revision would say, if that is something new. Needs the caller's transaction. */
export async function saveRevision(
  core: Core,
  access: WorkspaceAccess,
  item: LibraryItem,
  content: LibraryContent,
  { action, message }: { action: LibraryDeed; message: string },
): Promise<LibraryItem> {
  if (sameContent(item, content)) {
    throw new HttpProblem('UNCHANGED', `Revision ${item.revision} of ${item.name} says the same already.`);
  }
  const revised = await addRevision(core, access, item, content, message);
  await record(core, access, action, revised, message);
  return revised;
}

async function getEditable(core: Core, access: WorkspaceAccess, id: string, ifMatch: string): Promise<LibraryItem> {
  const item = await getItem(core, access, id);
  requireMatch(ifMatch, etagOf('r', item.revision));
  if (item.archivedAt === null) return item;
  throw new HttpProblem('ARCHIVED', `${item.name} lies in the archive. Take it out before changing it.`);
}

/** Writes down what was done to an item, with its name and revision as they are then. */
export function record(
  core: Core,
  { workspaceId, actor: { personId } }: WorkspaceAccess,
  action: LibraryDeed,
  { id, kind, name, revision }: LibraryItem,
  message?: string,
): Promise<void> {
  const detail = { kind, name, revision: String(revision), ...(message === undefined ? {} : { message }) };
  return recordDeed(core, { workspaceId, personId, action, subjectId: id, detail });
}
