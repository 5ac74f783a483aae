import { useCallback, useState } from 'react';
import type { Study } from '../../../../../server/src/contract/study.ts';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useCreateStudy } from '../api/create-study.ts';
import { newEntry, readyEntries, type ImportEntry } from '../model/import-list.ts';
import { judgeFile } from '../model/judge-file.ts';

export type Import = {
  entries: readonly ImportEntry[];
  isBusy: boolean;
  add: (files: readonly File[]) => void;
  leaveOut: (key: string) => void;
  /** Makes the studies one after another. @returns those that were made; the others say why in their entry */
  run: () => Promise<Study[]>;
};

/** Files on their way into the workspace. */
export function useImport(): Import {
  const { workspaceId } = useWorkspace();
  const { mutateAsync: create } = useCreateStudy(workspaceId);
  const [entries, setEntries] = useState<readonly ImportEntry[]>([]);
  const [isBusy, setBusy] = useState(false);
  const set = useCallback(
    (key: string, part: Partial<ImportEntry>) =>
      setEntries((now) => now.map((entry) => (entry.key === key ? { ...entry, ...part } : entry))),
    [],
  );
  const add = useCallback(
    (files: readonly File[]) => {
      for (const file of files) {
        const entry = newEntry(file.name, crypto.randomUUID());
        setEntries((now) => [...now, entry]);
        void judgeFile(file).then((judged) => set(entry.key, { judged }));
      }
    },
    [set],
  );
  const leaveOut = (key: string) => setEntries((now) => now.filter((entry) => entry.key !== key));
  const run = async () => {
    setBusy(true);
    const made: Study[] = [];
    for (const { key, name, judged } of readyEntries(entries)) {
      set(key, { problem: null });
      try {
        const study = await create({ key, inputs: judged.inputs, message: `Imported from ${name}`.slice(0, 300) });
        made.push(study);
        set(key, { madeId: study.id });
      } catch (error) {
        set(key, { problem: problemSentence(error) });
      }
    }
    setBusy(false);
    return made;
  };
  return { entries, isBusy, add, leaveOut, run };
}
