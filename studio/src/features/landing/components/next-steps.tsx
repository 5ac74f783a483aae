import { Link } from 'react-router-dom';
import { Button } from '../../../components/button.tsx';
import { lastWorkspace, workspaceToOpen } from '../../../lib/session/last-workspace.ts';
import { useMe } from '../../../lib/session/use-me.ts';
import { useStoredValue } from '../../../lib/stored-value.ts';

/** Where to go from here: a signed-in person's workspace, anybody else's desk. */
export function NextSteps() {
  const { data: me } = useMe();
  const lastId = useStoredValue(lastWorkspace);
  const workspace = me ? workspaceToOpen(me, lastId) : null;
  return (
    <div className="next">
      {workspace && (
        <Button go asChild>
          <Link to={`/w/${workspace.workspaceId}`}>Open {workspace.workspaceName}</Link>
        </Button>
      )}
      <Button go={!workspace} asChild>
        <Link to="/try">Open the desk</Link>
      </Button>
      <Button asChild>
        <Link to="/model">Read the model</Link>
      </Button>
    </div>
  );
}
