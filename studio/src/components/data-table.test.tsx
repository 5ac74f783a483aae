import { fireEvent, render, screen, within } from '@testing-library/react';
import { useState } from 'react';
import { expect, test } from 'vitest';
import { type Column, DataTable, type Sort } from './data-table.tsx';

type Row = { id: string; name: string; min: number | null };
const rows: Row[] = [
  { id: 'a', name: 'Suri', min: 18.2 },
  { id: 'b', name: 'Águila', min: null },
  { id: 'c', name: 'Vicuña 86', min: 9.5 },
  { id: 'd', name: 'Vicuña 9', min: 57.8 },
];
const columns: Column<Row>[] = [
  { id: 'name', head: 'Name', isName: true, isSortable: true, sortBy: ({ name }) => name, cell: ({ name }) => name },
  { id: 'min', head: '10–80 %, min', isRight: true, sortBy: ({ min }) => min, cell: ({ min }) => min ?? 'not reached' },
];

const names = () => screen.getAllByRole('rowheader').map((cell) => cell.textContent);
const head = (name: string) => screen.getByRole('columnheader', { name });
const press = (name: string) => fireEvent.click(within(head(name)).getByRole('button'));

test('DataTable sorts as the language does, numbers by size, nothing last in either direction', () => {
  render(
    <DataTable
      label="Packs"
      columns={columns}
      rows={rows}
      rowId={({ id }) => id}
      sort={{ by: 'name', order: 'asc' }}
    />,
  );
  expect(names()).toEqual(['Águila', 'Suri', 'Vicuña 9', 'Vicuña 86']);
  expect(head('Name').getAttribute('aria-sort')).toBe('ascending');
  press('10–80 %, min');
  expect(names()).toEqual(['Vicuña 86', 'Suri', 'Vicuña 9', 'Águila']);
  press('10–80 %, min');
  expect(head('10–80 %, min').getAttribute('aria-sort')).toBe('descending');
  expect(head('Name').hasAttribute('aria-sort')).toBe(false);
  expect(names()).toEqual(['Vicuña 9', 'Suri', 'Vicuña 86', 'Águila']);
});

test('DataTable leaves the order to whoever keeps it, and offers only what they sort by', () => {
  const asked: Sort[] = [];
  function Kept() {
    const [sort, setSort] = useState<Sort>({ by: 'name', order: 'desc' });
    const take = (next: Sort) => {
      asked.push(next);
      setSort(next);
    };
    return <DataTable label="Packs" columns={columns} rows={rows} rowId={({ id }) => id} sort={sort} onSort={take} />;
  }
  render(<Kept />);
  expect(names()).toEqual(rows.map(({ name }) => name));
  expect(within(head('10–80 %, min')).queryByRole('button')).toBeNull();
  press('Name');
  expect(asked).toEqual([{ by: 'name', order: 'asc' }]);
  expect(names()).toEqual(rows.map(({ name }) => name));
});
