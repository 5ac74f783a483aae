import { createContext, useContext } from 'react';
import type { Person } from '../../../../server/src/contract/account.ts';
import type { Capability, Role } from '../../../../server/src/contract/roles.ts';

/** The workspace that a page below `/w/:workspaceId` stands in, and what the signed-in person may do there. */
export type WorkspaceHere = {
  workspaceId: string;
  workspaceName: string;
  role: Role;
  person: Person;
  may: (capability: Capability) => boolean;
};

export const WorkspaceContext = createContext<WorkspaceHere | null>(null);

/** @throws {Error} outside `/w/:workspaceId` */
export function useWorkspace(): WorkspaceHere {
  const here = useContext(WorkspaceContext);
  if (!here) throw new Error('useWorkspace needs a page below /w/:workspaceId');
  return here;
}
