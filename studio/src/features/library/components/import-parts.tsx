import { useRef, useState } from 'react';
import type { LibraryFile } from '../../../../../server/src/contract/library.ts';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { fileIssues, readLibraryText, type FileIssue } from '../model/library-file.ts';
import { ImportForm } from './import-form.tsx';
import { ImportIssues } from './import-tables.tsx';

type Opened = { name: string; file: LibraryFile | null; issues: FileIssue[] };

/** Parts from a file: first what is in it and what will become of it, then all of them or none. */
export function ImportParts({ workspaceId }: { workspaceId: string }) {
  const picker = useRef<HTMLInputElement>(null);
  const [opened, setOpened] = useState<Opened | null>(null);
  const open = async (chosen: File) => {
    const read = readLibraryText(await chosen.text());
    const file = 'file' in read ? read.file : null;
    setOpened({ name: chosen.name, file, issues: 'file' in read ? fileIssues(read.file) : read.issues });
  };
  return (
    <>
      <Button onClick={() => picker.current?.click()}>Import a file</Button>
      <input
        ref={picker}
        type="file"
        hidden
        accept=".json,application/json"
        aria-label="Library file"
        onChange={(event) => {
          const chosen = event.target.files?.[0];
          if (chosen) void open(chosen);
          // The same file can be chosen again.
          event.target.value = '';
        }}
      />
      {opened && <ImportDialog {...opened} workspaceId={workspaceId} onClose={() => setOpened(null)} />}
    </>
  );
}

type DialogProps = Opened & { workspaceId: string; onClose: () => void };

function ImportDialog({ name, file, issues, workspaceId, onClose }: DialogProps) {
  const isGood = file !== null && issues.length === 0;
  const count = file?.items.length ?? 0;
  return (
    <Dialog
      title={isGood ? `Import ${count} ${count === 1 ? 'part' : 'parts'}` : 'This file cannot be imported'}
      about={name}
      open
      onOpenChange={(open) => !open && onClose()}
    >
      {isGood ? (
        <ImportForm file={file} workspaceId={workspaceId} onDone={onClose} />
      ) : (
        <>
          <p>Nothing was imported. Mend these in the file and choose it again.</p>
          <ImportIssues issues={issues} />
        </>
      )}
    </Dialog>
  );
}
