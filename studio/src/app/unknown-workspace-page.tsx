import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { Me } from '../../../server/src/contract/account.ts';
import { Button } from '../components/button.tsx';
import { PageTitle } from '../components/page-title.tsx';
import { meQuery } from '../lib/session/me-query.ts';

/** A workspace that is not there, or not for this person: asked once more, then said, with the way to their own. */
export function UnknownWorkspacePage({ me }: { me: Me }) {
  const { isFetchedAfterMount, error } = useQuery({ ...meQuery, refetchOnMount: 'always' });
  if (!isFetchedAfterMount && !error) {
    return (
      <p className="awaited" role="status">
        Looking for the workspace
      </p>
    );
  }
  return (
    <section className="page narrow">
      <PageTitle page="No workspace here">No workspace here for you</PageTitle>
      <p className="my-[16px] text-ink2">
        It was deleted, or {me.person.email} does not belong to it. An owner of it can invite you.
      </p>
      {me.workspaces.length > 0 && (
        <ul className="rows">
          {me.workspaces.map(({ workspaceId, workspaceName, role }) => (
            <li key={workspaceId}>
              <Link to={`/w/${workspaceId}`}>{workspaceName}</Link>
              <span className="text-ink2">{role}</span>
            </li>
          ))}
        </ul>
      )}
      {me.workspaces.length === 0 && (
        <Button go asChild>
          <Link to="/new-workspace">Make a workspace</Link>
        </Button>
      )}
    </section>
  );
}
