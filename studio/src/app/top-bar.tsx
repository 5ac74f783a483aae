import { Link, NavLink, useLocation, useMatch } from 'react-router-dom';
import type { Me } from '../../../server/src/contract/account.ts';
import { Mark } from '../components/mark.tsx';
import { Menu, MenuLink, MenuRule } from '../components/menu.tsx';
import { lastWorkspace, workspaceToOpen } from '../lib/session/last-workspace.ts';
import { signInPath } from '../lib/session/sign-in-path.ts';
import { useStoredValue } from '../lib/stored-value.ts';
import { DisplayChoices, DisplayMenu } from './display-menu.tsx';
import { PersonMenu, WholeMenu, WorkspaceMenu } from './signed-in-menus.tsx';

const guestPages = [
  { to: '/try', name: 'Session desk' },
  { to: '/model', name: 'The model' },
  { to: '/schema', name: 'Schema' },
];

/** @param me  undefined while it is not known who is signed in: neither menu is shown then */
export function TopBar({ me }: { me: Me | null | undefined }) {
  return (
    <header className="top">
      <Link className="brand" to="/">
        <Mark />
        <span>Voltiplano</span>
      </Link>
      {me ? <SignedInBar me={me} /> : <GuestBar isKnown={me === null} />}
    </header>
  );
}

function SignedInBar({ me }: { me: Me }) {
  const lastId = useStoredValue(lastWorkspace);
  const hereId = useMatch('/w/:workspaceId/*')?.params.workspaceId;
  const here = me.workspaces.find(({ workspaceId }) => workspaceId === hereId) ?? workspaceToOpen(me, lastId);
  return (
    <>
      <nav aria-label="Main">
        {here && (
          <>
            <NavLink to={`/w/${here.workspaceId}/studies`}>Studies</NavLink>
            <NavLink to={`/w/${here.workspaceId}/library`}>Library</NavLink>
          </>
        )}
      </nav>
      <div className="top-right wide-only">
        <WorkspaceMenu me={me} here={here} />
        <PersonMenu me={me} />
      </div>
      <div className="top-right phone-only">
        <WholeMenu me={me} here={here} />
      </div>
    </>
  );
}

function GuestBar({ isKnown }: { isKnown: boolean }) {
  const location = useLocation();
  const isAway = !/^\/(sign-|forgot-|reset-|join|confirm-)/.test(location.pathname);
  const signIn = isKnown && isAway && (
    <Link className="top-act" to={location.pathname === '/' ? '/sign-in' : signInPath(location)}>
      Sign in
    </Link>
  );
  return (
    <>
      <nav aria-label="Main" className="wide-only">
        {guestPages.map(({ to, name }) => (
          <NavLink key={to} to={to}>
            {name}
          </NavLink>
        ))}
      </nav>
      <div className="top-right">
        <span className="wide-only">
          <DisplayMenu />
        </span>
        <span className="phone-only">
          <Menu trigger={<button className="top-act">Menu</button>} align="end">
            {guestPages.map(({ to, name }) => (
              <MenuLink key={to} to={to}>
                {name}
              </MenuLink>
            ))}
            <MenuRule />
            <DisplayChoices />
          </Menu>
        </span>
        {signIn}
      </div>
    </>
  );
}
