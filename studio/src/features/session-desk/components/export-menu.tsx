import type { RefObject } from 'react';
import { Button } from '../../../components/button.tsx';
import { Menu, MenuItem } from '../../../components/menu.tsx';
import { useRun } from '../hooks/run-context.ts';
import { downloadText } from '../hooks/use-study-files.ts';
import { resultFile, seriesFile } from '../model/export-files.ts';

type Props = { drawing: RefObject<HTMLDivElement | null> };

export function ExportMenu({ drawing: _drawing }: Props) {
  const { answer, study } = useRun();
  if (!answer || !study) return <Button unavailable="No result yet">Export</Button>;
  return (
    <Menu trigger={<Button>Export</Button>} align="end">
      <MenuItem onSelect={() => downloadText(seriesFile(answer.result, study))}>Series as CSV</MenuItem>
      <MenuItem onSelect={() => downloadText(resultFile(answer.result, study))}>Result as JSON</MenuItem>
    </Menu>
  );
}
