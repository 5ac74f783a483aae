import { useMemo } from 'react';
import { ChoiceField } from '../../../components/fields/choice-field.tsx';
import { useReadOnly } from '../../../components/fields/read-only.ts';
import { WordSwitch } from '../../../components/word-switch.tsx';
import { formatNumber } from '../../../lib/format.ts';
import { useDesk, useDeskStore, useDispatch } from '../hooks/use-desk.ts';
import { useRun } from '../hooks/run-context.ts';
import { ledgeMinutes } from '../model/ledge-minutes.ts';
import { taperInShape, taperShapes, type TaperUnit } from '../model/taper-shapes.ts';
import { taperTable } from '../../../lib/table-specs.ts';
import { HeldNote } from './held-note.tsx';
import { NameField } from './name-field.tsx';
import { SectionFrame } from './section-frame.tsx';
import { StudyTable } from './study-table.tsx';
import { TableChart } from './table-chart.tsx';

const SHAPES = taperShapes.map(({ shape, label }) => ({ value: shape, label }));
const UNITS: { value: TaperUnit }[] = [{ value: 'A' }, { value: 'C' }, { value: 'kW' }];

export function TaperSection() {
  const dispatch = useDispatch();
  const desk = useDeskStore();
  const taper = useDesk(({ sheet }) => sheet.draft.study.strategy.taper);
  const path = taperTable(taper)?.path;
  const put = (value: typeof taper, label: string) =>
    dispatch({ type: 'parts', parts: [{ path: 'strategy.taper', value }], label });
  return (
    <SectionFrame name="taper">
      <NameField path="strategy.name" label="Strategy" />
      <ChoiceField
        label="Shape"
        value={taper.shape}
        options={SHAPES}
        onChange={(shape) => {
          const { strategy, pack } = desk.get().sheet.draft.study;
          put(taperInShape(taper, shape, strategy.cellVoltageCeilingV, pack.chargeCurrentMaxA), 'taper shape');
        }}
      />
      <div className="note">
        <HeldNote code="taper" />
      </div>
      {path && taper.shape !== 'none' && (
        <>
          <LedgeTable path={path} />
          <UnitChoice unit={taper.unit} />
        </>
      )}
    </SectionFrame>
  );
}

/** The taper's table, which also says how long each ledge held the current. */
function LedgeTable({ path }: { path: string }) {
  const did = useLedgeColumn();
  return <StudyTable path={path} did={did} chart={(grid) => <TableChart path={path} grid={grid} />} />;
}

/** A taper's unit; choosing another keeps the numbers, and says so. */
function UnitChoice({ unit }: { unit: TaperUnit }) {
  const dispatch = useDispatch();
  const readOnly = useReadOnly();
  if (readOnly) return <p className="note">{`Numbers in ${unit}`}</p>;
  const onChange = (value: TaperUnit) =>
    dispatch({ type: 'parts', parts: [{ path: 'strategy.taper.unit', value }], label: `taper in ${value}` });
  return (
    <div className="unit-choice">
      <span>Numbers in</span>
      <WordSwitch label="Unit of the taper" value={unit} options={UNITS} onChange={onChange} />
      <span className="note">The numbers stay as they are; only their unit changes.</span>
    </div>
  );
}

/** The last column of the taper's table: how long each ledge held the current. */
function useLedgeColumn() {
  const answer = useRun((run) => run.answer);
  const study = useRun((run) => run.study);
  return useMemo(() => {
    if (!answer || !study || study.strategy.taper.shape === 'map') return undefined;
    const minutes = ledgeMinutes(answer.result, study.strategy.taper);
    const cells = minutes.map((held) => ({ text: held < 0.05 ? 'idle' : formatNumber(held, 1), idle: held < 0.05 }));
    return { label: 'Held, min', cells };
  }, [answer, study]);
}
