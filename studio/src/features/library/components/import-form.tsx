import { useState } from 'react';
import type { LibraryFile } from '../../../../../server/src/contract/library.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { Button } from '../../../components/button.tsx';
import { Notice } from '../../../components/notice.tsx';
import { toast } from '../../../components/toasts.tsx';
import { WordSwitch } from '../../../components/word-switch.tsx';
import { ApiProblem, problemSentence } from '../../../lib/api/api-problem.ts';
import { useImportLibrary } from '../api/import-library.ts';
import { useWholeLibrary } from '../api/read-whole-library.ts';
import { importPlan, refusedIssues, type FileIssue, type SameName } from '../model/library-file.ts';
import { ImportIssues, ImportPlan } from './import-tables.tsx';

const CHOICES: { value: SameName; label: string }[] = [
  { value: 'revise', label: 'save a revision of it' },
  { value: 'add', label: 'add another' },
  { value: 'skip', label: 'leave it' },
];

type Props = { file: LibraryFile; workspaceId: string; onDone: () => void };

/** What will become of a file's parts, and the button that takes them in. */
export function ImportForm({ file, workspaceId, onDone }: Props) {
  const [sameName, setSameName] = useState<SameName>('revise');
  const [refused, setRefused] = useState<{ sentence: string; issues: FileIssue[] } | null>(null);
  const [idempotencyKey] = useState(() => crypto.randomUUID());
  const present = useWholeLibrary(workspaceId);
  const take = useImportLibrary(workspaceId);
  const send = async () => {
    setRefused(null);
    try {
      const key = `${idempotencyKey}-${sameName}`;
      const { added, revised, left } = await take.mutateAsync({ body: { file, sameName }, idempotencyKey: key });
      toast(`Imported: ${added.length} added, ${revised.length} revised, ${left} left as they are.`);
      onDone();
    } catch (error) {
      const errors = error instanceof ApiProblem ? error.errors : [];
      setRefused({ sentence: problemSentence(error), issues: refusedIssues(file, errors) });
    }
  };
  return (
    <>
      <p className="text-label text-ink2">Where a part of the same kind and name is there</p>
      <WordSwitch label="Where a part is there" value={sameName} options={CHOICES} onChange={setSameName} />
      <AsyncView query={present} loading="Looking at what is there">
        {(items) => <ImportPlan plan={importPlan(file, items, sameName)} />}
      </AsyncView>
      {refused && (
        <div className="mt-[12px]">
          <Notice kind="stop">{refused.sentence}</Notice>
          {refused.issues.length > 0 && <ImportIssues issues={refused.issues} />}
        </div>
      )}
      <div className="dialog-actions">
        <Button go busy={take.isPending ? 'Importing' : undefined} onClick={() => void send()}>
          Import
        </Button>
      </div>
    </>
  );
}
