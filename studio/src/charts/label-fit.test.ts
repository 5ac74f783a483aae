import { expect, it } from 'vitest';
import { bedLabels } from './label-fit.ts';

const bed = (from: number, to: number) => ({ from, to, label: 'voltage ceiling', short: 'ceiling' });

it('bedLabels takes the full name, the short one, then a row below', () => {
  const [wide, narrow, slim] = bedLabels([bed(0, 200), bed(200, 265), bed(265, 280)], 0, 400);
  expect(wide).toMatchObject({ place: 'inside', text: 'voltage ceiling' });
  expect(narrow).toMatchObject({ place: 'inside', text: 'ceiling' });
  expect(slim).toMatchObject({ place: 'below', text: 'ceiling', row: 0 });
});

it('bedLabels below never touch each other', () => {
  const labels = bedLabels([bed(0, 10), bed(10, 20), bed(20, 30), bed(120, 130)], 0, 400);
  expect(labels.map((label) => (label?.place === 'below' ? label.row : null))).toEqual([0, 1, null, 0]);
});

it('bedLabels stay between the ends of the band', () => {
  const [first] = bedLabels([bed(0, 6)], 0, 400);
  expect(first?.x).toBeGreaterThan(20);
});
