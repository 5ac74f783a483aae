import type { Member } from '../../../../../server/src/contract/workspace.ts';
import { Button } from '../../../components/button.tsx';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useLeaveWorkspace } from '../api/leave-workspace.ts';
import { isOnlyOwner } from '../model/only-owner.ts';

/** Leaving; the only owner is told what to do first. */
export function LeaveWorkspace({ members }: { members: Member[] }) {
  const { workspaceId, workspaceName, person } = useWorkspace();
  const leave = useLeaveWorkspace(workspaceId);
  if (isOnlyOwner(members, person.id)) {
    return <Button unavailable="You are the only owner: make another owner first.">Leave the workspace</Button>;
  }
  return (
    <ConfirmDialog
      title={`Leave ${workspaceName}`}
      about="You can no longer open it, and your API tokens for it end. What you made stays. To come back you must be invited again."
      trigger={<Button>Leave the workspace</Button>}
      confirm="Leave"
      busy="Leaving"
      onConfirm={async () => {
        await leave.mutateAsync();
        // Loaded anew, so that nothing of the workspace stays in the page's memory.
        window.location.assign('/account');
      }}
    />
  );
}
