import { useMemo, type KeyboardEvent } from 'react';
import type { StudyRow } from '../../../../../server/src/contract/study.ts';
import { SectionPatterns } from '../../../charts/section-thumbnail.tsx';
import { useWidth } from '../../../charts/use-width.ts';
import { DataTable, type Column } from '../../../components/data-table.tsx';
import { studyNumber } from '../../../lib/study-names.ts';
import { useUnits, type TemperatureUnit } from '../../../lib/units.ts';
import type { RowDeeds } from '../hooks/use-row-deeds.ts';
import { sortedBy, type ListView, type SortBy } from '../model/list-view.ts';
import { RowActs } from './row-acts.tsx';
import { ChangedCell, CoreCell, MinutesCell, SECTION_MIN, SectionCell, StateCell, TitleCell } from './study-cells.tsx';

type Props = {
  rows: readonly StudyRow[];
  view: ListView;
  onSort: (sort: Pick<ListView, 'sort' | 'order'>) => void;
  deeds: RowDeeds;
};

/** Studies in rows: arrow keys go from one to the next. */
export function StudyRegister({ rows, view, onSort, deeds }: Props) {
  const [ref, width] = useWidth<HTMLDivElement>();
  const { temperatureUnit } = useUnits();
  const columns = useMemo(
    () => columnsOf(sectionWidth(width), temperatureUnit, deeds),
    [width, temperatureUnit, deeds],
  );
  return (
    <div ref={ref} className={view.isArchive ? 'studies-register in-archive' : 'studies-register'} onKeyDown={stepRows}>
      <SectionPatterns />
      <DataTable
        label={view.isArchive ? 'Studies in the archive' : 'Studies'}
        columns={columns}
        rows={rows}
        rowId={({ id }) => id}
        sort={{ by: view.sort, order: view.order }}
        onSort={({ by }) => onSort(sortedBy(view, by as SortBy))}
        rowClass={({ archivedAt }) => (archivedAt ? 'archived' : undefined)}
      />
    </div>
  );
}

/** Room of the section's column, as studies.css gives it; on a narrow sheet the section is a line of its own. */
function sectionWidth(width: number): number {
  if (width <= 688) return width;
  return width <= 1052 ? 240 : 320;
}

function columnsOf(width: number, degrees: TemperatureUnit, deeds: RowDeeds): Column<StudyRow>[] {
  const cells: (Column<StudyRow> & { id: SortBy | 'section' | 'state' | 'more' })[] = [
    {
      id: 'number',
      head: 'No.',
      className: 'c-number',
      isSortable: true,
      cell: ({ number }) => <span className="num">{studyNumber(number)}</span>,
    },
    {
      id: 'title',
      head: 'Study',
      className: 'c-title',
      isName: true,
      isSortable: true,
      cell: (row) => <TitleCell row={row} />,
    },
    {
      id: 'section',
      head: `Section: power, 0 to ${SECTION_MIN} min, and what held it`,
      className: 'c-section',
      cell: (row) => <SectionCell row={row} width={width} />,
    },
    {
      id: 'minutes10To80',
      head: '10–80 %, min',
      className: 'c-minutes',
      isRight: true,
      isSortable: true,
      cell: (row) => <MinutesCell row={row} />,
    },
    {
      id: 'hottestCoreC',
      head: `Hottest core, ${degrees}`,
      className: 'c-core',
      isRight: true,
      isSortable: true,
      cell: (row) => <CoreCell row={row} />,
    },
    { id: 'state', head: 'State', className: 'c-state', cell: (row) => <StateCell row={row} /> },
    {
      id: 'owner',
      head: 'Owner',
      className: 'c-owner',
      isSortable: true,
      cell: ({ owner }) => owner?.name ?? 'account gone',
    },
    {
      id: 'changed',
      head: 'Changed',
      className: 'c-changed',
      isRight: true,
      isSortable: true,
      cell: (row) => <ChangedCell row={row} />,
    },
    {
      id: 'more',
      head: 'Actions',
      isHeadUnseen: true,
      className: 'c-more',
      isRight: true,
      cell: (row) => <RowActs row={row} deeds={deeds} />,
    },
  ];
  return cells.map((cell) => ({ ...cell, narrow: 'bare' }));
}

function stepRows(event: KeyboardEvent<HTMLDivElement>): void {
  const step = { ArrowDown: 1, ArrowUp: -1 }[event.key];
  if (step === undefined || !(event.target instanceof HTMLElement) || !event.target.matches('.row-link')) return;
  const links = [...event.currentTarget.querySelectorAll<HTMLElement>('.row-link')];
  links[links.indexOf(event.target) + step]?.focus();
  event.preventDefault();
}
