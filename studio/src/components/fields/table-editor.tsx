import { useId, useRef, type ClipboardEvent, type KeyboardEvent, type ReactNode } from 'react';
import type { TemperatureUnit } from '../../lib/units.ts';
import { nextRow, readCell, withCell, withoutRow, withRow, withRowMoved, type Cell, type Grid } from './grid.ts';
import { shownUnit, storedText, type Measure } from './measure.ts';
import { PasteTable } from './paste-table.tsx';
import { isTableText, splitTable, withBlock } from './paste-grid.ts';
import { TableCell } from './table-cell.tsx';

export type TableColumn = {
  label: string;
  measure: Measure;
  /** The last row holds to the end and has no value here. */
  lastOpen?: true;
};

export type CellIssue = { row: number; column: number; sentence: string };

type Props = {
  title: string;
  columns: readonly TableColumn[];
  grid: Grid;
  temperature: TemperatureUnit;
  /** What one row is called: "ledge". */
  rowWord: string;
  minRows: number;
  maxRows?: number;
  issues: readonly CellIssue[];
  /** What the curves use while an issue stands. */
  meanwhile?: string;
  isMoved: (row: number, column: number) => boolean;
  /** A last column with what each row did. */
  did?: { label: string; cells: readonly { text: string; idle: boolean }[] };
  /** `typingAt` names the cell typed in, so that typing there is one step of undo. */
  onGrid: (grid: Grid, label: string, typingAt?: string) => void;
  onLeave?: () => void;
  /** Further actions beside "Add". */
  actions?: ReactNode;
};

/** A table of numbers: type, paste from a spreadsheet, Alt with arrows moves a row, Alt with Delete takes it away. */
export function TableEditor(props: Props) {
  const { title, columns, grid, temperature, rowWord, minRows, maxRows = Infinity, issues, onGrid } = props;
  const body = useRef<HTMLTableSectionElement>(null);
  const errorId = useId();
  const name = (row: number) => `${rowWord} ${row + 1}`;
  const focus = (row: number, column: number) => {
    // After the table has been drawn again; the inputs keep their places in it.
    requestAnimationFrame(() => body.current?.rows[row]?.querySelectorAll('input')[column]?.focus());
  };
  const set = (row: number, column: number, text: string) => {
    const cell = readCell(text, columns[column]!.measure, temperature);
    onGrid(
      withCell(grid, row, column, cell),
      `${name(row)}, ${columns[column]!.label.toLowerCase()}`,
      `${row}:${column}`,
    );
  };
  const remove = (row: number) => {
    if (grid.length <= minRows) return;
    onGrid(withoutRow(grid, row), `delete ${name(row)}`);
    focus(Math.min(row, grid.length - 2), 0);
  };
  const add = () => {
    onGrid(withRow(grid, grid.length, nextRow(grid, columns.length)), `add a ${rowWord}`);
    focus(grid.length, 0);
  };
  const press = (event: KeyboardEvent, row: number, column: number) => {
    if (event.key === 'Enter') return focus(Math.min(row + 1, grid.length - 1), column);
    if (!event.altKey || !['ArrowUp', 'ArrowDown', 'Delete', 'Backspace'].includes(event.key)) return;
    event.preventDefault();
    if (!event.key.startsWith('Arrow')) return remove(row);
    const by = event.key === 'ArrowUp' ? -1 : 1;
    onGrid(withRowMoved(grid, row, by), `move ${name(row)}`);
    focus(Math.min(Math.max(row + by, 0), grid.length - 1), column);
  };
  const block = (text: string): Grid => {
    const cells = (row: string[], from: number): Cell[] =>
      row.map((cell, j) => readCell(cell, columns[Math.min(from + j, columns.length - 1)]!.measure, temperature));
    return splitTable(text).map((row) => cells(row, 0));
  };
  const paste = (event: ClipboardEvent, row: number, column: number) => {
    const text = event.clipboardData.getData('text');
    if (!isTableText(text)) return;
    event.preventDefault();
    const measures = columns.slice(column);
    const laid = splitTable(text).map((cells) =>
      cells.slice(0, measures.length).map((cell, j) => readCell(cell, measures[j]!.measure, temperature)),
    );
    onGrid(withBlock(grid, row, column, laid), `paste into ${title.toLowerCase()}`);
  };
  return (
    <div>
      <table className="grid-table">
        <caption className="unseen">{title}</caption>
        <thead>
          <tr>
            {columns.map(({ label }) => (
              <th key={label} scope="col">
                {label}
              </th>
            ))}
            {props.did && (
              <th scope="col" className="r">
                {props.did.label}
              </th>
            )}
            <th scope="col">
              <span className="unseen">Delete</span>
            </th>
          </tr>
        </thead>
        <tbody ref={body}>
          {grid.map((cells, row) => (
            <tr key={row}>
              {columns.map((column, j) => (
                <td key={column.label}>
                  {column.lastOpen && row === grid.length - 1 && cells[j] === null ? (
                    <span className="note">to the end</span>
                  ) : (
                    <TableCell
                      label={`${column.label}, ${name(row)}`}
                      text={cellText(cells[j] ?? null, column.measure, temperature)}
                      unit={shownUnit(column.measure, temperature)}
                      measure={column.measure}
                      state={stateOf(issues, props.isMoved, row, j)}
                      errorId={errorId}
                      onText={(text) => set(row, j, text)}
                      onLeave={props.onLeave}
                      onKey={(event) => press(event, row, j)}
                      onPaste={(event) => paste(event, row, j)}
                    />
                  )}
                </td>
              ))}
              {props.did && <DidCell {...(props.did.cells[row] ?? { text: '', idle: true })} />}
              <td className="rowact">
                {grid.length > minRows && (
                  <button type="button" className="lnk" aria-label={`Delete ${name(row)}`} onClick={() => remove(row)}>
                    Delete
                  </button>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <div id={errorId}>
        {issues.map(({ row, column, sentence }) => (
          <p className="note err" key={`${row}:${column}:${sentence}`}>
            {`${capital(name(row))}, ${columns[column]?.label.toLowerCase() ?? ''}: ${sentence}`}
          </p>
        ))}
        {issues.length > 0 && props.meanwhile && <p className="note err">{props.meanwhile}</p>}
      </div>
      <div className="grid-actions">
        {grid.length < maxRows && (
          <button type="button" className="lnk" onClick={add}>
            {`Add a ${rowWord}`}
          </button>
        )}
        <PasteTable
          title={title}
          columns={columns.map((column) => `${column.label}${withUnit(column.measure, temperature)}`)}
          onText={(text) => onGrid(withBlock(grid, 0, 0, block(text)), `paste ${title.toLowerCase()}`)}
        />
        {props.actions}
      </div>
    </div>
  );
}

function DidCell({ text, idle }: { text: string; idle: boolean }) {
  return <td className={idle ? 'r did idle' : 'r did'}>{text}</td>;
}

function stateOf(issues: readonly CellIssue[], isMoved: Props['isMoved'], row: number, column: number) {
  if (issues.some((issue) => issue.row === row && issue.column === column)) return 'bad';
  return isMoved(row, column) ? 'moved' : undefined;
}

/** A cell as its input shows it. */
export function cellText(cell: Cell, measure: Measure, temperature: TemperatureUnit): string {
  if (typeof cell === 'number') return storedText(cell, measure, temperature);
  return cell ?? '';
}

function withUnit(measure: Measure, temperature: TemperatureUnit): string {
  const unit = shownUnit(measure, temperature);
  return unit ? ` (${unit})` : '';
}

function capital(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}`;
}
