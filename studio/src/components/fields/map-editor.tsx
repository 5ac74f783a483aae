import { useId, type ClipboardEvent } from 'react';
import type { TemperatureUnit } from '../../lib/units.ts';
import { nextRow, readCell, withCell, withoutRow, withRow, type Cell, type Grid } from './grid.ts';
import { shownUnit, type Measure } from './measure.ts';
import { isTableText, splitTable, withBlock } from './paste-grid.ts';
import { PasteTable } from './paste-table.tsx';
import { TableCell } from './table-cell.tsx';
import { cellText, type CellIssue } from './table-editor.tsx';

type Props = {
  title: string;
  /** First row: column heads after an empty corner; first column: row heads. */
  grid: Grid;
  rowHead: { label: string; measure: Measure };
  columnHead: { label: string; measure: Measure };
  value: { label: string; measure: Measure };
  temperature: TemperatureUnit;
  issues: readonly CellIssue[];
  meanwhile?: string;
  isMoved: (row: number, column: number) => boolean;
  onGrid: (grid: Grid, label: string, typingAt?: string) => void;
  onLeave?: () => void;
};

/** A table over two quantities, at least two by two: heads and values are typed alike. */
export function MapEditor(props: Props) {
  const { title, grid, rowHead, columnHead, value, temperature, issues, onGrid } = props;
  const errorId = useId();
  const width = grid[0]!.length;
  const kind = (row: number, column: number) => (row === 0 ? columnHead : column === 0 ? rowHead : value);
  const read = (text: string, row: number, column: number): Cell =>
    row === 0 && column === 0 ? null : readCell(text, kind(row, column).measure, temperature);
  const blockAt = (text: string, row: number, column: number): Grid =>
    splitTable(text, true).map((cells, i) => cells.map((cell, j) => read(cell, row + i, column + j)));
  const paste = (event: ClipboardEvent, row: number, column: number) => {
    const text = event.clipboardData.getData('text');
    if (!isTableText(text)) return;
    event.preventDefault();
    onGrid(withBlock(grid, row, column, blockAt(text, row, column)), `paste into ${title.toLowerCase()}`);
  };
  const withColumn = () => grid.map((cells, i) => [...cells, i === 0 ? nextHead(cells) : cells[width - 1]!]);
  return (
    <div>
      <div className="overflow-x-auto">
        <table className="grid-table map">
          <caption className="unseen">{title}</caption>
          <tbody>
            {grid.map((cells, row) => (
              <tr key={row}>
                {cells.map((cell, column) =>
                  row === 0 && column === 0 ? (
                    <th key="corner" scope="col">
                      {`${rowHead.label} by ${columnHead.label.toLowerCase()}`}
                    </th>
                  ) : (
                    <td key={column}>
                      <TableCell
                        label={cellName(row, column, kind(row, column).label)}
                        text={cellText(cell, kind(row, column).measure, temperature)}
                        unit={row === 0 || column === 0 ? shownUnit(kind(row, column).measure, temperature) : ''}
                        measure={kind(row, column).measure}
                        state={
                          issues.some((one) => one.row === row && one.column === column)
                            ? 'bad'
                            : props.isMoved(row, column)
                              ? 'moved'
                              : undefined
                        }
                        errorId={errorId}
                        onText={(text) =>
                          onGrid(
                            withCell(grid, row, column, read(text, row, column)),
                            cellName(row, column, kind(row, column).label).toLowerCase(),
                            `${row}:${column}`,
                          )
                        }
                        onLeave={props.onLeave}
                        onPaste={(event) => paste(event, row, column)}
                      />
                    </td>
                  ),
                )}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <div id={errorId}>
        {issues.map(({ row, column, sentence }) => (
          <p className="note err" key={`${row}:${column}`}>
            {`${cellName(row, column, kind(row, column).label)}: ${sentence}`}
          </p>
        ))}
        {issues.length > 0 && props.meanwhile && <p className="note err">{props.meanwhile}</p>}
      </div>
      <div className="grid-actions">
        <Act word="Add a row" onAct={() => onGrid(withRow(grid, grid.length, nextRow(grid, width)), 'add a row')} />
        <Act word="Add a column" onAct={() => onGrid(withColumn(), 'add a column')} />
        {grid.length > 3 && (
          <Act word="Delete the last row" onAct={() => onGrid(withoutRow(grid, grid.length - 1), 'delete a row')} />
        )}
        {width > 3 && (
          <Act
            word="Delete the last column"
            onAct={() =>
              onGrid(
                grid.map((cells) => cells.slice(0, -1)),
                'delete a column',
              )
            }
          />
        )}
        <PasteTable
          title={title}
          columns={[`${rowHead.label} in the first column, ${columnHead.label.toLowerCase()} in the first row`]}
          onText={(text) => onGrid(blockAt(text, 0, 0), `paste ${title.toLowerCase()}`)}
        />
      </div>
    </div>
  );
}

function Act({ word, onAct }: { word: string; onAct: () => void }) {
  return (
    <button type="button" className="lnk" onClick={onAct}>
      {word}
    </button>
  );
}

function cellName(row: number, column: number, label: string): string {
  if (row === 0) return `${label}, column ${column}`;
  return column === 0 ? `${label}, row ${row}` : `${label}, row ${row}, column ${column}`;
}

function nextHead(heads: Cell[]): Cell {
  const last = heads.at(-1);
  const before = heads.at(-2);
  if (typeof last !== 'number') return null;
  return typeof before === 'number' ? 2 * last - before : last + 10;
}
