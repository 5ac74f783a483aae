import type { Me } from '../../../../../server/src/contract/account.ts';
import { lastWorkspace, workspaceToOpen } from '../../../lib/session/last-workspace.ts';

/** Where a person starts who asked for no page: their workspace, or where one is made. */
export function homePlace(me: Me): string {
  const workspace = workspaceToOpen(me, lastWorkspace.get());
  return workspace ? `/w/${workspace.workspaceId}` : '/new-workspace';
}
