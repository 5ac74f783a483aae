import type { InvitationPreview } from '../../../../../server/src/contract/workspace.ts';
import { roleWords } from '../../../components/role-words.ts';

/** Where to, as what, by whom, for whom. */
export function InvitationSheet({ preview }: { preview: InvitationPreview }) {
  const { workspaceName, role, email, invitedByName } = preview;
  return (
    <dl className="facts">
      <div>
        <dt>Workspace</dt>
        <dd>{workspaceName}</dd>
      </div>
      <div>
        <dt>Role</dt>
        <dd>
          {role}
          <span className="text-ink2">: {roleWords[role]}</span>
        </dd>
      </div>
      <div>
        <dt>Invited by</dt>
        <dd>{invitedByName ?? 'an owner who has left'}</dd>
      </div>
      <div>
        <dt>For</dt>
        <dd>{email}</dd>
      </div>
    </dl>
  );
}
