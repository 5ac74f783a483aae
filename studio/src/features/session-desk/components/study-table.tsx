import type { ReactNode } from 'react';
import { MapEditor } from '../../../components/fields/map-editor.tsx';
import { measureOf } from '../../../components/fields/measure.ts';
import { TableEditor, type CellIssue } from '../../../components/fields/table-editor.tsx';
import type { Grid } from '../../../components/fields/grid.ts';
import { useUnits } from '../../../lib/units.ts';
import { useStudyTable } from '../hooks/use-study-table.ts';

type Props = {
  path: string;
  did?: { label: string; cells: readonly { text: string; idle: boolean }[] };
  actions?: ReactNode;
  /** A small drawing of the table, under it. */
  chart?: (grid: Grid) => ReactNode;
};

/** The editor of one table of the study. */
export function StudyTable({ path, did, actions, chart }: Props) {
  const { temperatureUnit } = useUnits();
  const table = useStudyTable(path, temperatureUnit);
  if (!table) return null;
  const { spec, grid, issues, ...common } = table;
  const shared: { issues: CellIssue[]; temperature: typeof temperatureUnit } = { issues, temperature: temperatureUnit };
  return (
    <>
      {path === 'strategy.taper' ? (
        <MapEditor
          {...common}
          {...shared}
          title={spec.title}
          grid={grid}
          rowHead={{ label: 'Soc', measure: measureOf('strategy.taper.soc') }}
          columnHead={{ label: 'Coldest surface', measure: measureOf('strategy.taper.tempC[]') }}
          value={{ label: spec.columns[1]!.label, measure: spec.columns[1]!.measure }}
        />
      ) : (
        <TableEditor
          {...common}
          {...shared}
          title={spec.title}
          columns={spec.columns}
          grid={grid}
          rowWord={spec.row}
          minRows={spec.minRows}
          maxRows={spec.maxRows}
          did={did}
          actions={actions}
        />
      )}
      {table.general.map((sentence) => (
        <p className="note err" key={sentence}>
          {sentence}
        </p>
      ))}
      {chart?.(grid)}
    </>
  );
}
