import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { AsyncView } from '../components/async-view.tsx';
import { signInPath } from '../lib/session/sign-in-path.ts';
import { useMe } from '../lib/session/use-me.ts';

/** Pages for signed-in people; anybody else signs in first and comes back to the same address. */
export function SignedIn() {
  const query = useMe();
  const location = useLocation();
  // Who is known to be signed in stays so without a connection: each page says itself what is not up to date.
  const shown = query.data === undefined ? query : { ...query, error: null };
  return (
    <AsyncView query={shown} loading="Signing in">
      {(me) => (me ? <Outlet /> : <Navigate to={signInPath(location)} replace />)}
    </AsyncView>
  );
}
