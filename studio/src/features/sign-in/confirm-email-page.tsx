import { useQueryClient } from '@tanstack/react-query';
import { Link, useLocation } from 'react-router-dom';
import { Button } from '../../components/button.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { problemSentence } from '../../lib/api/api-problem.ts';
import { meQuery } from '../../lib/session/me-query.ts';
import { useConfirmEmail } from './api/confirm-email.ts';

/** Taking a new e-mail by the link mailed to it. Pressed, not done on opening: programs that check mails open links. */
export function ConfirmEmailPage() {
  const client = useQueryClient();
  const token = useLocation().hash.slice(1);
  const { mutate, isPending, isSuccess, error } = useConfirmEmail();
  const confirm = () =>
    mutate({ token }, { onSuccess: () => void client.invalidateQueries({ queryKey: meQuery.queryKey }) });
  return (
    <section className="page form-page">
      <PageTitle page="New e-mail">Take the new e-mail</PageTitle>
      {isSuccess ? (
        <Notice action={<Link to="/account">Open the account</Link>}>
          The account has the new e-mail. Sign in with it from now on.
        </Notice>
      ) : (
        <>
          <p className="text-ink2">From then on you sign in with the address that this link was mailed to.</p>
          {error && (
            <Notice kind="stop" action={<Link to="/account">Mail a new link</Link>}>
              {problemSentence(error)}
            </Notice>
          )}
          <Button
            go
            busy={isPending ? 'Taking the new e-mail' : undefined}
            unavailable={token ? undefined : 'The address lacks what stands behind its #. Open the whole link.'}
            onClick={confirm}
          >
            Take the new e-mail
          </Button>
        </>
      )}
    </section>
  );
}
