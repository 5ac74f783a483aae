import { Link, Navigate, useSearchParams } from 'react-router-dom';
import { AsyncView } from '../../components/async-view.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { useMe } from '../../lib/session/use-me.ts';
import { placeAfterSignIn } from '../../lib/session/sign-in-path.ts';
import { ProviderButton } from './components/provider-button.tsx';
import { SignInForm } from './components/sign-in-form.tsx';
import { homePlace } from './model/home-place.ts';

const providerProblems: Record<string, string> = {
  PROVIDER_FAILED: 'The sign-in at your company was not finished. Try again, or sign in with a password.',
  ACCOUNT_NOT_PROVEN:
    'An account with this e-mail exists, but it has not been shown that the address is yours. Sign in with its password, or set a new one by mail.',
  EMAIL_NOT_VERIFIED: 'Your company has not confirmed the e-mail of your account there. Sign in with a password.',
};

/** Signing in, and on to the page that was asked for. */
export function SignInPage() {
  const [search] = useSearchParams();
  const query = useMe();
  const to = placeAfterSignIn(search.get('to'));
  const problem = providerProblems[search.get('problem') ?? ''];
  return (
    <section className="page form-page">
      <PageTitle page="Sign in">Sign in</PageTitle>
      <AsyncView query={query} loading="Looking who is signed in">
        {(me) =>
          me ? (
            <Navigate to={to ?? homePlace(me)} replace />
          ) : (
            <>
              {problem && <Notice kind="stop">{problem}</Notice>}
              {to && <p className="text-ink2">Sign in to open the page you asked for.</p>}
              <SignInForm
                onSignedIn={() => undefined}
                beside={<Link to="/forgot-password">Forgot the password</Link>}
              />
              <ProviderButton next={to ?? '/'} />
              <p className="text-ink2">
                No account yet? <Link to="/sign-up">Make one</Link>, or{' '}
                <Link to="/try">try the session desk without</Link>.
              </p>
            </>
          )
        }
      </AsyncView>
    </section>
  );
}
