import { useRef, useState } from 'react';
import { Button } from '../../../components/button.tsx';
import { Menu, MenuHeading, MenuItem, MenuRule } from '../../../components/menu.tsx';
import { useDispatch } from '../hooks/use-desk.ts';
import type { StudyFiles } from '../hooks/use-study-files.ts';
import { examples } from '../../../lib/examples.ts';
import { ExportMenu } from './export-menu.tsx';
import { KeepAction } from './keep-action.tsx';
import type { HeadTools } from './session-desk.tsx';

/** Examples, files, export, and the one next step: keep what is there as baseline. */
export function DeskActions({ files, pickFile, showKeys, stripsRef, ledgerRef }: HeadTools) {
  const dispatch = useDispatch();
  return (
    <>
      <Menu trigger={<Button>Examples</Button>} align="end">
        {examples.map((example) => (
          <MenuItem key={example.title} onSelect={() => void files.openExample(example)}>
            <span className="example">
              {example.title}
              <small>{example.shows}</small>
            </span>
          </MenuItem>
        ))}
      </Menu>
      <StudyMenu files={files} onOpen={pickFile} onShowKeys={showKeys} />
      <KeepAction />
      <ExportMenu stripsRef={stripsRef} ledgerRef={ledgerRef} />
      <Button go onClick={() => dispatch({ type: 'keep-baseline' })}>
        Keep as baseline
      </Button>
    </>
  );
}

type StudyMenuProps = { files: StudyFiles; onOpen: () => void; onShowKeys: () => void };

function StudyMenu({ files, onOpen, onShowKeys }: StudyMenuProps) {
  const [said, setSaid] = useState('');
  const quiet = useRef<ReturnType<typeof setTimeout>>(undefined);
  const copy = async () => {
    setSaid(await files.copyLink());
    clearTimeout(quiet.current);
    quiet.current = setTimeout(() => setSaid(''), 8000);
  };
  return (
    <span className="study-menu">
      <Menu trigger={<Button>Study</Button>} align="end">
        <MenuItem onSelect={onOpen}>Open a study file</MenuItem>
        <MenuItem onSelect={files.save}>Save the study</MenuItem>
        <MenuItem onSelect={() => void copy()}>Copy a link</MenuItem>
        <MenuRule />
        <MenuHeading>Help</MenuHeading>
        <MenuItem onSelect={onShowKeys}>Keys</MenuItem>
      </Menu>
      <span role="status" className={said ? 'said' : 'unseen'}>
        {said}
      </span>
    </span>
  );
}
