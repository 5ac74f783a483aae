import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { afterEach, expect, test } from 'vitest';
import type { Grid } from './grid.ts';
import { measureOf } from './measure.ts';
import { TableEditor } from './table-editor.tsx';

afterEach(cleanup);

const columns = [
  { label: 'From soc', measure: measureOf('strategy.taper.soc') },
  { label: 'Current', measure: measureOf('station.currentMaxA') },
];

function Held({ onGrid }: { onGrid: (grid: Grid) => void }) {
  const [grid, setGrid] = useState<Grid>([
    [0, 252],
    [0.36, 216],
  ]);
  return (
    <TableEditor
      title="Taper ledges"
      columns={columns}
      grid={grid}
      temperature="°C"
      rowWord="ledge"
      minRows={1}
      issues={[]}
      isMoved={() => false}
      onEdit={(edit) => {
        setGrid(edit.grid);
        onGrid(edit.grid);
      }}
    />
  );
}

function editor() {
  const seen: Grid[] = [];
  render(<Held onGrid={(grid) => seen.push(grid)} />);
  return { latest: () => seen.at(-1), cell: (name: string) => screen.getByRole<HTMLInputElement>('textbox', { name }) };
}

test('TableEditor stores file units', () => {
  const { cell, latest } = editor();
  expect(cell('From soc, ledge 2').value).toBe('36');
  fireEvent.change(cell('From soc, ledge 2'), { target: { value: '40' } });
  expect(latest()).toEqual([
    [0, 252],
    [0.4, 216],
  ]);
});

test('TableEditor adds, moves and deletes rows by key and by button', () => {
  const { cell, latest } = editor();
  fireEvent.click(screen.getByRole('button', { name: 'Add a ledge' }));
  expect(latest()).toHaveLength(3);
  fireEvent.keyDown(cell('Current, ledge 1'), { key: 'ArrowDown', altKey: true });
  expect(latest()![1]).toEqual([0, 252]);
  fireEvent.keyDown(cell('Current, ledge 2'), { key: 'Delete', altKey: true });
  fireEvent.click(screen.getByRole('button', { name: 'Delete ledge 1' }));
  expect(latest()).toEqual([[0.72, 216]]);
  expect(screen.queryByRole('button', { name: 'Delete ledge 1' })).toBeNull();
});

test('TableEditor takes a table from a spreadsheet and keeps a bad cell in its place', () => {
  const { cell, latest } = editor();
  const clipboardData = { getData: () => 'soc\tA\n0\t250,5\n40\tx\n60\t90' };
  fireEvent.paste(cell('From soc, ledge 1'), { clipboardData });
  expect(latest()).toEqual([
    [0, 250.5],
    [0.4, 'x'],
    [0.6, 90],
  ]);
});
