import { act, cleanup, fireEvent, render, screen } from '@testing-library/react';
import { createRef } from 'react';
import { afterEach, expect, test, vi } from 'vitest';
import trip from '../../../../../examples/vicuna-one-leg.json';
import vicuna from '../../../../../examples/vicuna-warm-arrival.json';
import type { PartEditorHandle } from '../model/part-editor.ts';
import type { TripPartKind } from '../model/trip-part.ts';
import { TripPartEditor } from './trip-part-editor.tsx';

afterEach(cleanup);

const legs = [
  { ...trip.trip.legs[0]!, station: vicuna.station, depart: { rule: 'target', soc: 0.8 } },
  { km: 60, kmPerH: 80 },
];
const bodies = { vehicle: trip.vehicle, route: { legs } };

function open(kind: TripPartKind, props: { readOnly?: boolean; pending?: Record<string, unknown> } = {}) {
  const onChange = vi.fn();
  const ref = createRef<PartEditorHandle>();
  const { readOnly = false, pending = {} } = props;
  render(
    <TripPartEditor
      kind={kind}
      initial={{ body: bodies[kind], pending }}
      saved={readOnly ? null : bodies[kind]}
      readOnly={readOnly}
      onChange={onChange}
      ref={ref}
      workspaceId="w"
    />,
  );
  return { onChange, ref };
}

// No server answers here: the library has no stations to offer.
vi.mock('../api/read-whole-library.ts', () => ({ useWholeLibrary: () => ({ data: [] }) }));

const field = (name: string) => screen.getByRole<HTMLInputElement>('textbox', { name });
const type = (name: string, value: string) => fireEvent.change(field(name), { target: { value } });

test('a vehicle’s edit is told with the whole part and marked against what is saved', () => {
  const { onChange } = open('vehicle');
  type('Mass', '3100');
  expect(onChange).toHaveBeenLastCalledWith({ body: { ...trip.vehicle, massKg: 3100 }, pending: {} });
  expect(screen.getByText('was 2950')).toBeTruthy();
});

test('what breaks a rule waits as it was typed, with rule and value; Ctrl+Z takes it back', () => {
  const { onChange } = open('vehicle');
  type('Drive efficiency', '1.4');
  expect(field('Drive efficiency').value).toBe('1.4');
  expect(screen.getByText('Must be at most 1, but is 1.4.')).toBeTruthy();
  type('Cabin, row 2', 'warm');
  expect(screen.getByText(/Row 2, cabin: Must be a number, but is “warm”/)).toBeTruthy();
  const waiting = onChange.mock.lastCall![0] as { body: object; pending: Record<string, unknown> };
  expect(waiting.body).toEqual(trip.vehicle);
  expect(Object.keys(waiting.pending)).toHaveLength(1);
  for (let i = 0; i < 2; i++) fireEvent.keyDown(field('Mass'), { key: 'z', ctrlKey: true });
  expect(onChange).toHaveBeenLastCalledWith({ body: trip.vehicle, pending: {} });
});

test('a draft that waited when the page was left waits still', () => {
  open('vehicle', { pending: { whole: { ...trip.vehicle, massKg: '3ooo' } } });
  expect(field('Mass').value).toBe('3ooo');
  expect(screen.getByText('Must be a number, but is “3ooo”.')).toBeTruthy();
});

test('the cabin table can be taken away and brought back', () => {
  const { onChange } = open('vehicle');
  fireEvent.click(screen.getByRole('button', { name: 'Remove the cabin table' }));
  expect(screen.getByText('No cabin heating or cooling.')).toBeTruthy();
  fireEvent.click(screen.getByRole('button', { name: 'Undo remove the cabin table' }));
  expect(onChange).toHaveBeenLastCalledWith({ body: trip.vehicle, pending: {} });
});

test('a route’s stop goes with its rule; deleting a leg leaves the others their stations', () => {
  const { onChange } = open('route');
  fireEvent.change(screen.getByRole('combobox', { name: 'After leg 1' }), { target: { value: 'none' } });
  const { station: _gone, depart: _rule, ...driven } = legs[0] as Record<string, unknown>;
  expect(onChange).toHaveBeenLastCalledWith({ body: { legs: [driven, legs[1]] }, pending: {} });
  fireEvent.click(screen.getByRole('button', { name: 'Undo no station' }));
  fireEvent.click(screen.getByRole('button', { name: 'Delete leg 2' }));
  expect(onChange).toHaveBeenLastCalledWith({ body: { legs: [legs[0]] }, pending: {} });
});

test('a station at the end of a leg can be edited in place', () => {
  const { onChange } = open('route');
  fireEvent.click(screen.getByRole('button', { name: 'Show the station' }));
  type('Power, most', '90');
  const station = { ...vicuna.station, powerMaxKw: 90 };
  expect(onChange).toHaveBeenLastCalledWith({ body: { legs: [{ ...legs[0], station }, legs[1]] }, pending: {} });
  type('Depart at', '120');
  expect(screen.getByText(/Must be at most 100 %, but is 120 %/)).toBeTruthy();
});

test('the page puts another part in place; the one before stays under undo', () => {
  const { onChange, ref } = open('vehicle');
  act(() => ref.current!.replace({ ...trip.vehicle, massKg: 2000 }, 'take theirs'));
  expect(field('Mass').value).toBe('2000');
  fireEvent.click(screen.getByRole('button', { name: 'Undo take theirs' }));
  expect(onChange).toHaveBeenLastCalledWith({ body: trip.vehicle, pending: {} });
});

test('what may only be read offers no change', () => {
  open('route', { readOnly: true });
  expect(field('Distance, leg 1').readOnly).toBe(true);
  for (const name of [/^Undo/, /^Add a leg/, /^Delete/]) expect(screen.queryByRole('button', { name })).toBeNull();
});
