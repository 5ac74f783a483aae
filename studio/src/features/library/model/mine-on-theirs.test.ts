import { expect, test } from 'vitest';
import vicuna from '../../../../../examples/vicuna-warm-arrival.json';
import { mineOnTheirs } from './mine-on-theirs.ts';

const base = { name: 'Vicuña ledges 7', notes: '', source: 'drawing 12', body: vicuna.strategy };
const withBody = (change: object) => ({ ...base, body: { ...base.body, ...change } });

test('fields that one changed say what one wrote, all others what they saved', () => {
  const mine = { ...withBody({ cutoffA: 12 }), notes: 'mine' };
  const theirs = { ...withBody({ cutoffA: 20, hotDerate: { fromC: 36, toC: 42 } }), source: 'drawing 13' };
  expect(mineOnTheirs('strategy', base, mine, theirs)).toEqual({
    name: base.name,
    notes: 'mine',
    source: 'drawing 13',
    body: { ...base.body, cutoffA: 12, hotDerate: { fromC: 36, toC: 42 } },
  });
});

test('members of one part that both changed are told apart', () => {
  const mine = withBody({ hotDerate: { fromC: 33, toC: 42 } });
  const theirs = withBody({ hotDerate: { fromC: 34, toC: 45 } });
  expect(mineOnTheirs('strategy', base, mine, theirs).body.hotDerate).toEqual({ fromC: 33, toC: 45 });
});

test('what one took away stays away, and what they took away goes', () => {
  const { anodeMarginMv: _mine, ...withoutMargin } = base.body;
  const { coldLimit: _theirs, ...withoutCold } = base.body;
  const merged = mineOnTheirs('strategy', base, { ...base, body: withoutMargin }, { ...base, body: withoutCold });
  expect(merged.body).not.toHaveProperty('anodeMarginMv');
  expect(merged.body).not.toHaveProperty('coldLimit');
});

test('where both together break a rule, one’s own stands as a whole', () => {
  const mine = withBody({ hotDerate: { fromC: 41, toC: 42 } });
  const theirs = withBody({ hotDerate: { fromC: 34, toC: 40 } });
  expect(mineOnTheirs('strategy', base, mine, theirs).body).toBe(mine.body);
});
