import { useId, type ClipboardEvent } from 'react';
import type { TemperatureUnit } from '../../lib/units.ts';
import type { Grid } from './grid.ts';
import { kindAt, LEAST, mapCellName, mapEdits, type MapKinds } from './map-edits.ts';
import { shownUnit } from './measure.ts';
import { PasteTable } from './paste-table.tsx';
import { useReadOnly } from './read-only.ts';
import { isTableText } from './paste-grid.ts';
import { TableCell } from './table-cell.tsx';
import { cellText } from './table-editor.tsx';
import type { GridEdit } from './table-edits.ts';
import { cellState, TableIssues, type CellIssue } from './table-issues.tsx';

type Props = {
  title: string;
  /** First row: column heads after an empty corner; first column: row heads. */
  grid: Grid;
  kinds: MapKinds;
  temperature: TemperatureUnit;
  issues: readonly CellIssue[];
  meanwhile?: string;
  isMoved: (row: number, column: number) => boolean;
  onEdit: (edit: GridEdit) => void;
  onLeave?: () => void;
};

/** A table over two quantities: heads and values are typed alike. */
export function MapEditor(props: Props) {
  const { title, grid, kinds, temperature, issues, onEdit } = props;
  const errorId = useId();
  const readOnly = useReadOnly();
  const edits = mapEdits(title, kinds, grid, temperature);
  const paste = (event: ClipboardEvent, row: number, column: number) => {
    const text = event.clipboardData.getData('text');
    if (!isTableText(text)) return;
    event.preventDefault();
    onEdit(edits.paste(text, row, column));
  };
  const cell = (row: number, column: number) => {
    const { measure } = kindAt(kinds, row, column);
    return (
      <TableCell
        label={mapCellName(kinds, row, column)}
        text={cellText(grid[row]![column]!, measure, temperature)}
        unit=""
        measure={measure}
        state={cellState(issues, props.isMoved, row, column)}
        errorId={errorId}
        onText={(text) => onEdit(edits.type(row, column, text))}
        onLeave={props.onLeave}
        onPaste={(event) => paste(event, row, column)}
      />
    );
  };
  return (
    <div>
      <div className="overflow-x-auto">
        <table className="grid-table map">
          <caption className="unseen">{title}</caption>
          <tbody>
            {grid.map((cells, row) => (
              <tr key={row}>
                {cells.map((_, column) =>
                  row === 0 && column === 0 ? (
                    <th key="corner" scope="col">
                      {cornerText(kinds, temperature)}
                    </th>
                  ) : (
                    <td key={column}>{cell(row, column)}</td>
                  ),
                )}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <TableIssues
        id={errorId}
        issues={issues}
        meanwhile={props.meanwhile}
        nameOf={(row, column) => mapCellName(kinds, row, column)}
      />
      <div className="grid-actions" hidden={readOnly}>
        <Act word="Add a row" onAct={() => onEdit(edits.addRow())} />
        <Act word="Add a column" onAct={() => onEdit(edits.addColumn())} />
        {grid.length > LEAST && <Act word="Delete the last row" onAct={() => onEdit(edits.removeRow())} />}
        {grid[0]!.length > LEAST && <Act word="Delete the last column" onAct={() => onEdit(edits.removeColumn())} />}
        <PasteTable
          title={title}
          columns={[`${kinds.rowHead.label} first, with ${kinds.columnHead.label.toLowerCase()} in the first row`]}
          onText={(text) => onEdit(edits.paste(text, 0, 0))}
        />
      </div>
    </div>
  );
}

/** What stands down the side and along the top, with their units: "Soc (%) by coldest surface (°C)". */
function cornerText({ rowHead, columnHead }: MapKinds, temperature: TemperatureUnit): string {
  const side = `${rowHead.label} (${shownUnit(rowHead.measure, temperature)})`;
  return `${side} by ${columnHead.label.toLowerCase()} (${shownUnit(columnHead.measure, temperature)})`;
}

function Act({ word, onAct }: { word: string; onAct: () => void }) {
  return (
    <button type="button" className="lnk" onClick={onAct}>
      {word}
    </button>
  );
}
