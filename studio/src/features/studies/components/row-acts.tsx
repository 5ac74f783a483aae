import type { StudyRow } from '../../../../../server/src/contract/study.ts';
import { Menu, MenuItem, MenuLink, MenuRule } from '../../../components/menu.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import type { RowDeeds } from '../hooks/use-row-deeds.ts';

type Props = { row: StudyRow; deeds: RowDeeds };

/** What can be done with a study: only what the reader's role may. */
export function RowActs({ row, deeds }: Props) {
  const { workspaceId, may } = useWorkspace();
  const isArchived = row.archivedAt !== null;
  const name = row.title || 'Untitled';
  return (
    <span className="row-acts">
      {isArchived && may('edit-studies') && (
        <button className="lnk" aria-label={`Take out: ${name}`} onClick={() => deeds.move(row, false)}>
          Take out
        </button>
      )}
      <Menu
        align="end"
        trigger={
          <button className="row-more" aria-label={`More: ${name}`}>
            More
          </button>
        }
      >
        <MenuLink to={`/w/${workspaceId}/studies/${row.id}`}>Open</MenuLink>
        {may('edit-studies') && <MenuItem onSelect={() => deeds.copy(row)}>Copy</MenuItem>}
        <MenuItem onSelect={() => deeds.exportFile(row)}>Export file</MenuItem>
        {may('edit-studies') && !isArchived && (
          <>
            <MenuRule />
            <MenuItem onSelect={() => deeds.move(row, true)}>Archive</MenuItem>
          </>
        )}
      </Menu>
    </span>
  );
}
