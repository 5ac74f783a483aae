import { roles } from '../../../../../server/src/contract/roles.ts';
import type { Member } from '../../../../../server/src/contract/workspace.ts';
import { type Column, DataTable } from '../../../components/data-table.tsx';
import { formatDay } from '../../../lib/moments.ts';
import { useWorkspace, type WorkspaceHere } from '../../../lib/session/use-workspace.ts';
import { isOnlyOwner } from '../model/only-owner.ts';
import { RemoveMember } from './remove-member.tsx';
import { RoleChoice } from './role-choice.tsx';

/** Everybody in the workspace; owners change roles in place. */
export function MembersTable({ members }: { members: Member[] }) {
  const here = useWorkspace();
  return (
    <DataTable
      label="Members"
      columns={columnsFor(here, members)}
      rows={members}
      rowId={({ personId }) => personId}
      sort={{ by: 'name', order: 'asc' }}
    />
  );
}

function columnsFor({ person, may }: WorkspaceHere, members: Member[]): Column<Member>[] {
  const manages = may('manage');
  const always: Column<Member>[] = [
    {
      id: 'name',
      head: 'Name',
      isName: true,
      sortBy: ({ name }) => name,
      cell: ({ personId, name }) => (
        <>
          {name}
          {personId === person.id && <span className="ml-[8px] font-[400] text-ink3">you</span>}
        </>
      ),
    },
    { id: 'email', head: 'E-mail', narrow: 'bare', sortBy: ({ email }) => email, cell: ({ email }) => email },
    {
      id: 'role',
      head: 'Role',
      sortBy: ({ role }) => roles.indexOf(role),
      cell: (member) =>
        manages ? <RoleChoice member={member} isOnlyOwner={isOnlyOwner(members, member.personId)} /> : member.role,
    },
    {
      id: 'joined',
      head: 'Joined',
      sortBy: ({ joinedAt }) => joinedAt,
      cell: ({ joinedAt }) => formatDay(joinedAt),
    },
  ];
  if (!manages) return always;
  const cell = (member: Member) => (member.personId === person.id ? null : <RemoveMember member={member} />);
  return [...always, { id: 'act', head: 'Actions', isHeadUnseen: true, isRight: true, cell }];
}
