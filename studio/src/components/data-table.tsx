import {
  createSortedRowModel,
  rowSortingFeature,
  sortFn_basic,
  type SortingState,
  tableFeatures,
  useTable,
} from '@tanstack/react-table';
import { useMemo, useState, type ReactNode } from 'react';

export type Column<Row> = {
  id: string;
  head: string;
  cell: (row: Row) => ReactNode;
  /** What the column is sorted by, in the browser; text is compared as the reader's language does. */
  sortBy?: (row: Row) => string | number | null;
  /** Where the server sorts: whether it can by this column. */
  isSortable?: boolean;
  /** The head is read aloud, not seen: for a column of things to press. */
  isHeadUnseen?: boolean;
  /** Numbers stand right. */
  isRight?: boolean;
  /** The cell that names the row; read out with every other. */
  isName?: boolean;
  /** CSS width on a wide sheet. */
  width?: string;
  /** On a narrow sheet: left out, or without the head's word before it. */
  narrow?: 'hidden' | 'bare';
  /** Class of its head and its cells. */
  className?: string;
};

/** Column and direction that rows stand in. */
export type Sort = { by: string; order: 'asc' | 'desc' };

type Props<Row> = {
  /** What the rows are, read aloud. */
  label: string;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowId: (row: Row) => string;
  /** Order that stands; with `onSort`, somebody else (the address, the server) keeps it and sorts the rows. */
  sort?: Sort;
  onSort?: (sort: Sort) => void;
  rowClass?: (row: Row) => string | undefined;
};

const features = tableFeatures({
  rowSortingFeature,
  sortedRowModel: createSortedRowModel(),
  sortFns: { basic: sortFn_basic },
});
const collator = new Intl.Collator(undefined, { numeric: true, sensitivity: 'base' });

/** A register: rows on hairlines under one rule of ink, sortable by their heads; on a narrow sheet rows are stacked. */
export function DataTable<Row>({ label, columns, rows, rowId, sort, onSort, rowClass }: Props<Row>) {
  const [ownSort, setOwnSort] = useState(sort);
  const shown = onSort ? sort : ownSort;
  const sorting: SortingState = useMemo(() => (shown ? [{ id: shown.by, desc: shown.order === 'desc' }] : []), [shown]);
  const data = useMemo(() => rows.map((row) => ({ row })), [rows]);
  const defs = useMemo(() => columns.map((column) => columnDef(column)), [columns]);
  const table = useTable({
    features,
    columns: defs,
    data,
    getRowId: ({ row }) => rowId(row),
    state: { sorting },
    manualSorting: onSort !== undefined,
  });
  return (
    <table className="reg" aria-label={label} role="table">
      <thead role="rowgroup">
        <tr role="row">
          {columns.map((column) => (
            <Head
              key={column.id}
              column={column}
              sort={shown}
              isServers={onSort !== undefined}
              onSort={onSort ?? setOwnSort}
            />
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup">
        {table.getRowModel().rows.map(({ id, original: { row } }) => (
          <tr key={id} role="row" className={rowClass?.(row)}>
            {columns.map((column) => (
              <Cell key={column.id} column={column} row={row} />
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function columnDef<Row>({ id, sortBy }: Column<Row>) {
  return {
    id,
    accessorFn: ({ row }: { row: Row }) => sortBy?.(row) ?? undefined,
    // What is not known stands last in either direction.
    sortUndefined: 'last' as const,
    sortFn: (a: { getValue: (id: string) => unknown }, b: { getValue: (id: string) => unknown }) =>
      compare(a.getValue(id), b.getValue(id)),
  };
}

function compare(a: unknown, b: unknown): number {
  return typeof a === 'number' && typeof b === 'number' ? a - b : collator.compare(a as string, b as string);
}

type HeadProps<Row> = {
  column: Column<Row>;
  sort: Sort | undefined;
  isServers: boolean;
  onSort: (sort: Sort) => void;
};

function Head<Row>({ column, sort, isServers, onSort }: HeadProps<Row>) {
  const { id, sortBy, isSortable, width } = column;
  const head = column.isHeadUnseen ? <span className="unseen">{column.head}</span> : column.head;
  const isSorted = sort?.by === id;
  const canSort = isServers ? isSortable === true : sortBy !== undefined;
  const order = isSorted ? sort.order : undefined;
  return (
    <th
      scope="col"
      role="columnheader"
      className={cellClass(column)}
      style={width ? { width } : undefined}
      data-plain={!canSort || undefined}
      aria-sort={order === undefined ? undefined : order === 'asc' ? 'ascending' : 'descending'}
    >
      {canSort ? (
        <button onClick={() => onSort({ by: id, order: order === 'asc' ? 'desc' : 'asc' })}>
          {head}
          <SortMark order={order} />
        </button>
      ) : (
        head
      )}
    </th>
  );
}

/** A ledge that climbs or falls in the direction of the rows. */
function SortMark({ order }: { order: Sort['order'] | undefined }) {
  if (!order) return null;
  const path = order === 'asc' ? 'M1 7H4V4H7V1H10' : 'M1 1H4V4H7V7H10';
  return (
    <svg width="11" height="8" viewBox="0 0 11 8" aria-hidden="true">
      <path d={path} fill="none" stroke="var(--clay)" strokeWidth="1.6" />
    </svg>
  );
}

function Cell<Row>({ column, row }: { column: Column<Row>; row: Row }) {
  const { head, isName, isHeadUnseen, narrow, cell } = column;
  const isNamed = !isName && !isHeadUnseen && narrow !== 'bare';
  const shared = { className: cellClass(column), 'data-head': isNamed ? head : undefined };
  const content = cell(row);
  if (isName) {
    return (
      <th scope="row" role="rowheader" {...shared}>
        {content}
      </th>
    );
  }
  return (
    <td role="cell" {...shared}>
      {content}
    </td>
  );
}

function cellClass<Row>({ isRight, narrow, className }: Column<Row>): string | undefined {
  const names = [isRight ? 'r' : '', narrow === 'hidden' ? 'wide' : '', className].filter(Boolean);
  return names.length > 0 ? names.join(' ') : undefined;
}
