import type { QuantityPath } from '@voltiplano/engine';
import type { Cell, Grid } from '../components/fields/grid.ts';
import { measureOf, type Measure } from '../components/fields/measure.ts';

export type Column = {
  label: string;
  measure: Measure;
  /** The last row of this column must be empty: it holds to the end. */
  lastOpen?: true;
};

/** How one table of the study stands in the file and on screen. */
export type TableSpec = {
  /** Path of the value the table stands for. */
  path: string;
  title: string;
  columns: Column[];
  /** What one row is called: "Add a ledge". */
  row: string;
  minRows: number;
  maxRows?: number;
  toGrid(value: unknown): Grid;
  /** The file's value of a grid without unreadable cells; undefined where no row is left and the table may be absent. */
  toValue(grid: Grid): unknown;
  /** Path of a cell in the file. */
  cellPath(row: number, column: number): string;
};

const plain = (unit: string, decimals: number, step: number): Measure => ({ unit, scale: 'plain', decimals, step });
const quantityColumn = (label: string, path: QuantityPath): Column => ({ label, measure: measureOf(path) });
const zColumn: Column = { label: 'z', measure: plain('', 2, 0.01) };

/** A table kept as an array of rows, each an object. */
function rowsTable(
  spec: Pick<TableSpec, 'path' | 'title' | 'columns' | 'row' | 'minRows' | 'maxRows'>,
  keys: string[],
): TableSpec {
  return {
    ...spec,
    toGrid: (value) =>
      (Array.isArray(value) ? (value as Record<string, unknown>[]) : []).map((row) =>
        keys.map((key) => toCell(row[key])),
      ),
    toValue: (grid) =>
      grid.length === 0 && spec.minRows === 0
        ? undefined
        : grid.map((row) =>
            Object.fromEntries(
              keys.flatMap((key, i) => (row[i] === null || row[i] === undefined ? [] : [[key, row[i]]])),
            ),
          ),
    cellPath: (row, column) => `${spec.path}[${row}].${keys[column]}`,
  };
}

/** A table kept as one array per column. */
function columnsTable(spec: Pick<TableSpec, 'path' | 'title' | 'columns' | 'row'>, keys: [string, string]): TableSpec {
  return {
    ...spec,
    minRows: 2,
    toGrid: (value) => {
      const [first, second] = keys.map((key) =>
        ((value as Record<string, unknown[]> | undefined)?.[key] ?? []).map(toCell),
      );
      return (first ?? []).map((cell, row) => [cell, second?.[row] ?? null]);
    },
    toValue: (grid) => Object.fromEntries(keys.map((key, column) => [key, grid.map((row) => row[column])])),
    cellPath: (row, column) => `${spec.path}.${keys[column]}[${row}]`,
  };
}

function toCell(value: unknown): Cell {
  return typeof value === 'number' || typeof value === 'string' ? value : null;
}

/** The map's grid has the temperatures in its first row and the socs in its first column; the corner is empty. */
const mapTable: TableSpec = {
  path: 'strategy.taper',
  title: 'Taper map',
  columns: [{ label: 'Soc', measure: measureOf('strategy.taper.soc') }],
  row: 'soc row',
  minRows: 3,
  toGrid: (value) => {
    const {
      soc = [],
      tempC = [],
      values = [],
    } = (value ?? {}) as { soc?: number[]; tempC?: number[]; values?: number[][] };
    return [[null, ...tempC], ...soc.map((at, i) => [at, ...tempC.map((_, j) => toCell(values[i]?.[j]))])];
  },
  toValue: (grid) => ({
    soc: grid.slice(1).map((row) => row[0]),
    tempC: grid[0]!.slice(1),
    values: grid.slice(1).map((row) => row.slice(1)),
  }),
  cellPath: (row, column) => {
    if (row === 0) return `strategy.taper.tempC[${column - 1}]`;
    return column === 0 ? `strategy.taper.soc[${row - 1}]` : `strategy.taper.values[${row - 1}][${column - 1}]`;
  },
};

/** What a taper's numbers mean, by the unit it is kept in. */
export const taperValueMeasure: Record<'A' | 'C' | 'kW', Measure> = {
  A: plain('A', 0, 5),
  C: plain('C', 2, 0.05),
  kW: plain('kW', 0, 2),
};

/** What a taper's value column is called, by its unit. */
const VALUE_LABEL = { A: 'Current', C: 'C-rate', kW: 'Power' } as const;

type TaperHead = { shape?: string; unit?: 'A' | 'C' | 'kW' };

