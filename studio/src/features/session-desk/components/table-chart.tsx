import { MiniChart } from '../../../charts/mini-chart.tsx';
import type { Grid } from '../../../components/fields/grid.ts';
import { toShown } from '../../../components/fields/measure.ts';
import { useUnits } from '../../../lib/units.ts';
import { useDesk } from '../hooks/use-desk.ts';
import { tableCurve } from '../model/table-curve.ts';
import { tableAt } from '../model/table-specs.ts';

type Props = { path: string; grid: Grid };

/** A small drawing of a table, in shown units. */
export function TableChart({ path, grid }: Props) {
  const { temperatureUnit } = useUnits();
  const taper = useDesk(({ sheet }) => sheet.draft.study.strategy.taper);
  const spec = tableAt(path, taper);
  if (!spec || taper.shape === 'voltage-ledges' || path === 'strategy.taper') return null;
  const shown = grid.map((row) =>
    row.map((cell, j) => (typeof cell === 'number' ? toShown(cell, spec.columns[j]!.measure, temperatureUnit) : cell)),
  );
  const steps = path === 'strategy.taper.steps' || path === 'station.powerSteps';
  const curve = tableCurve(shown, steps ? 'steps' : 'line', steps ? 100 : undefined);
  const [x, y] = spec.columns;
  return (
    <div className="table-chart">
      <MiniChart {...curve} label={`${y!.label} over ${x!.label.toLowerCase()}`} digits={y!.measure.decimals} />
    </div>
  );
}
