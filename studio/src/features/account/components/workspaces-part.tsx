import { Link } from 'react-router-dom';
import type { Membership } from '../../../../../server/src/contract/account.ts';

/** Where one belongs, and as what. Leaving is on the team's page. */
export function WorkspacesPart({ workspaces }: { workspaces: Membership[] }) {
  return (
    <section className="page-part" aria-labelledby="part-workspaces">
      <h2 id="part-workspaces">Workspaces</h2>
      {workspaces.length === 0 ? (
        <p className="my-[8px] text-ink2">
          You belong to none. Make a workspace of your own, or open the link of an invitation.
        </p>
      ) : (
        <ul className="rows">
          {workspaces.map(({ workspaceId, workspaceName, role }) => (
            <li key={workspaceId}>
              <span>
                <Link to={`/w/${workspaceId}`}>{workspaceName}</Link>
                <span className="ml-[12px] text-ink2">{role}</span>
              </span>
              <Link className="lnk" to={`/w/${workspaceId}/team`} aria-label={`Team of ${workspaceName}`}>
                Team
              </Link>
            </li>
          ))}
        </ul>
      )}
      <Link to="/new-workspace">New workspace</Link>
    </section>
  );
}
