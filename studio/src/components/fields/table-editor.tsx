import { useId, useRef, type ClipboardEvent, type KeyboardEvent } from 'react';
import type { TemperatureUnit } from '../../lib/units.ts';
import type { Cell, Grid } from './grid.ts';
import { shownUnit, storedText, type Measure } from './measure.ts';
import { PasteTable } from './paste-table.tsx';
import { useReadOnly } from './read-only.ts';
import { isTableText } from './paste-grid.ts';
import { TableCell } from './table-cell.tsx';
import { tableEdits, type GridEdit } from './table-edits.ts';
import { cellState, TableIssues, type CellIssue } from './table-issues.tsx';
import { TableRow } from './table-row.tsx';

export type TableColumn = {
  label: string;
  measure: Measure;
  /** The last row holds to the end and has no value here. */
  lastOpen?: true;
};

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
  onEdit: (edit: GridEdit) => void;
  onLeave?: () => void;
};

/** A table of numbers: type, paste from a spreadsheet, Alt with arrows moves a row, Alt with Delete takes it away. */
export function TableEditor(props: Props) {
  const { title, columns, grid, temperature, rowWord, minRows, maxRows = Infinity, issues, did, onEdit } = props;
  const errorId = useId();
  const readOnly = useReadOnly();
  const edits = tableEdits(title, columns, grid, temperature, rowWord);
  const { body, focus } = useCellFocus();
  const remove = (row: number) => {
    if (grid.length <= minRows) return;
    onEdit(edits.remove(row));
    focus(Math.min(row, grid.length - 2), 0);
  };
  const add = () => {
    onEdit(edits.add());
    focus(grid.length, 0);
  };
  const press = (event: KeyboardEvent, row: number, column: number) => {
    if (event.key === 'Enter') return focus(Math.min(row + 1, grid.length - 1), column);
    if (!event.altKey || !['ArrowUp', 'ArrowDown', 'Delete', 'Backspace'].includes(event.key)) return;
    event.preventDefault();
    if (!event.key.startsWith('Arrow')) return remove(row);
    const by = event.key === 'ArrowUp' ? -1 : 1;
    onEdit(edits.move(row, by));
    focus(Math.min(Math.max(row + by, 0), grid.length - 1), column);
  };
  const paste = (event: ClipboardEvent, row: number, column: number) => {
    const text = event.clipboardData.getData('text');
    if (!isTableText(text)) return;
    event.preventDefault();
    onEdit(edits.paste(text, row, column));
  };
  const cellOf = (cell: Cell, row: number, column: TableColumn, j: number) =>
    column.lastOpen && row === grid.length - 1 && cell === null ? (
      <span className="note">to the end</span>
    ) : (
      <TableCell
        label={`${column.label}, ${edits.name(row)}`}
        text={cellText(cell, column.measure, temperature)}
        unit={shownUnit(column.measure, temperature)}
        measure={column.measure}
        state={cellState(issues, props.isMoved, row, j)}
        errorId={errorId}
        onText={(text) => onEdit(edits.type(row, j, text))}
        onLeave={props.onLeave}
        onKey={(event) => press(event, row, j)}
        onPaste={(event) => paste(event, row, j)}
      />
    );
  return (
    <div>
      <table className="grid-table">
        <caption className="unseen">{title}</caption>
        <Heads labels={columns.map(({ label }) => label)} did={did?.label} />
        <tbody ref={body}>
          {grid.map((cells, row) => (
            <TableRow
              key={row}
              name={edits.name(row)}
              cells={columns.map((column, j) => cellOf(cells[j] ?? null, row, column, j))}
              hasDid={did !== undefined}
              did={did?.cells[row]}
              onDelete={!readOnly && grid.length > minRows ? () => remove(row) : undefined}
            />
          ))}
        </tbody>
      </table>
      <TableIssues
        id={errorId}
        issues={issues}
        meanwhile={props.meanwhile}
        nameOf={(row, j) => capital(`${edits.name(row)}, ${columns[j]?.label.toLowerCase() ?? ''}`)}
      />
      <div className="grid-actions" hidden={readOnly}>
        {grid.length < maxRows && (
          <button type="button" className="lnk" onClick={add}>
            {`Add a ${rowWord}`}
          </button>
        )}
        <PasteTable
          title={title}
          columns={columns.map(({ label, measure }) => withUnit(label, shownUnit(measure, temperature)))}
          onText={(text) => onEdit(edits.paste(text, 0, 0))}
        />
      </div>
    </div>
  );
}

function Heads({ labels, did }: { labels: readonly string[]; did?: string }) {
  return (
    <thead>
      <tr>
        {labels.map((label) => (
          <th key={label} scope="col">
            {label}
          </th>
        ))}
        {did && (
          <th scope="col" className="r">
            {did}
          </th>
        )}
        <th scope="col">
          <span className="unseen">Delete</span>
        </th>
      </tr>
    </thead>
  );
}

/** Moves the focus to a cell once the table has been drawn again. */
function useCellFocus() {
  const body = useRef<HTMLTableSectionElement>(null);
  const focus = (row: number, column: number) => {
    requestAnimationFrame(() => body.current?.rows[row]?.querySelectorAll('input')[column]?.focus());
  };
  return { body, focus };
}

function withUnit(label: string, unit: string): string {
  return unit ? `${label} (${unit})` : label;
}

/** A cell as its input shows it. */
export function cellText(cell: Cell, measure: Measure, temperature: TemperatureUnit): string {
  if (typeof cell === 'number') return storedText(cell, measure, temperature);
  return cell ?? '';
}

function capital(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}`;
}
