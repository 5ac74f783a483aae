import { useState } from 'react';
import { type Role, roles } from '../../../../../server/src/contract/roles.ts';
import type { Member } from '../../../../../server/src/contract/workspace.ts';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { toast } from '../../../components/toasts.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useChangeRole } from '../api/change-role.ts';

type Props = { member: Member; isOnlyOwner: boolean };

/** A member's role, changed in place; giving up the own one is asked about first. */
export function RoleChoice({ member, isOnlyOwner }: Props) {
  const { workspaceId, person } = useWorkspace();
  const change = useChangeRole(workspaceId);
  const [asked, setAsked] = useState<Role | null>(null);
  const { personId, name, role } = member;
  if (isOnlyOwner) {
    return (
      <>
        owner <span className="text-ink3">the only one, so this role stays</span>
      </>
    );
  }
  const give = (next: Role) =>
    change.mutate(
      { personId, role: next },
      {
        onSuccess: () => toast(`${name} is ${next} now.`),
        onError: (error) => toast(`${name} stays ${role}. ${problemSentence(error)}`, { kind: 'stop' }),
      },
    );
  const choose = (next: Role) => (personId === person.id ? setAsked(next) : give(next));
  return (
    <>
      <select
        aria-label={`Role of ${name}`}
        value={role}
        disabled={change.isPending}
        onChange={(event) => choose(event.target.value as Role)}
      >
        {roles.map((one) => (
          <option key={one} value={one}>
            {one}
          </option>
        ))}
      </select>
      <ConfirmDialog
        title="Give up being owner"
        about={`As ${asked ?? role} you can no longer invite, change roles or settings. Another owner can make you owner again.`}
        open={asked !== null}
        onOpenChange={(open) => !open && setAsked(null)}
        confirm={`Become ${asked ?? role}`}
        busy="Changing the role"
        onConfirm={async () => {
          if (asked) await change.mutateAsync({ personId, role: asked });
        }}
      />
    </>
  );
}
