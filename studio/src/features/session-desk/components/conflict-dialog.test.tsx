import { act, fireEvent, render, screen } from '@testing-library/react';
import { MemoryRouter } from 'react-router-dom';
import { expect, test, vi } from 'vitest';
import type { WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { WorkspaceContext } from '../../../lib/session/use-workspace.ts';
import { StudyDeskContext } from '../hooks/study-desk-context.ts';
import { deskWith } from '../model/desk-state.ts';
import { createDeskStore } from '../model/desk-store.ts';
import { sampleStudy } from '../model/sample-study.ts';
import { contentBody, contentMark, type Content } from '../model/working-content.ts';
import { WorkingCopySaver } from '../model/working-copy-saver.ts';
import { ConflictDialog } from './conflict-dialog.tsx';

const content = (currentMaxA: number): Content => ({
  draft: { study: { ...sampleStudy, station: { ...sampleStudy.station, currentMaxA } }, pending: {} },
  references: [],
});

const theirs: WorkingCopy = {
  ...contentBody(content(450)),
  pending: { 'strategy.hotDerate.toC': 30 },
  parts: [],
  version: 6,
  changedAt: new Date().toISOString(),
  changedBy: { id: 'mateo', name: 'Mateo Condori' },
  isChanged: true,
};

const person = { id: 'ines', email: 'ines@puna.example', name: 'Inés Quispe', hasPassword: true };
const here = { workspaceId: 'w', workspaceName: 'Puna Mobility', role: 'engineer' as const, person, may: () => true };

function show(changedBy = theirs.changedBy) {
  const store = createDeskStore(deskWith({ ...content(400), baseline: null }));
  const write = vi.fn(() => new Promise<WorkingCopy>(() => undefined));
  const base = { version: 5, mark: contentMark(content(500)) };
  const saver = new WorkingCopySaver(
    content(400),
    base,
    [],
    { ...theirs, changedBy },
    {
      write,
      read: () => Promise.resolve(theirs),
      hold: () => true,
      isSignedOut: () => false,
    },
  );
  store.subscribe(() => saver.changed(store.get().sheet));
  const desk = { place: { workspaceId: 'w', studyId: 's' }, saver, mayEdit: true, mayEditLibrary: true };
  render(
    <MemoryRouter>
      <WorkspaceContext value={here}>
        <StudyDeskContext value={desk}>
          <ConflictDialog store={store} isChoosing onChoosing={() => undefined} />
        </StudyDeskContext>
      </WorkspaceContext>
    </MemoryRouter>,
  );
  return { store, saver, write, current: () => store.get().sheet.draft.study.station.currentMaxA };
}

test('the question names who and lists what differs, entries that wait included', () => {
  show();
  expect(screen.getByText(/Saved just now by Mateo Condori/)).toBeTruthy();
  const rows = screen.getAllByRole('row').map((row) => Array.from(row.children, (cell) => cell.textContent));
  expect(rows).toEqual([
    ['Input', 'Yours', 'Theirs'],
    ['Current, mostStation', '400 A', '450 A'],
    ['Hot limit to, to be mendedStrategy', 'none', '30.0 °C'],
  ]);
});

test('an own change from elsewhere is said to be one', () => {
  show({ id: 'ines', name: 'Inés Quispe' });
  expect(screen.getByText(/by you, in another tab or on another device/)).toBeTruthy();
});

test('mine kept: it stays on the desk, theirs is one step of undo away, and it goes over their version', () => {
  const { store, saver, write, current } = show();
  fireEvent.click(screen.getByRole('button', { name: 'Keep mine' }));
  expect(current()).toBe(400);
  expect(saver.version).toBe(6);
  act(() => saver.flush());
  expect(write).toHaveBeenCalledWith(expect.anything(), 6);
  act(() => store.dispatch({ type: 'undo' }));
  expect(current()).toBe(450);
  act(() => store.dispatch({ type: 'undo' }));
  expect(current()).toBe(400);
  act(() => saver.stop());
});

test('theirs taken: it comes onto the desk with what waits, mine is one step of undo away, nothing is sent', () => {
  const { store, saver, write, current } = show();
  fireEvent.click(screen.getByRole('button', { name: 'Take theirs' }));
  expect(current()).toBe(450);
  expect(store.get().sheet.draft.pending).toEqual({ 'strategy.hotDerate.toC': 30 });
  act(() => saver.flush());
  expect(write).not.toHaveBeenCalled();
  act(() => store.dispatch({ type: 'undo' }));
  expect(current()).toBe(400);
  act(() => saver.stop());
});
