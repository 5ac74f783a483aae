import { Link } from 'react-router-dom';
import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { DataTable, type Column, type Sort } from '../../../components/data-table.tsx';
import { useUnits, type Units } from '../../../lib/units.ts';
import { kindWords } from '../model/kinds.ts';
import { partSummary } from '../model/part-summary.ts';
import { WhoWhen } from './who-when.tsx';

type Props = { items: readonly LibraryItem[]; sort: Sort; onSort: (sort: Sort) => void };

/** Parts, one a row: what each is, how far it has come, and who relies on it. */
export function LibraryRegister({ items, sort, onSort }: Props) {
  const units = useUnits();
  return (
    <DataTable
      label="Parts of the library"
      columns={columnsOf(units)}
      rows={items}
      rowId={({ id }) => id}
      sort={sort}
      onSort={onSort}
    />
  );
}

function columnsOf(units: Units): Column<LibraryItem>[] {
  return [
    {
      id: 'name',
      head: 'Name',
      isName: true,
      isSortable: true,
      cell: ({ id, name }) => (
        <Link className="part-name" to={id}>
          {name}
        </Link>
      ),
      width: '26%',
    },
    { id: 'kind', head: 'Kind', isSortable: true, cell: ({ kind }) => kindWords[kind].one, width: '96px' },
    {
      id: 'what',
      head: 'What it is',
      narrow: 'bare',
      cell: ({ kind, body }) => <span className="part-what">{partSummary(kind, body, units)}</span>,
    },
    {
      id: 'revision',
      head: 'Revision',
      isRight: true,
      cell: ({ revision }) => <span className="num">{revision}</span>,
      width: '80px',
    },
    {
      id: 'studies',
      head: 'In studies',
      isRight: true,
      isSortable: true,
      cell: ({ studyCount }) => <span className="num">{studyCount}</span>,
      width: '96px',
    },
    {
      id: 'changed',
      head: 'Changed',
      isRight: true,
      isSortable: true,
      cell: ({ changedBy, changedAt }) => <WhoWhen by={changedBy} at={changedAt} />,
      width: '170px',
    },
  ];
}
