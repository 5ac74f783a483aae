import { Button } from '../../../components/button.tsx';
import { Menu, MenuItem, MenuRule } from '../../../components/menu.tsx';
import { saveLibraryFile } from '../hooks/save-library-file.ts';
import { kindOrder, kindWords } from '../model/kinds.ts';

type Props = { workspaceId: string; workspaceName: string };

/** Parts as a file: all of them, or those of a kind. */
export function ExportParts({ workspaceId, workspaceName }: Props) {
  return (
    <Menu trigger={<Button>Export</Button>} align="end">
      <MenuItem onSelect={() => void saveLibraryFile(workspaceId, {}, `${workspaceName} library`)}>All parts</MenuItem>
      <MenuRule />
      {kindOrder.map((kind) => {
        const { many } = kindWords[kind];
        return (
          <MenuItem key={kind} onSelect={() => void saveLibraryFile(workspaceId, { kind }, `${workspaceName} ${many}`)}>
            {`${many.charAt(0).toUpperCase()}${many.slice(1)}`}
          </MenuItem>
        );
      })}
    </Menu>
  );
}
