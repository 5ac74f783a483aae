import { useEffect, useRef } from 'react';
import type { Study } from '../../../../../server/src/contract/study.ts';
import { Button } from '../../../components/button.tsx';
import { useImport } from '../hooks/use-import.ts';
import { importWord, readyEntries, whyNothing } from '../model/import-list.ts';
import { FileDrop } from './file-drop.tsx';
import { ImportRow } from './import-row.tsx';

type Props = {
  /** Files that came with the wish to import. */
  files?: readonly File[];
  /** What a press of the button made, where it made anything. @param isAll  whether no file is left over */
  onMade: (studies: Study[], isAll: boolean) => void;
};

/** Study files, dropped or chosen, each judged before anything is made of it. */
export function ImportFiles({ files = [], onMade }: Props) {
  const { entries, isBusy, add, leaveOut, run } = useImport();
  const taken = useRef<readonly File[]>(undefined);
  // The files themselves, which are read once for each time they are handed over.
  useEffect(() => {
    if (taken.current === files) return;
    taken.current = files;
    if (files.length > 0) add(files);
  }, [files, add]);
  const ready = readyEntries(entries);
  const take = async () => {
    const made = await run();
    const isAll = made.length === entries.filter(({ madeId }) => madeId === null).length;
    if (made.length > 0) onMade(made, isAll);
  };
  return (
    <div className="import">
      <FileDrop className="drop" isOff={isBusy} onFiles={add}>
        <p>Drop study files here, or choose them. They are checked first; nothing is made of them before you say so.</p>
        <label className="btn file-choice">
          Choose files
          <input
            type="file"
            multiple
            accept=".json,application/json"
            onChange={({ currentTarget }) => {
              add([...(currentTarget.files ?? [])]);
              // The same file can be chosen again once it is mended.
              currentTarget.value = '';
            }}
          />
        </label>
      </FileDrop>
      {entries.length > 0 && (
        <>
          <ul className="rows" aria-label="Files" aria-live="polite">
            {entries.map((entry) => (
              <ImportRow key={entry.key} entry={entry} onLeaveOut={isBusy ? undefined : () => leaveOut(entry.key)} />
            ))}
          </ul>
          <div className="dialog-actions">
            <Button
              go
              busy={isBusy ? 'Importing' : undefined}
              unavailable={whyNothing(entries) ?? undefined}
              onClick={() => void take()}
            >
              {importWord(ready.length)}
            </Button>
          </div>
        </>
      )}
    </div>
  );
}
