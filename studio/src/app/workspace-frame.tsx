import { useEffect, useMemo, type ReactNode } from 'react';
import { Outlet, useParams } from 'react-router-dom';
import type { Me, Membership } from '../../../server/src/contract/account.ts';
import { roleMay } from '../../../server/src/contract/roles.ts';
import { lastWorkspace } from '../lib/session/last-workspace.ts';
import { useMe } from '../lib/session/use-me.ts';
import { WorkspaceContext } from '../lib/session/use-workspace.ts';
import { UnknownWorkspacePage } from './unknown-workspace-page.tsx';

/** Pages of the workspace in the address, for its members. Stands inside `SignedIn`. */
export function WorkspaceFrame() {
  const { data: me } = useMe();
  const { workspaceId } = useParams();
  if (!me) return null;
  const membership = me.workspaces.find((one) => one.workspaceId === workspaceId);
  if (!membership) return <UnknownWorkspacePage me={me} />;
  return (
    <InWorkspace key={membership.workspaceId} me={me} membership={membership}>
      <Outlet />
    </InWorkspace>
  );
}

type Props = { me: Me; membership: Membership; children: ReactNode };

function InWorkspace({ me: { person }, membership, children }: Props) {
  const { workspaceId } = membership;
  // This browser's storage: the next visit opens the same workspace.
  useEffect(() => lastWorkspace.set(workspaceId), [workspaceId]);
  const here = useMemo(
    () => ({
      ...membership,
      person,
      may: (capability: Parameters<typeof roleMay>[1]) => roleMay(membership.role, capability),
    }),
    [membership, person],
  );
  return <WorkspaceContext value={here}>{children}</WorkspaceContext>;
}
