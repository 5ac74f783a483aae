import { expect, test } from 'vitest';
import type { Grid } from './grid.ts';
import { mapEdits } from './map-edits.ts';
import { measureOf } from './measure.ts';

const kinds = {
  rowHead: { label: 'Soc', measure: measureOf('strategy.taper.soc') },
  columnHead: { label: 'Coldest surface', measure: measureOf('strategy.taper.tempC[]') },
  value: { label: 'Current', measure: measureOf('station.currentMaxA') },
};
const grid: Grid = [
  [null, 10, 25],
  [0, 200, 300],
  [0.5, 100, 150],
];
const edits = mapEdits('Taper map', kinds, grid, '°F');

test('mapEdits reads each cell in the unit it is shown in', () => {
  expect(edits.type(0, 1, '50').grid[0]).toEqual([null, 10, 25]);
  expect(edits.type(2, 0, '60').grid[2]![0]).toBe(0.6);
  expect(edits.type(1, 1, '210').grid[1]).toEqual([0, 210, 300]);
});

test('mapEdits carries heads on and repeats the values', () => {
  expect(edits.addColumn().grid).toEqual([
    [null, 10, 25, 40],
    [0, 200, 300, 300],
    [0.5, 100, 150, 150],
  ]);
  expect(edits.addRow().grid[3]).toEqual([1, 100, 150]);
  expect(edits.removeColumn().grid[0]).toEqual([null, 10]);
});

test('mapEdits takes a whole map with its heads, whatever stands in the corner', () => {
  const { grid: pasted } = edits.paste('soc\t32\t50\t86\n0\t90\t120\t200\n40\t60\t80\t150', 0, 0);
  expect(pasted[0]).toEqual([null, 0, 10, 30]);
  expect(pasted[2]).toEqual([0.4, 60, 80, 150]);
});
