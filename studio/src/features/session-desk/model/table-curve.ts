import type { Grid } from '../../../components/fields/grid.ts';

/** How a table is read between its rows. */
export type Reading = 'line' | 'steps';

export type Curve = { x: number[]; y: number[]; points: [number, number][] };

/**
 * The curve of a table's first two columns, from its readable rows.
 *
 * @param reading  straight between rows, or each value held up to the next row
 * @param end      where a last step stops, on the first column
 */
export function tableCurve(grid: Grid, reading: Reading, end?: number): Curve {
  const points = grid.flatMap((row): [number, number][] =>
    typeof row[0] === 'number' && typeof row[1] === 'number' ? [[row[0], row[1]]] : [],
  );
  if (reading === 'line') return { x: points.map(([x]) => x), y: points.map(([, y]) => y), points };
  const corners = points.flatMap(([x, y], i): [number, number][] => {
    const next = points[i + 1]?.[0] ?? Math.max(end ?? x, x);
    return [
      [x, y],
      [next, y],
    ];
  });
  return { x: corners.map(([x]) => x), y: corners.map(([, y]) => y), points };
}
