import { TableEditor } from '../../../components/fields/table-editor.tsx';
import { useReadOnly } from '../../../components/fields/read-only.ts';
import type { CellIssue } from '../../../components/fields/table-issues.tsx';
import { issueSentence } from '../../../lib/issue-text.ts';
import { isWithin } from '../../../lib/study-path.ts';
import { cellMeasure, cellOfPath, tableAt } from '../../../lib/table-specs.ts';
import { useUnits } from '../../../lib/units.ts';
import { useTripPart } from '../hooks/trip-part-context.ts';
import { partValue } from '../model/trip-part.ts';
import { PartField } from './part-field.tsx';

const FIELDS = [
  'vehicle.massKg',
  'vehicle.dragAreaM2',
  'vehicle.rollingCoefficient',
  'vehicle.driveEfficiency',
  'vehicle.regenEfficiency',
  'vehicle.hotelW',
  'vehicle.cabinAtStops',
];

const CABIN = 'vehicle.cabinWPerAmbient';
/** What a cabin table begins with: heating in the cold, cooling in the heat. */
const NEW_CABIN = { tempC: [-20, 20, 40], watts: [4000, 500, 2500] };

/** What the road and the cabin take from the pack. */
export function VehicleInputs() {
  return (
    <div className="trip-part">
      {FIELDS.map((path) => (
        <PartField key={path} path={path} />
      ))}
      <CabinPart />
    </div>
  );
}

function CabinPart() {
  const { kind, shown, put } = useTripPart();
  const readOnly = useReadOnly();
  const isThere = partValue(kind, shown, CABIN) !== undefined;
  const act = (word: string, value: unknown, label: string) =>
    !readOnly && (
      <button type="button" className="lnk" onClick={() => put(CABIN, value, label)}>
        {word}
      </button>
    );
  if (!isThere)
    return (
      <p className="trip-without">
        <span>No cabin heating or cooling.</span>
        {act('Add a cabin table', NEW_CABIN, 'add a cabin table')}
      </p>
    );
  return (
    <>
      <h3 className="trip-part-head">Cabin over ambient</h3>
      <CabinTable />
      {act('Remove the cabin table', undefined, 'remove the cabin table')}
    </>
  );
}

function CabinTable() {
  const { kind, shown, saved, issues, put, leaveField } = useTripPart();
  const { temperatureUnit } = useUnits();
  const spec = tableAt(CABIN, {})!;
  const grid = spec.toGrid(partValue(kind, shown, CABIN));
  const before = saved && spec.toGrid(partValue(kind, saved, CABIN));
  const found = issues.filter(({ path }) => isWithin(path, CABIN));
  const cells = found.flatMap((issue): CellIssue[] => {
    const cell = cellOfPath(spec, grid, issue.path);
    return cell
      ? [{ ...cell, sentence: issueSentence(issue, cellMeasure(spec, cell.row, cell.column), temperatureUnit) }]
      : [];
  });
  return (
    <TableEditor
      title={spec.title}
      columns={spec.columns}
      grid={grid}
      temperature={temperatureUnit}
      rowWord={spec.row}
      minRows={spec.minRows}
      issues={cells}
      isMoved={(row, column) => before !== null && grid[row]?.[column] !== before[row]?.[column]}
      onEdit={({ grid: next, label, typingAt }) =>
        put(CABIN, spec.toValue(next), label, typingAt && `${CABIN} ${typingAt}`)
      }
      onLeave={leaveField}
    />
  );
}
