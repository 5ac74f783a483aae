import type { Invitation } from '../../../../../server/src/contract/workspace.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { type Column, DataTable } from '../../../components/data-table.tsx';
import { toast } from '../../../components/toasts.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { formatDay } from '../../../lib/moments.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useInvitations } from '../api/list-invitations.ts';
import { useResendInvitation } from '../api/resend-invitation.ts';
import { useWithdrawInvitation } from '../api/withdraw-invitation.ts';
import { InviteForm } from './invite-form.tsx';

const columns: Column<Invitation>[] = [
  { id: 'email', head: 'E-mail', isName: true, cell: ({ email }) => email },
  { id: 'role', head: 'Role', cell: ({ role }) => role },
  { id: 'by', head: 'Invited by', cell: ({ invitedByName }) => invitedByName ?? 'somebody who has left' },
  {
    id: 'expires',
    head: 'Open until',
    cell: ({ expiresAt, isExpired }) => (isExpired ? <span className="text-stop">expired</span> : formatDay(expiresAt)),
  },
  {
    id: 'act',
    head: 'Actions',
    isHeadUnseen: true,
    isRight: true,
    cell: (invitation) => <Acts invitation={invitation} />,
  },
];

/** Inviting, and who has been invited but has not joined. */
export function InvitationsPart() {
  const { workspaceId } = useWorkspace();
  const query = useInvitations(workspaceId);
  return (
    <section className="page-part" aria-labelledby="part-invitations">
      <h2 id="part-invitations">Invitations</h2>
      <InviteForm />
      <AsyncView
        query={query}
        loading="Reading the invitations"
        isEmpty={({ items }) => items.length === 0}
        empty={<p className="mt-[16px] text-ink2">Nobody is waiting to join.</p>}
      >
        {({ items }) => (
          <div className="mt-[16px]">
            <DataTable label="Open invitations" columns={columns} rows={items} rowId={({ id }) => id} />
          </div>
        )}
      </AsyncView>
    </section>
  );
}

function Acts({ invitation: { id, email } }: { invitation: Invitation }) {
  const { workspaceId } = useWorkspace();
  const resend = useResendInvitation(workspaceId);
  const withdraw = useWithdrawInvitation(workspaceId);
  return (
    <span className="inline-flex gap-[16px]">
      <button
        className="lnk"
        disabled={resend.isPending}
        aria-label={`Send the invitation to ${email} again`}
        onClick={() =>
          resend.mutate(id, {
            onSuccess: () => toast(`A new link is on its way to ${email}; the one before works no more.`),
            onError: (error) => toast(`Not sent to ${email}. ${problemSentence(error)}`, { kind: 'stop' }),
          })
        }
      >
        {resend.isPending ? 'Sending' : 'Send again'}
      </button>
      <ConfirmDialog
        title={`Withdraw the invitation to ${email}`}
        about="The link in the mail works no more."
        trigger={
          <button className="lnk" aria-label={`Withdraw the invitation to ${email}`}>
            Withdraw
          </button>
        }
        confirm="Withdraw"
        busy="Withdrawing"
        onConfirm={() => withdraw.mutateAsync(id)}
      />
    </span>
  );
}
