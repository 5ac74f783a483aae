import type { Grid } from '../components/fields/grid.ts';
import { measureOf, shownUnit, storedText, toShown, numberText, type Measure } from '../components/fields/measure.ts';
import { alignedRows } from './align-rows.ts';
import { taperTable, taperValueMeasure, type TableSpec } from './table-specs.ts';
import type { TemperatureUnit } from './units.ts';

export type CellDifference = { before: string | null; after: string | null; differs: boolean };

/** One row before and after; `before` or `after` is its place counted from 1, null where the row is not there. */
export type RowDifference = { before: number | null; after: number | null; cells: CellDifference[] };

/** `empty` is what a cell without a value says; it takes no unit. */
type ColumnHead = { label: string; unit: string; empty?: string };

export type TableDifference = {
  kind: 'table';
  /** Path of the table in the file. */
  path: string;
  /** The part it lies in: "Strategy". */
  section: string;
  label: string;
  columns: ColumnHead[];
  /** Only rows that differ. */
  rows: RowDifference[];
};

export type DiffColumn = ColumnHead & { text: (cell: unknown) => string | null };

type Sides = { before: readonly unknown[][]; after: readonly unknown[][] };

/** Two tables row by row; null where they say the same. */
export function gridDifference(
  head: Pick<TableDifference, 'path' | 'section' | 'label'>,
  columns: readonly DiffColumn[],
  { before, after }: Sides,
): TableDifference | null {
  const rows = alignedRows(before, after).map((pair): RowDifference => {
    const old = pair.before === null ? null : before[pair.before]!;
    const next = pair.after === null ? null : after[pair.after]!;
    const cells = columns.map(({ text, empty = null }, j): CellDifference => {
      const was = old && (text(old[j]) ?? empty);
      const is = next && (text(next[j]) ?? empty);
      return { before: was, after: is, differs: JSON.stringify(old?.[j]) !== JSON.stringify(next?.[j]) };
    });
    const place = (at: number | null) => (at === null ? null : at + 1);
    return { before: place(pair.before), after: place(pair.after), cells };
  });
  const differing = rows.filter(
    ({ before: was, after: is, cells }) => was === null || is === null || cells.some(({ differs }) => differs),
  );
  const heads = columns.map(({ text: _text, ...column }) => column);
  return differing.length === 0 ? null : { kind: 'table', ...head, columns: heads, rows: differing };
}

/** Two values of one table of a study, as `table-specs` describes it. */
export function tableDifference(
  spec: TableSpec,
  section: string,
  [before, after]: readonly [unknown, unknown],
  temperature: TemperatureUnit,
): TableDifference | null {
  const columns = spec.columns.map(({ label, measure, lastOpen }) => ({
    ...columnOf(label, measure, temperature),
    ...(lastOpen ? { empty: 'to the end' } : {}),
  }));
  const head = { path: spec.path, section, label: spec.title };
  return gridDifference(head, columns, { before: spec.toGrid(before), after: spec.toGrid(after) });
}

/** A column of numbers in the units on screen. */
export function columnOf(label: string, measure: Measure, temperature: TemperatureUnit): DiffColumn {
  return {
    label,
    unit: shownUnit(measure, temperature),
    text: (cell) => numberCell(cell, measure, temperature),
  };
}

function numberCell(cell: unknown, measure: Measure, temperature: TemperatureUnit): string | null {
  return typeof cell === 'number' ? storedText(cell, measure, temperature) : null;
}

type Taper = { shape: string; unit?: 'A' | 'C' | 'kW'; soc?: number[]; tempC?: number[]; values?: number[][] };

/** Two tapers, whose tables are compared where both hold the same kind of numbers, and else stand one after the other. */
export function taperTableDifferences(
  before: Taper | undefined,
  after: Taper | undefined,
  temperature: TemperatureUnit,
): TableDifference[] {
  const isSameKind = !before || !after || (before.shape === after.shape && before.unit === after.unit);
  const pairs = isSameKind ? [[before, after] as const] : [[before, undefined] as const, [undefined, after] as const];
  return pairs.flatMap(([was, is]) => oneTaperTable(was, is, temperature) ?? []);
}

function oneTaperTable(before: Taper | undefined, after: Taper | undefined, temperature: TemperatureUnit) {
  const taper = after ?? before;
  if (taper?.shape === 'map') return mapDifference(before, after, temperature);
  const spec = taper && taperTable(taper);
  if (!spec) return null;
  const rowsOf = (one: Taper | undefined) => one && one[spec.path.split('.').pop() as keyof Taper];
  return tableDifference(spec, 'Strategy', [rowsOf(before), rowsOf(after)], temperature);
}

/** A map as a table with a column for each temperature that either side has. */
function mapDifference(before: Taper | undefined, after: Taper | undefined, temperature: TemperatureUnit) {
  const temps = [...new Set([...(before?.tempC ?? []), ...(after?.tempC ?? [])])].sort((a, b) => a - b);
  const value = taperValueMeasure[(after ?? before)?.unit ?? 'A'];
  const degrees = measureOf('strategy.taper.tempC[]');
  const headOf = (tempC: number) =>
    `${numberText(toShown(tempC, degrees, temperature), 0)} ${shownUnit(degrees, temperature)}`;
  const columns = [
    columnOf('Soc', measureOf('strategy.taper.soc'), temperature),
    ...temps.map((tempC) => columnOf(headOf(tempC), value, temperature)),
  ];
  const rowsOf = (map: Taper | undefined): Grid =>
    (map?.soc ?? []).map((soc, i) => [soc, ...temps.map((tempC) => cellAt(map, i, tempC))]);
  const head = { path: 'strategy.taper', section: 'Strategy', label: 'Taper map' };
  return gridDifference(head, columns, { before: rowsOf(before), after: rowsOf(after) });
}

function cellAt(map: Taper | undefined, row: number, tempC: number): number | null {
  const column = map?.tempC?.indexOf(tempC) ?? -1;
  return column < 0 ? null : (map?.values?.[row]?.[column] ?? null);
}
