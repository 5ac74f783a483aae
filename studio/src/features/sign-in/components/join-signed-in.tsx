import { Link, useNavigate } from 'react-router-dom';
import type { Me } from '../../../../../server/src/contract/account.ts';
import type { InvitationPreview } from '../../../../../server/src/contract/workspace.ts';
import { Button } from '../../../components/button.tsx';
import { Notice } from '../../../components/notice.tsx';
import { isProblem, problemSentence } from '../../../lib/api/api-problem.ts';
import { useAcceptInvitation } from '../api/accept-invitation.ts';
import { keepForReturn } from '../model/kept-for-return.ts';
import { OtherPersonNotice } from './other-person-notice.tsx';

type Props = { token: string; preview: InvitationPreview; me: Me };

/** Joining for somebody who is signed in: as the person invited, and as nobody else. */
export function JoinSignedIn({ token, preview, me }: Props) {
  const navigate = useNavigate();
  const { mutate, isPending, error } = useAcceptInvitation();
  const isOther = me.person.email.toLowerCase() !== preview.email.toLowerCase();
  if (isOther || isProblem(error, 'INVITATION_FOR_OTHER'))
    return <OtherPersonNotice invited={preview.email} own={me.person.email} />;
  const join = () =>
    mutate(token, {
      onSuccess: ({ workspaceId }) => {
        keepForReturn('invitation', null);
        void navigate(`/w/${workspaceId}`);
      },
    });
  return (
    <>
      {error && (
        <Notice
          kind="stop"
          action={isProblem(error, 'ALREADY_MEMBER') && <Link to="/account">Open your workspaces</Link>}
        >
          {problemSentence(error)}
        </Notice>
      )}
      <Button go busy={isPending ? 'Joining' : undefined} onClick={join}>
        Join {preview.workspaceName}
      </Button>
      <p className="text-ink2">Signed in as {me.person.email}.</p>
    </>
  );
}
