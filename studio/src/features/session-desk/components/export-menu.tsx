import { useState } from 'react';
import { exportDrawing, type ExportFormat } from '../../../charts/chart-export.ts';
import { Button } from '../../../components/button.tsx';
import { Menu, MenuItem, MenuRule } from '../../../components/menu.tsx';
import { useRun, useRuns } from '../hooks/run-context.ts';
import { downloadText } from '../hooks/use-study-files.ts';
import { resultFile, seriesFile } from '../model/export-files.ts';
import type { Drawings } from './results-panel.tsx';

const FORMATS: ExportFormat[] = ['svg', 'png'];
const PARTS = ['strips', 'ledger'] as const;
type DrawingPart = (typeof PARTS)[number];

/** The results as tables and drawings. */
export function ExportMenu({ stripsRef, ledgerRef }: Drawings) {
  const runs = useRuns();
  const hasAnswer = useRun((run) => run.answer !== null);
  const [failed, setFailed] = useState(false);
  if (!hasAnswer) return <Button unavailable="No result yet">Export</Button>;
  const download = (fileOf: typeof seriesFile) => {
    const { answer, study } = runs.get();
    if (answer && study) downloadText(fileOf(answer.result, study));
  };
  const draw = async (part: DrawingPart, format: ExportFormat) => {
    const element = (part === 'strips' ? stripsRef : ledgerRef).current;
    if (!element) return;
    setFailed(false);
    const title = runs.get().study?.title ?? 'Session';
    await exportDrawing(element, { title, part, format }).catch(() => setFailed(true));
  };
  return (
    <span className="study-menu">
      <Menu trigger={<Button>Export</Button>} align="end">
        <MenuItem onSelect={() => download(seriesFile)}>Series as CSV</MenuItem>
        <MenuItem onSelect={() => download(resultFile)}>Result as JSON</MenuItem>
        {PARTS.map((part) => (
          <DrawingItems key={part} part={part} onDraw={(format) => void draw(part, format)} />
        ))}
      </Menu>
      {failed && (
        <span role="alert" className="said">
          The drawing could not be made: a font did not load. Try again.
        </span>
      )}
    </span>
  );
}

function DrawingItems({ part, onDraw }: { part: string; onDraw: (format: ExportFormat) => void }) {
  return (
    <>
      <MenuRule />
      {FORMATS.map((format) => (
        <MenuItem key={format} onSelect={() => onDraw(format)}>
          {`${part.charAt(0).toUpperCase()}${part.slice(1)} as ${format.toUpperCase()}`}
        </MenuItem>
      ))}
    </>
  );
}
