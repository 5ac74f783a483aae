import { AsyncView } from '../../components/async-view.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { useWorkspace } from '../../lib/session/use-workspace.ts';
import { useMembers } from './api/list-members.ts';
import { InvitationsPart } from './components/invitations-part.tsx';
import { LeaveWorkspace } from './components/leave-workspace.tsx';
import { MembersTable } from './components/members-table.tsx';
import { RolesTable } from './components/roles-table.tsx';

/** Who belongs to the workspace, as what, and who is invited. */
export function TeamPage() {
  const { workspaceId, workspaceName, may } = useWorkspace();
  const query = useMembers(workspaceId);
  return (
    <div className="page">
      <AsyncView query={query} loading="Reading the members">
        {({ items }) => (
          <>
            <div className="page-head">
              <div>
                <PageTitle page={`Team of ${workspaceName}`}>Team</PageTitle>
                <p className="text-ink2">
                  {items.length} in {workspaceName}
                </p>
              </div>
              <div className="acts">
                <LeaveWorkspace members={items} />
              </div>
            </div>
            <div className="page-rule" />
            <MembersTable members={items} />
          </>
        )}
      </AsyncView>
      {may('manage') && <InvitationsPart />}
      <section className="page-part" aria-labelledby="part-roles">
        <h2 id="part-roles">What a role may do</h2>
        <RolesTable />
      </section>
    </div>
  );
}
