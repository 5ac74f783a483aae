import { Link, Navigate, useSearchParams } from 'react-router-dom';
import { AsyncView } from '../../components/async-view.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { useMe } from '../../lib/session/use-me.ts';
import { placeAfterSignIn } from '../../lib/session/sign-in-path.ts';
import { ProviderButton } from './components/provider-button.tsx';
import { SignInForm } from './components/sign-in-form.tsx';
import { homePlace } from './model/home-place.ts';
import { keepForReturn, keptForReturn } from './model/kept-for-return.ts';
import { providerProblems } from './model/provider-problems.ts';

/** Signing in, and on to the page that was asked for. */
export function SignInPage() {
  const [search] = useSearchParams();
  const query = useMe();
  const problem = providerProblems[search.get('problem') ?? ''];
  const to = placeAfterSignIn(search.get('to') ?? (problem ? keptForReturn('to') : null));
  const onward = to ? `?to=${encodeURIComponent(to)}` : '';
  return (
    <section className="page form-page">
      <PageTitle page="Sign in">Sign in</PageTitle>
      <AsyncView query={query} loading="Looking who is signed in">
        {(me) => {
          if (me) return <Navigate to={to ?? homePlace(me)} replace />;
          return (
            <>
              {problem && <Notice kind="stop">{problem}</Notice>}
              {to && <p className="text-ink2">Sign in to open the page you asked for.</p>}
              <SignInForm beside={<Link to="/forgot-password">Forgot the password</Link>} />
              <ProviderButton next={to ?? '/sign-in'} onLeave={() => keepForReturn('to', to)} />
              <p className="text-ink2">
                No account yet? <Link to={`/sign-up${onward}`}>Make one</Link>, or{' '}
                <Link to="/try">try the session desk without</Link>.
              </p>
            </>
          );
        }}
      </AsyncView>
    </section>
  );
}
