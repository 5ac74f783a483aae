import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { AsyncView } from '../components/async-view.tsx';
import { signInPath } from '../lib/session/sign-in-path.ts';
import { useMe } from '../lib/session/use-me.ts';

/** Pages for signed-in people; anybody else signs in first and comes back to the same address. */
export function SignedIn() {
  const query = useMe();
  const location = useLocation();
  return (
    <AsyncView query={query} loading="Signing in">
      {(me) => (me ? <Outlet /> : <Navigate to={signInPath(location)} replace />)}
    </AsyncView>
  );
}
