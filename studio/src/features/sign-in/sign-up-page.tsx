import { Link, Navigate, useSearchParams } from 'react-router-dom';
import { AsyncView } from '../../components/async-view.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { placeAfterSignIn } from '../../lib/session/sign-in-path.ts';
import { useMe } from '../../lib/session/use-me.ts';
import { SignUpForm } from './components/sign-up-form.tsx';
import { homePlace } from './model/home-place.ts';

/** Making an account together with its first workspace. */
export function SignUpPage() {
  const [search] = useSearchParams();
  const query = useMe();
  const to = placeAfterSignIn(search.get('to'));
  return (
    <section className="page form-page">
      <PageTitle page="Make an account">Make an account</PageTitle>
      <AsyncView query={query} loading="Looking who is signed in">
        {(me) => {
          if (me) return <Navigate to={to ?? homePlace(me)} replace />;
          return (
            <>
              <p className="text-ink2">
                With a workspace of its own, to which you can invite others. Were you invited? Open the link in that
                mail instead.
              </p>
              <SignUpForm />
              <p className="text-ink2">
                An account already? <Link to={`/sign-in${to ? `?to=${encodeURIComponent(to)}` : ''}`}>Sign in</Link>.
              </p>
            </>
          );
        }}
      </AsyncView>
    </section>
  );
}
