import type { SessionStudyInput } from '@voltiplano/engine';

type TaperInput = SessionStudyInput['strategy']['taper'];
export type TaperShape = TaperInput['shape'];
export type TaperUnit = 'A' | 'C' | 'kW';

export const taperShapes: { shape: TaperShape; label: string }[] = [
  { shape: 'none', label: 'None: constant current, constant voltage' },
  { shape: 'slope', label: 'Slope: straight lines between points' },
  { shape: 'ledges', label: 'Ledges by soc' },
  { shape: 'voltage-ledges', label: 'Ledges by cell voltage' },
  { shape: 'map', label: 'Map over soc and temperature' },
];

type Row = { soc: number; value: number };

/**
 * A taper of another shape that starts from the numbers of the one before.
 *
 * @param ceilingV  the strategy's voltage ceiling; voltage ledges are spread over the 0.4 V below it, a place to begin from
 * @param currentA  what a taper made from nothing allows: the pack's own charge current
 */
export function taperInShape(taper: TaperInput, shape: TaperShape, ceilingV: number, currentA: number): TaperInput {
  if (shape === taper.shape) return taper;
  const unit: TaperUnit = taper.shape === 'none' ? 'A' : taper.unit;
  const rows = rowsOf(taper, currentA);
  switch (shape) {
    case 'none':
      return { shape };
    case 'slope':
      return { shape, unit, points: rows };
    case 'ledges':
      return { shape, unit, steps: rows.map(({ soc, value }) => ({ fromSoc: soc, value })) };
    case 'voltage-ledges':
      return { shape, unit, steps: rows.map(({ value }, i) => ({ ...untilV(i, rows.length, ceilingV), value })) };
    case 'map': {
      const full = atLeastTwo(rows);
      return {
        shape,
        unit,
        soc: full.map((row) => row.soc),
        tempC: [10, 25],
        values: full.map(({ value }) => [value, value]),
      };
    }
  }
}

function atLeastTwo(rows: Row[]): Row[] {
  const [only, ...more] = rows as [Row, ...Row[]];
  if (more.length > 0) return rows;
  return only.soc < 1 ? [only, { ...only, soc: 1 }] : [{ ...only, soc: 0 }, only];
}

function untilV(row: number, rows: number, ceilingV: number): { untilCellV?: number } {
  if (row === rows - 1) return {};
  return { untilCellV: Number((ceilingV - 0.4 + (0.4 * (row + 1)) / rows).toFixed(3)) };
}

function rowsOf(taper: TaperInput, currentA: number): Row[] {
  switch (taper.shape) {
    case 'none':
      return [
        { soc: 0, value: currentA },
        { soc: 0.5, value: currentA },
      ];
    case 'slope':
      return taper.points;
    case 'ledges':
      return taper.steps.map(({ fromSoc, value }) => ({ soc: fromSoc, value }));
    case 'voltage-ledges':
      return taper.steps.map(({ value }, i) => ({ soc: Number((i / taper.steps.length).toFixed(2)), value }));
    case 'map':
      return taper.soc.map((soc, i) => ({ soc, value: Math.max(...taper.values[i]!) }));
  }
}
