import { expect, test } from 'vitest';
import trip from '../../../../../examples/vicuna-one-leg.json';
import vicuna from '../../../../../examples/vicuna-warm-arrival.json';
import { freshHistory, historyReducer } from './part-history.ts';
import { entryOf, tripPartIssues, tripPartOf, withPartValue } from './trip-part.ts';

const vehicle = tripPartOf({ body: trip.vehicle, pending: {} });
const route = tripPartOf({ body: { legs: trip.trip.legs }, pending: {} });

test('a value that breaks no rule stands at once', () => {
  expect(entryOf(withPartValue('vehicle', vehicle, 'vehicle.massKg', 3000))).toEqual({
    body: { ...trip.vehicle, massKg: 3000 },
    pending: {},
  });
});

test('what breaks a rule waits as typed, and the last good part stays', () => {
  const typed = withPartValue('vehicle', vehicle, 'vehicle.massKg', '3ooo');
  expect(typed.body).toBe(trip.vehicle);
  expect(tripPartIssues('vehicle', typed)).toMatchObject([
    { path: 'vehicle.massKg', rule: 'not-a-number', value: '3ooo' },
  ]);
  const again = tripPartOf(entryOf(typed));
  expect(again).toEqual(typed);
  const mended = withPartValue('vehicle', again, 'vehicle.massKg', 2900);
  expect(entryOf(mended)).toEqual({ body: { ...trip.vehicle, massKg: 2900 }, pending: {} });
});

test('issues of a route are named by the paths of a trip, with rule and value', () => {
  const steep = withPartValue('route', route, 'trip.legs[0].km', 0.1);
  expect(tripPartIssues('route', steep)).toMatchObject([{ path: 'trip.legs[0].climbM', rule: 'climb' }]);
  const bare = withPartValue('route', route, 'trip.legs[0].depart', { rule: 'reach-next' });
  expect(tripPartIssues('route', bare)[0]).toMatchObject({ rule: 'depart-needs-station' });
  const stop = withPartValue('route', bare, 'trip.legs[0].station', vicuna.station);
  expect(tripPartIssues('route', stop)).toEqual([]);
  expect(stop.typed).toBeNull();
});

test('typing in one field is one step of undo; redo makes it again', () => {
  const change = (value: unknown, typingAt?: string) =>
    ({
      type: 'change',
      change: (part: typeof vehicle) => withPartValue('vehicle', part, 'vehicle.massKg', value),
      label: 'Mass',
      ...(typingAt ? { typingAt } : {}),
    }) as const;
  let state = freshHistory(vehicle);
  for (const value of [3, 30, 300]) state = historyReducer(state, change(value, 'mass'));
  state = historyReducer(state, { type: 'leave-field' });
  state = historyReducer(state, change(400, 'mass'));
  expect(state.past).toHaveLength(2);
  state = historyReducer(historyReducer(state, { type: 'undo' }), { type: 'undo' });
  expect(state.part).toBe(vehicle);
  state = historyReducer(historyReducer(state, { type: 'redo' }), { type: 'redo' });
  expect(state.part.body.massKg).toBe(400);
  expect(historyReducer(state, { type: 'redo' })).toBe(state);
});
