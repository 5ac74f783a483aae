import { expect, test } from 'vitest';
import vicuna from '../../../../../examples/vicuna-warm-arrival.json';
import { itemDifferences, saysTheSame } from './item-content.ts';

const item = { name: 'Salar Tola', notes: '', source: 'plate', body: vicuna.station };

test('saysTheSame looks at what is said, in whatever order', () => {
  const { name, ...others } = item.body;
  expect(saysTheSame(item, { ...item, body: { ...others, name } })).toBe(true);
  expect(saysTheSame(item, { ...item, notes: 'n' })).toBe(false);
  expect(saysTheSame(item, { ...item, body: { ...item.body, powerMaxKw: 1 } })).toBe(false);
});

test('itemDifferences says the words around the part first, and its name once', () => {
  const next = {
    ...item,
    name: 'Salar Tola 150',
    notes: 'new',
    body: { ...item.body, name: 'Salar Tola 150', powerMaxKw: 150 },
  };
  const found = itemDifferences('station', item, next, '°C');
  expect(found.map(({ label }) => label)).toEqual(['Name', 'Notes', 'Power, most']);
  expect(found[1]).toMatchObject({ before: null, after: 'new' });
});
