import { useRef, useState, type RefObject } from 'react';
import { Button } from '../../../components/button.tsx';
import { Menu, MenuHeading, MenuItem, MenuRule } from '../../../components/menu.tsx';
import { useDispatch } from '../hooks/use-desk.ts';
import type { StudyFiles } from '../hooks/use-study-files.ts';
import { examples } from '../../../lib/examples.ts';
import { ExportMenu } from './export-menu.tsx';
import type { Drawings } from './results-panel.tsx';

type Props = Drawings & {
  files: StudyFiles;
  /** The file input, so that a key can open it too. */
  picker: RefObject<HTMLInputElement | null>;
  onShowKeys: () => void;
};

/** Examples, files, export, and the one next step: keep what is there as baseline. */
export function DeskActions({ files, picker, stripsRef, ledgerRef, onShowKeys }: Props) {
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
      <StudyMenu files={files} onOpen={() => picker.current?.click()} onShowKeys={onShowKeys} />
      <ExportMenu stripsRef={stripsRef} ledgerRef={ledgerRef} />
      <Button go onClick={() => dispatch({ type: 'keep-baseline' })}>
        Keep as baseline
      </Button>
      <input
        ref={picker}
        type="file"
        hidden
        accept=".json,application/json"
        aria-label="Study file"
        onChange={(event) => {
          const file = event.target.files?.[0];
          if (file) void files.openFile(file);
          // The same file can be chosen again.
          event.target.value = '';
        }}
      />
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
