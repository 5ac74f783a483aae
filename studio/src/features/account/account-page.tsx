import { AsyncView } from '../../components/async-view.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { useMe } from '../../lib/session/use-me.ts';
import { ApiTokensPart } from './components/api-tokens-part.tsx';
import { DevicesPart } from './components/devices-part.tsx';
import { EmailPart } from './components/email-part.tsx';
import { NamePart } from './components/name-part.tsx';
import { PasswordPart } from './components/password-part.tsx';
import { WorkspacesPart } from './components/workspaces-part.tsx';

/** The own account: who one is, how one signs in and where one is signed in. */
export function AccountPage() {
  const query = useMe();
  return (
    <div className="page">
      <PageTitle page="Account">Account</PageTitle>
      <AsyncView query={query} loading="Reading the account">
        {(me) =>
          me && (
            <>
              <div className="parts-beside">
                <NamePart person={me.person} />
                <EmailPart person={me.person} />
                <PasswordPart person={me.person} />
              </div>
              <WorkspacesPart workspaces={me.workspaces} />
              <DevicesPart />
              {me.workspaces.length > 0 && <ApiTokensPart me={me} />}
            </>
          )
        }
      </AsyncView>
    </div>
  );
}