/** The table of a taper, by its shape; undefined for a taper without one. */
export function taperTable({ shape, unit = 'A' }: TaperHead): TableSpec | undefined {
  const value: Column = { label: VALUE_LABEL[unit], measure: taperValueMeasure[unit] };
  if (shape === 'slope')
    return rowsTable(
      {
        path: 'strategy.taper.points',
        title: 'Taper points',
        columns: [quantityColumn('At soc', 'strategy.taper.soc'), value],
        row: 'point',
        minRows: 1,
      },
      ['soc', 'value'],
    );
  if (shape === 'ledges')
    return rowsTable(
      {
        path: 'strategy.taper.steps',
        title: 'Taper ledges',
        columns: [quantityColumn('From soc', 'strategy.taper.soc'), value],
        row: 'ledge',
        minRows: 1,
      },
      ['fromSoc', 'value'],
    );
  if (shape === 'voltage-ledges') {
    const until: Column = { ...quantityColumn('Until, cell', 'strategy.taper.steps[].untilCellV'), lastOpen: true };
    return rowsTable(
      {
        path: 'strategy.taper.steps',
        title: 'Taper voltage ledges',
        columns: [until, value],
        row: 'ledge',
        minRows: 1,
      },
      ['untilCellV', 'value'],
    );
  }
  if (shape !== 'map') return undefined;
  return { ...mapTable, columns: [mapTable.columns[0]!, { ...value, label: `${value.label} by coldest surface` }] };
}

const overZ = (path: string, title: string, y: Column): TableSpec =>
  columnsTable({ path, title, columns: [zColumn, y], row: 'row' }, ['x', 'y']);

const FIXED: TableSpec[] = [
  rowsTable(
    {
      path: 'station.powerSteps',
      title: 'Power sharing',
      columns: [
        quantityColumn('From minute', 'station.powerSteps[].atMin'),
        quantityColumn('Power', 'station.powerSteps[].powerKw'),
      ],
      row: 'step',
      minRows: 0,
    },
    ['atMin', 'powerKw'],
  ),
  rowsTable(
    {
      path: 'cell.rcPairs',
      title: 'RC pairs',
      columns: [
        quantityColumn('Resistance', 'cell.rcPairs[].rMilliohm'),
        quantityColumn('Time constant', 'cell.rcPairs[].tauS'),
      ],
      row: 'pair',
      minRows: 0,
      maxRows: 3,
    },
    ['rMilliohm', 'tauS'],
  ),
  overZ('cell.ocv', 'Rest voltage', { label: 'Rest voltage', measure: plain('V', 3, 0.005) }),
  overZ('cell.anode.potential', 'Anode potential', { label: 'vs Li', measure: plain('V', 3, 0.005) }),
  overZ('cell.entropicMvPerK', 'Entropic coefficient', { label: 'dU/dT', measure: plain('mV/K', 3, 0.01) }),
  overZ('cell.resistanceShape', 'Resistance over z', { label: 'Factor', measure: plain('×', 2, 0.05) }),
  columnsTable(
    {
      path: 'vehicle.cabinWPerAmbient',
      title: 'Cabin over ambient',
      columns: [
        quantityColumn('Ambient', 'vehicle.cabinWPerAmbient.tempC[]'),
        quantityColumn('Cabin', 'vehicle.cabinWPerAmbient.watts[]'),
      ],
      row: 'row',
    },
    ['tempC', 'watts'],
  ),
  columnsTable(
    {
      path: 'strategy.coldLimit',
      title: 'Cold limit',
      columns: [
        quantityColumn('Coldest surface', 'strategy.coldLimit.tempC[]'),
        quantityColumn('Allowed', 'strategy.coldLimit.cRate[]'),
      ],
      row: 'row',
    },
    ['tempC', 'cRate'],
  ),
];

/** The table that stands at a path of a study. */
export function tableAt(path: string, taper: TaperHead): TableSpec | undefined {
  const own = taperTable(taper);
  return own?.path === path ? own : FIXED.find((spec) => spec.path === path);
}

/** The measure of a cell: in a map by row and column, elsewhere by column. */
export function cellMeasure(spec: TableSpec, row: number, column: number): Measure {
  const isMap = spec.path === 'strategy.taper';
  if (isMap && row === 0) return measureOf('strategy.taper.tempC[]');
  return spec.columns[Math.min(column, spec.columns.length - 1)]!.measure;
}

/** The row and column a path of the file stands for in a table, if it does. */
export function cellOfPath(spec: TableSpec, grid: Grid, path: string): { row: number; column: number } | undefined {
  for (let row = 0; row < grid.length; row++)
    for (let column = 0; column < grid[row]!.length; column++)
      if (path === spec.cellPath(row, column)) return { row, column };
  // A row as a whole, such as `steps[2]`, is named at its first cell.
  const row = grid.findIndex((_, i) => spec.cellPath(i, 0).startsWith(`${path}.`) && path !== spec.path);
  return row < 0 || !path.endsWith(']') ? undefined : { row, column: 0 };
}
