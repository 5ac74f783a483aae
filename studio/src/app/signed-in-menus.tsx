import type { Me, Membership } from '../../../server/src/contract/account.ts';
import { Menu, MenuHeading, MenuItem, MenuLink, MenuRule } from '../components/menu.tsx';
import { toast } from '../components/toasts.tsx';
import { problemSentence } from '../lib/api/api-problem.ts';
import { DisplayChoices } from './display-menu.tsx';

type Props = { me: Me; here: Membership | null };

/** The workspace that the page stands in, and the way to others. */
export function WorkspaceMenu({ me, here }: Props) {
  return (
    <Menu trigger={<button className="top-act">{here?.workspaceName ?? 'No workspace'}</button>} align="end">
      <WorkspaceItems me={me} here={here} />
    </Menu>
  );
}

export function PersonMenu({ me }: { me: Me }) {
  return (
    <Menu trigger={<button className="top-act">{me.person.name}</button>} align="end">
      <PersonItems />
    </Menu>
  );
}

/** Both in one, where the sheet is narrow. */
export function WholeMenu({ me, here }: Props) {
  return (
    <Menu trigger={<button className="top-act">Menu</button>} align="end">
      <WorkspaceItems me={me} here={here} />
      <MenuRule />
      <MenuHeading>{me.person.name}</MenuHeading>
      <PersonItems />
    </Menu>
  );
}

function WorkspaceItems({ me, here }: Props) {
  const others = me.workspaces.filter(({ workspaceId }) => workspaceId !== here?.workspaceId);
  return (
    <>
      {here && (
        <>
          <MenuHeading>{here.workspaceName}</MenuHeading>
          <MenuLink to={`/w/${here.workspaceId}/team`}>Team</MenuLink>
          <MenuLink to={`/w/${here.workspaceId}/activity`}>Activity</MenuLink>
          {here.role === 'owner' && <MenuLink to={`/w/${here.workspaceId}/settings`}>Workspace settings</MenuLink>}
          <MenuRule />
        </>
      )}
      {others.length > 0 && <MenuHeading>Other workspaces</MenuHeading>}
      {others.map(({ workspaceId, workspaceName }) => (
        <MenuLink key={workspaceId} to={`/w/${workspaceId}`}>
          {workspaceName}
        </MenuLink>
      ))}
      <MenuLink to="/new-workspace">New workspace</MenuLink>
    </>
  );
}

function PersonItems() {
  return (
    <>
      <MenuLink to="/account">Account</MenuLink>
      <MenuItem onSelect={() => void signOut()}>Sign out</MenuItem>
      <MenuRule />
      <DisplayChoices />
      <MenuRule />
      <MenuLink to="/try">Session desk without saving</MenuLink>
      <MenuLink to="/model">The model</MenuLink>
      <MenuLink to="/schema">Schema</MenuLink>
    </>
  );
}

/** Loaded anew, so that nothing of the person stays in the page's memory. */
async function signOut(): Promise<void> {
  try {
    const { signOutHere } = await import('../lib/session/sign-out.ts');
    await signOutHere();
    window.location.assign('/');
  } catch (error) {
    toast(`Still signed in. ${problemSentence(error)}`, { kind: 'stop' });
  }
}
