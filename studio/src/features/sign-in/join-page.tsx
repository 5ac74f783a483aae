import { useLocation } from 'react-router-dom';
import { AsyncView } from '../../components/async-view.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { isProblem } from '../../lib/api/api-problem.ts';
import { useMe } from '../../lib/session/use-me.ts';
import { useInvitation } from './api/read-invitation.ts';
import { InvitationSheet } from './components/invitation-sheet.tsx';
import { JoinAsGuest } from './components/join-as-guest.tsx';
import { JoinSignedIn } from './components/join-signed-in.tsx';
import { keptForReturn } from './model/kept-for-return.ts';

/** What an invitation leads to, and joining by it. Its token stands behind the # of the address. */
export function JoinPage() {
  const token = useLocation().hash.slice(1) || keptForReturn('invitation');
  return (
    <section className="page form-page">
      <PageTitle page="Invitation">Invitation</PageTitle>
      {token ? (
        <Join token={token} />
      ) : (
        <Notice kind="stop">The address lacks what stands behind its #. Open the whole link from the mail.</Notice>
      )}
    </section>
  );
}

function Join({ token }: { token: string }) {
  const invitation = useInvitation(token);
  const me = useMe();
  if (isProblem(invitation.error, 'LINK_INVALID')) {
    return (
      <Notice kind="stop">
        This invitation was used, withdrawn or has expired. Whoever invited you can send it again.
      </Notice>
    );
  }
  return (
    <AsyncView query={invitation} loading="Reading the invitation">
      {(preview) => (
        <>
          <InvitationSheet preview={preview} />
          <AsyncView query={me} loading="Looking who is signed in">
            {(person) =>
              person ? (
                <JoinSignedIn token={token} preview={preview} me={person} />
              ) : (
                <JoinAsGuest token={token} preview={preview} />
              )
            }
          </AsyncView>
        </>
      )}
    </AsyncView>
  );
}
