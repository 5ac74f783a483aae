import { MiniChart } from '../../../charts/mini-chart.tsx';
import type { Grid } from '../../../components/fields/grid.ts';
import { toShown } from '../../../components/fields/measure.ts';
import { useUnits } from '../../../lib/units.ts';
import { useDesk } from '../hooks/use-desk.ts';
import { tableCurve, type Reading } from '../model/table-curve.ts';
import { tableAt } from '../../../lib/table-specs.ts';

type Props = { path: string; grid: Grid };

/** A small drawing of a table, in shown units, read between its rows as the engine reads it. */
export function TableChart({ path, grid }: Props) {
  const { temperatureUnit } = useUnits();
  const taper = useDesk(({ sheet }) => sheet.draft.study.strategy.taper);
  const maxMin = useDesk(({ sheet }) => sheet.draft.study.session.maxMin);
  const spec = tableAt(path, taper);
  if (!spec || spec.columns.length !== 2 || path === 'strategy.taper') return null;
  const shown = grid.map((row) =>
    row.map((cell, j) => (typeof cell === 'number' ? toShown(cell, spec.columns[j]!.measure, temperatureUnit) : cell)),
  );
  const end = path === 'station.powerSteps' ? (maxMin ?? 60) : 100;
  const curve = tableCurve(shown, readingOf(path, taper.shape), end);
  const [x, y] = spec.columns;
  return (
    <div className="table-chart">
      <MiniChart {...curve} label={`${y!.label} over ${x!.label.toLowerCase()}`} digits={y!.measure.decimals} />
    </div>
  );
}

function readingOf(path: string, taperShape: string): Reading {
  if (path.startsWith('cell.')) return 'cubic';
  if (path === 'station.powerSteps') return 'from';
  if (path !== 'strategy.taper.steps') return 'line';
  return taperShape === 'voltage-ledges' ? 'until' : 'from';
}
