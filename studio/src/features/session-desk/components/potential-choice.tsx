import { ChoiceField } from '../../../components/fields/choice-field.tsx';
import { useDesk, useDispatch } from '../hooks/use-desk.ts';
import { isMoved } from '../model/changes.ts';
import { potentialFrom, potentialSources, sourceOf } from '../../../lib/potential-sources.ts';
import { StudyTable } from './study-table.tsx';
import { TableChart } from './table-chart.tsx';

type Props = { part: 'ocv' | 'anode'; label: string };

const PATHS = { ocv: 'cell.ocv', anode: 'cell.anode.potential' } as const;

/** Where a potential comes from, and its table where it is one. */
export function PotentialChoice({ part, label }: Props) {
  const path = PATHS[part];
  const dispatch = useDispatch();
  const potential = useDesk(({ sheet: { draft } }) =>
    part === 'ocv' ? draft.study.cell.ocv : draft.study.cell.anode!.potential,
  );
  const moved = useDesk(({ sheet }) => isMoved(potential, sheet.baseline, path));
  const source = sourceOf(potential);
  return (
    <>
      <ChoiceField
        label={label}
        value={source}
        options={potentialSources}
        moved={moved}
        onChange={(chosen) =>
          dispatch({ type: 'parts', parts: [{ path, value: potentialFrom(chosen, potential, part) }], label })
        }
      />
      {source === 'table' && <StudyTable path={path} chart={(grid) => <TableChart path={path} grid={grid} />} />}
    </>
  );
}
