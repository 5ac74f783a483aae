import type { Member } from '../../../../../server/src/contract/workspace.ts';

/** Whether a member is the one owner that the workspace must keep. */
export function isOnlyOwner(members: readonly Member[], personId: string): boolean {
  const owners = members.filter(({ role }) => role === 'owner');
  return owners.length === 1 && owners[0]?.personId === personId;
}
