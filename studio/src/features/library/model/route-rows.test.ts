import { expect, test } from 'vitest';
import { tableEdits } from '../../../components/fields/table-edits.ts';
import { gridOfLegs, legCellOf, legColumns, legsOfGrid, type TypedLeg } from './route-rows.ts';

const stop = { name: 'Salar Tola' };
const legs: TypedLeg[] = [
  { km: 148, kmPerH: 104, climbM: 620 },
  { km: 60, kmPerH: 90, station: stop, depart: { rule: 'reach-next' } },
  { km: 70, kmPerH: 80, ambientC: 4 },
];
const grid = gridOfLegs(legs);
const edits = tableEdits('Legs', legColumns, grid, '°C', 'leg');
const after = (edit: { grid: typeof grid }) => legsOfGrid(legs, grid, edit.grid);
const stops = (all: TypedLeg[]) => all.map(({ station }) => station?.name ?? null);

test('legs go through the table and back', () => {
  expect(legsOfGrid(legs, grid, [...grid])).toEqual(legs);
});

test('a station stays with its leg, wherever the row goes', () => {
  expect(stops(after(edits.remove(0)))).toEqual(['Salar Tola', null]);
  expect(stops(after(edits.move(1, 1)))).toEqual([null, null, 'Salar Tola']);
  expect(stops(after(edits.add()))).toEqual([null, 'Salar Tola', null, null]);
  expect(after(edits.type(1, 0, '61'))[1]).toEqual({ ...legs[1], km: 61 });
  expect(after(edits.type(1, 0, '6o'))[1]).toEqual({ ...legs[1], km: '6o' });
});

test('a pasted table keeps stations by their place', () => {
  const pasted = after(edits.paste('10\t50\t0\t0\t5\n20\t60\t0\t0\t5\n30\t70\t0\t0\t5', 0, 0));
  expect(stops(pasted)).toEqual([null, 'Salar Tola', null]);
  expect(pasted[0]).toEqual({ km: 10, kmPerH: 50, climbM: 0, windKmPerH: 0, ambientC: 5 });
});

test('an emptied cell takes the field away', () => {
  expect(after(edits.type(0, 2, ''))[0]).toEqual({ km: 148, kmPerH: 104 });
});

test('legCellOf finds cells and nothing else', () => {
  expect(legCellOf('trip.legs[2].climbM')).toEqual({ row: 2, column: 2 });
  expect(legCellOf('trip.legs[2].station.powerMaxKw')).toBeUndefined();
  expect(legCellOf('trip.legs')).toBeUndefined();
});
