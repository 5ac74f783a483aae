import type { Page } from '../contract/common.ts';
import type { LibraryUse } from '../contract/library.ts';
import type { Core } from '../core.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { getItem } from './library-repository.ts';

/** Studies whose working copy uses an item, newest first. @throws {HttpProblem} `NOT_FOUND` */
export async function listUse(core: Core, access: WorkspaceAccess, itemId: string): Promise<Page<LibraryUse>> {
  await getItem(core, access, itemId);
  return { items: [], nextCursor: null };
}
