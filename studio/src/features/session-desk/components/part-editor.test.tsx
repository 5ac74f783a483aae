import { parseSessionStudy, simulateSession, thermalAnalysis, type SessionStudyInput } from '@voltiplano/engine';
import { act, cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { createRef } from 'react';
import { afterEach, expect, test, vi } from 'vitest';
import type { PartBody } from '../model/carriers.ts';
import { sampleStudy } from '../model/sample-study.ts';
import { PartEditor, type PartEditorHandle } from './part-editor.tsx';

/** There are no workers here: where a test waits for an answer, the engine runs on the page's own thread. */
const engine = vi.hoisted(() => ({ answers: false }));

vi.mock('../../../lib/session-client.ts', () => {
  const answer = async (input: SessionStudyInput) => {
    await (engine.answers ? Promise.resolve() : new Promise(() => {}));
    const study = parseSessionStudy(input);
    const { result } = simulateSession(study);
    return { result, thermal: thermalAnalysis(study, 0), ms: 0 };
  };
  return { sessionClient: () => ({ latest: answer, run: (input: SessionStudyInput) => ({ result: answer(input) }) }) };
});
vi.stubGlobal(
  'ResizeObserver',
  class {
    observe() {}
    disconnect() {}
  },
);

afterEach(cleanup);

const station = sampleStudy.station as PartBody;
const open = async (props: Partial<Parameters<typeof PartEditor>[0]> = {}) => {
  const onChange = vi.fn();
  const ref = createRef<PartEditorHandle>();
  const initial = { body: station, pending: {} };
  render(<PartEditor kind="station" initial={initial} saved={station} onChange={onChange} ref={ref} {...props} />);
  await screen.findByRole('group', { name: 'Inputs' });
  return { onChange, ref };
};
const field = (name: string) => screen.getByRole<HTMLInputElement>('textbox', { name });

test('the part shows what it does', async () => {
  engine.answers = true;
  await open({ saved: null });
  await screen.findByText(/of its/, { selector: '.say' });
  engine.answers = false;
});

test('an edit is reported with the whole part, and marked against what is saved', async () => {
  const { onChange } = await open();
  fireEvent.change(field('Power, most'), { target: { value: '180' } });
  expect(onChange).toHaveBeenLastCalledWith({ body: { ...station, powerMaxKw: 180 }, pending: {} });
  expect(screen.getByText('was 250')).toBeTruthy();
});

test('an entry that breaks a rule waits as it was typed, and undo takes it back', async () => {
  const { onChange } = await open();
  fireEvent.change(field('Current, most'), { target: { value: '5oo' } });
  expect(onChange).toHaveBeenLastCalledWith({ body: station, pending: { 'station.currentMaxA': '5oo' } });
  expect(field('Current, most').value).toBe('5oo');
  expect(screen.getByText(/Must be a number, but is “5oo”/)).toBeTruthy();
  fireEvent.keyDown(field('Power, most'), { key: 'z', ctrlKey: true });
  expect(onChange).toHaveBeenLastCalledWith({ body: station, pending: {} });
});

test('a draft that waited when the page was left waits still', async () => {
  await open({ initial: { body: station, pending: { 'station.powerMaxKw': -3 } } });
  expect(field('Power, most').value).toBe('−3');
  expect(screen.getByText(/Must be above 0 kW, but is −3 kW/)).toBeTruthy();
});

test('the page names, replaces and saves the part through the handle', async () => {
  const { onChange, ref } = await open();
  act(() => ref.current!.rename('Salar Tola 150'));
  expect(onChange).toHaveBeenLastCalledWith({ body: { ...station, name: 'Salar Tola 150' }, pending: {} });
  act(() => ref.current!.replace({ ...station, powerMaxKw: 90 }, 'take theirs'));
  expect(field('Power, most').value).toBe('90');
  fireEvent.click(screen.getByRole('button', { name: 'Undo take theirs' }));
  expect(onChange).toHaveBeenLastCalledWith({ body: { ...station, name: 'Salar Tola 150' }, pending: {} });
  act(() => ref.current!.compareWith({ ...station, powerMaxKw: 300 }));
  expect(screen.getByText('was 300')).toBeTruthy();
});

test('what may only be read can be reached and not changed', async () => {
  await open({ readOnly: true });
  expect(field('Power, most').readOnly).toBe(true);
  expect(screen.queryByRole('button', { name: /Undo/ })).toBeNull();
  expect(screen.getByRole('combobox', { name: 'Shown on' })).toBeTruthy();
});

test('the part is shown on another example when one is chosen', async () => {
  await open();
  fireEvent.change(screen.getByRole('combobox', { name: 'Shown on' }), { target: { value: 'Suri, full power' } });
  await waitFor(() => expect(screen.getByRole('region', { name: 'On Suri, full power' })).toBeTruthy());
});

test('a part that this version does not take says why', () => {
  render(<PartEditor kind="station" initial={{ body: { name: 'old' }, pending: {} }} saved={null} />);
  expect(screen.getByRole('alert').textContent).toMatch(/powerMaxKw is missing/);
});

test('an inlet that is the part cannot be left out', async () => {
  const inlet = sampleStudy.inlet as PartBody;
  await open({ kind: 'inlet', initial: { body: inlet, pending: {} }, saved: null });
  expect(field('Inlet current, most').value).toBe('500');
  expect(screen.queryByRole('button', { name: /Remove the inlet/ })).toBeNull();
});
