import { useEffect, useMemo, useRef, useState } from 'react';
import { DeskContext } from '../hooks/use-desk.ts';
import type { LoadedDesk } from '../hooks/load-desk.ts';
import { RunContext } from '../hooks/run-context.ts';
import { useDeskRuns } from '../hooks/use-desk-runs.ts';
import { useDeskShortcuts } from '../hooks/use-desk-shortcuts.ts';
import { useStudyFiles } from '../hooks/use-study-files.ts';
import { DeskActions } from './desk-actions.tsx';
import { DeskTitleBlock } from './desk-title-block.tsx';
import { InputsPanel } from './inputs-panel.tsx';
import { OpenReportDialog } from './open-report-dialog.tsx';
import { ResultsPanel, type Drawings } from './results-panel.tsx';
import { ShortcutsDialog } from './shortcuts-dialog.tsx';

/** One desk with its study, its results and its files. */
export function SessionDesk({ store, report }: LoadedDesk) {
  const runs = useDeskRuns(store);
  return (
    <DeskContext value={store}>
      <RunContext value={runs}>
        <Desk store={store} report={report} />
      </RunContext>
    </DeskContext>
  );
}

/** Reads nothing of the study or its results itself: each part below is drawn again when what it shows changes. */
function Desk({ store, report }: LoadedDesk) {
  const files = useStudyFiles(store, report);
  const picker = useRef<HTMLInputElement>(null);
  const stripsRef = useRef<HTMLDivElement>(null);
  const ledgerRef = useRef<HTMLDivElement>(null);
  const [showsKeys, setShowsKeys] = useState(false);
  const { save } = files;
  const commands = useMemo(
    () => ({ save, open: () => picker.current?.click(), showShortcuts: () => setShowsKeys(true) }),
    [save],
  );
  useDeskShortcuts(store, commands);
  useLinksInTheAddress(files.openLink);
  return (
    <>
      <DeskTitleBlock
        actions={
          <DeskActions
            files={files}
            picker={picker}
            stripsRef={stripsRef}
            ledgerRef={ledgerRef}
            onShowKeys={() => setShowsKeys(true)}
          />
        }
      />
      <DeskSides stripsRef={stripsRef} ledgerRef={ledgerRef} />
      <ShortcutsDialog open={showsKeys} onOpenChange={setShowsKeys} />
      <OpenReportDialog report={files.report} onClose={files.forgetReport} />
    </>
  );
}

const SIDES = [
  { side: 'results', label: 'Results' },
  { side: 'inputs', label: 'Inputs' },
] as const;

/** Inputs and results, beside each other or, on a telephone, one at a time. */
function DeskSides({ stripsRef, ledgerRef }: Drawings) {
  const [side, setSide] = useState<'results' | 'inputs'>('results');
  return (
    <>
      <div className="phone-switch pick" role="group" aria-label="Part of the desk">
        {SIDES.map((one) => (
          <button key={one.side} type="button" aria-pressed={side === one.side} onClick={() => setSide(one.side)}>
            {one.label}
          </button>
        ))}
      </div>
      <div className={`desk show-${side}`}>
        <InputsPanel />
        <ResultsPanel stripsRef={stripsRef} ledgerRef={ledgerRef} />
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
