import { TableEditor } from '../../../components/fields/table-editor.tsx';
import type { CellIssue } from '../../../components/fields/table-issues.tsx';
import { issueSentence } from '../../../lib/issue-text.ts';
import { useUnits } from '../../../lib/units.ts';
import { useTripPart } from '../hooks/trip-part-context.ts';
import { gridOfLegs, legCellOf, legColumns, legsOfGrid, type TypedLeg } from '../model/route-rows.ts';
import { partValue } from '../model/trip-part.ts';
import { LegEnd } from './leg-end.tsx';

const LEGS = 'trip.legs';

/** The legs of a route, and what stands at the end of each. */
export function RouteInputs({ workspaceId }: { workspaceId: string }) {
  const { kind, shown } = useTripPart();
  const legs = partValue(kind, shown, LEGS) as TypedLeg[];
  return (
    <div className="trip-part wide-part">
      <h3 className="trip-part-head">Legs</h3>
      <LegTable legs={legs} />
      <h3 className="trip-part-head">Ends of legs</h3>
      <ol className="leg-ends">
        {legs.map((leg, i) => (
          <LegEnd key={i} index={i} leg={leg} workspaceId={workspaceId} />
        ))}
      </ol>
    </div>
  );
}

function LegTable({ legs }: { legs: readonly TypedLeg[] }) {
  const { kind, saved, issues, put, leaveField } = useTripPart();
  const { temperatureUnit } = useUnits();
  const grid = gridOfLegs(legs);
  const before = saved && gridOfLegs((partValue(kind, saved, LEGS) as TypedLeg[] | undefined) ?? []);
  const cells = issues.flatMap((issue): CellIssue[] => {
    const cell = legCellOf(issue.path);
    return cell ? [{ ...cell, sentence: issueSentence(issue, legColumns[cell.column]!.measure, temperatureUnit) }] : [];
  });
  return (
    <TableEditor
      title="Legs"
      columns={legColumns}
      grid={grid}
      temperature={temperatureUnit}
      rowWord="leg"
      minRows={1}
      maxRows={500}
      issues={cells}
      isMoved={(row, column) => before !== null && grid[row]?.[column] !== before[row]?.[column]}
      onEdit={({ grid: next, label, typingAt }) =>
        put(LEGS, legsOfGrid(legs, grid, next), label, typingAt && `${LEGS} ${typingAt}`)
      }
      onLeave={leaveField}
    />
  );
}
