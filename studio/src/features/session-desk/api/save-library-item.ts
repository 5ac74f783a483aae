import {
  libraryEndpoints,
  type LibraryItem,
  type LibraryKind,
  type LibraryRevision,
} from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';

type Body = LibraryRevision['body'];

/** What a person says when a part of the desk goes into the library under a name of its own. */
export const newItemSchema = libraryEndpoints.createLibraryItem.body.pick({ name: true, source: true, message: true });

/** What a person says when a part of the desk becomes a new revision. */
export const newRevisionSchema = libraryEndpoints.reviseLibraryItem.body.pick({ message: true });

type NewItem = { kind: LibraryKind; name: string; source: string; message: string; body: Body };

/** Adds a part to the library. @param wish  the same for the same wish: asked for twice, it is added once */
export function createLibraryItem(workspaceId: string, item: NewItem, wish: string): Promise<LibraryItem> {
  return callApi(libraryEndpoints.createLibraryItem, { params: { workspaceId }, body: item, idempotencyKey: wish });
}

type Revising = { itemId: string; from: LibraryRevision; body: Body; message: string };

/** Saves a new revision of a part, made from the revision that the desk has it from. */
export function reviseLibraryItem(workspaceId: string, revising: Revising, wish: string): Promise<LibraryItem> {
  const { itemId, from, body, message } = revising;
  const { name, notes, source, revision } = from;
  return callApi(libraryEndpoints.reviseLibraryItem, {
    params: { workspaceId, itemId },
    body: { name, notes, source, body, message },
    ifMatch: `"r${revision}"`,
    idempotencyKey: wish,
  });
}
