import { useEffect, useMemo, useRef, useState, type ReactNode, type RefObject } from 'react';
import { DeskContext } from '../hooks/use-desk.ts';
import type { LoadedDesk } from '../hooks/load-desk.ts';
import { RunContext } from '../hooks/run-context.ts';
import { useDeskRuns } from '../hooks/use-desk-runs.ts';
import { useDeskShortcuts } from '../hooks/use-desk-shortcuts.ts';
import { useStudyFiles, type StudyFiles } from '../hooks/use-study-files.ts';
import { InputsPanel } from './inputs-panel.tsx';
import { OpenReportDialog } from './open-report-dialog.tsx';
import { ResultsPanel, type Drawings } from './results-panel.tsx';
import { ShortcutsDialog } from './shortcuts-dialog.tsx';

/** What the head of a desk can do, and the drawings it can export. */
export type HeadTools = Drawings & { files: StudyFiles; pickFile: () => void; showKeys: () => void };

type Props = LoadedDesk & {
  /** Title block and actions: a guest's, or those of a study of a workspace. */
  head: (tools: HeadTools) => ReactNode;
  /** What Ctrl S does, where it is not saving a file. */
  onSave?: { does: string; act: () => void };
  /** Stands in the place of the results while it is there. */
  instead?: ReactNode;
};

/** One desk with its study, its results and its files. */
export function SessionDesk({ store, ...props }: Props) {
  const runs = useDeskRuns(store);
  return (
    <DeskContext value={store}>
      <RunContext value={runs}>
        <Desk store={store} {...props} />
      </RunContext>
    </DeskContext>
  );
}

/** Reads nothing of the study or its results itself: each part below is drawn again when what it shows changes. */
function Desk({ store, report, head, onSave, instead }: Props) {
  const files = useStudyFiles(store, report);
  const picker = useRef<HTMLInputElement>(null);
  const stripsRef = useRef<HTMLDivElement>(null);
  const ledgerRef = useRef<HTMLDivElement>(null);
  const [showsKeys, setShowsKeys] = useState(false);
  const save = onSave?.act ?? files.save;
  const commands = useMemo(
    () => ({ save, open: () => picker.current?.click(), showShortcuts: () => setShowsKeys(true) }),
    [save, setShowsKeys],
  );
  useDeskShortcuts(store, commands);
  useLinksInTheAddress(files.openLink);
  return (
    <>
      {head({ files, pickFile: commands.open, showKeys: commands.showShortcuts, stripsRef, ledgerRef })}
      <DeskSides stripsRef={stripsRef} ledgerRef={ledgerRef} instead={instead} />
      <ShortcutsDialog open={showsKeys} onOpenChange={setShowsKeys} saves={onSave?.does} />
      <OpenReportDialog report={files.report} onClose={files.forgetReport} />
      <FilePicker ref={picker} onFile={(file) => void files.openFile(file)} />
    </>
  );
}

type FilePickerProps = { ref: RefObject<HTMLInputElement | null>; onFile: (file: File) => void };

function FilePicker({ ref, onFile }: FilePickerProps) {
  return (
    <input
      ref={ref}
      type="file"
      hidden
      accept=".json,application/json"
      aria-label="Study file"
      onChange={(event) => {
        const file = event.target.files?.[0];
        if (file) onFile(file);
        // The same file can be chosen again.
        event.target.value = '';
      }}
    />
  );
}

const SIDES = [
  { side: 'results', label: 'Results' },
  { side: 'inputs', label: 'Inputs' },
] as const;

/** Inputs and results, beside each other or, on a telephone, one at a time. */
function DeskSides({ stripsRef, ledgerRef, instead }: Drawings & { instead?: ReactNode }) {
  const [side, setSide] = useState<'results' | 'inputs'>('results');
  return (
    <>
      <div className="phone-switch pick" role="group" aria-label="Part of the desk">
        {SIDES.map((one) => (
          <button key={one.side} type="button" aria-pressed={side === one.side} onClick={() => setSide(one.side)}>
            {one.side === 'results' && instead ? 'History' : one.label}
          </button>
        ))}
      </div>
      <div className={`desk show-${side}${instead ? ' instead' : ''}`}>
        <InputsPanel />
        <ResultsPanel stripsRef={stripsRef} ledgerRef={ledgerRef} />
        {instead}
      </div>
    </>
  );
}

/** A link pasted into the address of an open desk is opened too. */
function useLinksInTheAddress(openLink: () => Promise<void>): void {
  // Speaks to the page's address.
  useEffect(() => {
    const open = () => void openLink();
    window.addEventListener('hashchange', open);
    return () => window.removeEventListener('hashchange', open);
  }, [openLink]);
}
