import { render, screen } from '@testing-library/react';
import { expect, test } from 'vitest';
import { studyDifferences } from '../lib/study-differences.ts';
import { DifferenceList } from './difference-list.tsx';

const steps = (second: number) => ({
  strategy: {
    taper: {
      shape: 'ledges',
      unit: 'A',
      steps: [
        { fromSoc: 0, value: 360 },
        { fromSoc: 0.3, value: second },
      ],
    },
  },
});

function rows(before: object, after: object): string[][] {
  render(
    <DifferenceList
      differences={studyDifferences(before, after, '°C')}
      before="Revision 6"
      after="now"
      caption="What changed"
    />,
  );
  const [, ...body] = screen.getAllByRole('row');
  return body.map((row) => Array.from(row.children, (cell) => cell.textContent ?? ''));
}

test('a field is listed with its unit on both sides, what is missing as none', () => {
  expect(rows({ station: { currentMaxA: 500 } }, { station: { currentMaxA: 350, rampAPerS: 20 } })).toEqual([
    ['Current, mostStation', '500 A', '350 A'],
    ['RampStation', 'none', '20 A/s'],
  ]);
});

test('a cell without a value says what stands in its place, without a unit', () => {
  const legs = (km: number) => ({ trip: { legs: [{ km, kmPerH: 80 }] } });
  const [[, , after] = []] = rows({}, legs(60));
  expect(after).toBe(
    '60 km, Speed: 80 km/h, Climb: 0 m, Head wind: 0.0 km/h, Ambient: of the trip, Station: none, Depart: rule of the trip',
  );
});

test('of a table only the row that differs is listed', () => {
  expect(rows(steps(310), steps(320))).toEqual([['Taper ledges, row 2Strategy', '30 %, 310 A', '30 %, 320 A']]);
});
