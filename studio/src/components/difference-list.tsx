import type { Difference, ValueDifference } from '../lib/study-differences.ts';
import type { RowDifference, TableDifference } from '../lib/table-differences.ts';

type Props = {
  differences: readonly Difference[];
  /** What the two sides are called: "Revision 6" and "now". */
  before: string;
  after: string;
  /** Names the table for those who hear it. */
  caption: string;
};

/** Inputs that differ, each with what it was and what it is; of a table the rows that differ. */
export function DifferenceList({ differences, before, after, caption }: Props) {
  return (
    <table className="differences">
      <caption className="unseen">{caption}</caption>
      <thead>
        <tr>
          <th scope="col">Input</th>
          <th scope="col">{before}</th>
          <th scope="col">{after}</th>
        </tr>
      </thead>
      <tbody>
        {differences.map((one) =>
          one.kind === 'value' ? (
            <ValueRow key={one.path} {...one} />
          ) : (
            <TableRows key={`${one.path} ${one.label}`} {...one} />
          ),
        )}
      </tbody>
    </table>
  );
}

function ValueRow({ section, label, unit, before, after }: ValueDifference) {
  return <Row section={section} label={label} before={withUnit(before, unit)} after={withUnit(after, unit)} />;
}

function TableRows({ section, label, columns, rows }: TableDifference) {
  const text = (row: RowDifference, side: 'before' | 'after') =>
    row[side] === null
      ? null
      : row.cells.flatMap((cell, j) => cellText(columns, j, cell[side], cell.differs, j === 0)).join(', ');
  return rows.map((row) => (
    <Row
      key={`${row.before} ${row.after}`}
      section={section}
      label={`${label}, row ${row.after ?? row.before}`}
      before={text(row, 'before')}
      after={text(row, 'after')}
    />
  ));
}

/** Cells of a wide table carry their heads; those of a narrow one are told apart by their units. */
function cellText(
  columns: TableDifference['columns'],
  j: number,
  text: string | null,
  differs: boolean,
  isFirst: boolean,
): string[] {
  const isWide = columns.length > 3;
  if (text === null || (isWide && !differs && !isFirst)) return [];
  const { label, unit, empty } = columns[j]!;
  const value = text === empty ? text : withUnit(text, unit)!;
  return [isWide && !isFirst ? `${label}: ${value}` : value];
}

type RowProps = { section: string; label: string; before: string | null; after: string | null };

function Row({ section, label, before, after }: RowProps) {
  return (
    <tr>
      <th scope="row">
        {label}
        {section && <span className="section">{section}</span>}
      </th>
      <td>{before ?? <span className="none">none</span>}</td>
      <td>{after ?? <span className="none">none</span>}</td>
    </tr>
  );
}

function withUnit(text: string | null, unit: string): string | null {
  return text === null || unit === '' ? text : `${text} ${unit}`;
}
