import type { Member } from '../../../../../server/src/contract/workspace.ts';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { toast } from '../../../components/toasts.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useRemoveMember } from '../api/remove-member.ts';

export function RemoveMember({ member: { personId, name } }: { member: Member }) {
  const { workspaceId, workspaceName } = useWorkspace();
  const remove = useRemoveMember(workspaceId);
  return (
    <ConfirmDialog
      title={`Remove ${name}`}
      about={`${name} can no longer open ${workspaceName}, and their API tokens for it end. What they made stays. To come back they must be invited again.`}
      trigger={
        <button className="lnk" aria-label={`Remove ${name}`}>
          Remove
        </button>
      }
      confirm={`Remove ${name}`}
      busy="Removing"
      onConfirm={async () => {
        await remove.mutateAsync(personId);
        toast(`${name} is removed.`);
      }}
    />
  );
}
