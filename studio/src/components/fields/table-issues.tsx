export type CellIssue = { row: number; column: number; sentence: string };

type Props = {
  id: string;
  issues: readonly CellIssue[];
  /** Names a cell: "Ledge 2, current". */
  nameOf: (row: number, column: number) => string;
  /** What the curves use while an issue stands. */
  meanwhile?: string;
};

/** What is wrong with a table, cell by cell. */
export function TableIssues({ id, issues, nameOf, meanwhile }: Props) {
  return (
    <div id={id}>
      {issues.map(({ row, column, sentence }) => (
        <p className="note err" key={`${row}:${column}:${sentence}`}>
          {`${nameOf(row, column)}: ${sentence}`}
        </p>
      ))}
      {issues.length > 0 && meanwhile && <p className="note err">{meanwhile}</p>}
    </div>
  );
}

/** How a cell looks: wrong, moved against the baseline, or neither. */
export function cellState(
  issues: readonly CellIssue[],
  isMoved: (row: number, column: number) => boolean,
  row: number,
  column: number,
): 'bad' | 'moved' | undefined {
  if (issues.some((issue) => issue.row === row && issue.column === column)) return 'bad';
  return isMoved(row, column) ? 'moved' : undefined;
}
