import type { ReactNode } from 'react';
import { MapEditor } from '../../../components/fields/map-editor.tsx';
import { measureOf } from '../../../components/fields/measure.ts';
import { TableEditor } from '../../../components/fields/table-editor.tsx';
import type { Grid } from '../../../components/fields/grid.ts';
import { useUnits } from '../../../lib/units.ts';
import { useStudyTable } from '../hooks/use-study-table.ts';

type Props = {
  path: string;
  did?: { label: string; cells: readonly { text: string; idle: boolean }[] };
  /** A small drawing of the table, under it. */
  chart?: (grid: Grid) => ReactNode;
};

/** The editor of one table of the study. */
export function StudyTable({ path, did, chart }: Props) {
  const { temperatureUnit } = useUnits();
  const table = useStudyTable(path, temperatureUnit);
  if (!table) return null;
  const { spec, general, ...common } = table;
  return (
    <>
      {path === 'strategy.taper' ? (
        <MapEditor
          {...common}
          title={spec.title}
          temperature={temperatureUnit}
          kinds={{
            rowHead: { label: 'Soc', measure: measureOf('strategy.taper.soc') },
            columnHead: { label: 'Coldest surface', measure: measureOf('strategy.taper.tempC[]') },
            value: spec.columns[1]!,
          }}
        />
      ) : (
        <TableEditor
          {...common}
          title={spec.title}
          temperature={temperatureUnit}
          columns={spec.columns}
          rowWord={spec.row}
          minRows={spec.minRows}
          maxRows={spec.maxRows}
          did={did}
        />
      )}
      {general.map((sentence) => (
        <p className="note err" key={sentence}>
          {sentence}
        </p>
      ))}
      {chart?.(common.grid)}
    </>
  );
}
