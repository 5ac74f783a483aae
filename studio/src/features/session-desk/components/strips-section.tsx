import { memo, useMemo, useState, type RefObject } from 'react';
import { SessionStrips, type StrategyBounds } from '../../../charts/session-strips.tsx';
import type { TaperTable } from '../../../charts/taper-line.ts';
import { stripKeys, type StripKey } from '../../../charts/strip-specs.ts';
import { WordSwitch } from '../../../components/word-switch.tsx';
import type { SessionStudyInput } from '@voltiplano/engine';
import { LimitMinutes } from './limit-minutes.tsx';
import { useDesk, useDispatch } from '../hooks/use-desk.ts';
import { useAnswered, useRun } from '../hooks/run-context.ts';
import { filledOf, issuesOf } from '../model/derived.ts';

type Props = { drawing: RefObject<HTMLDivElement | null> };

const AXES = [
  { value: 'time' as const, label: 'over time' },
  { value: 'soc' as const, label: 'over soc' },
];

/** The stacked charts over one shared axis, with what they show and what they leave out. */
export function StripsSection({ drawing }: Props) {
  const { answer, study } = useAnswered();
  const baseline = useRun((run) => run.baseline);
  const working = useRun((run) => run.isWorking);
  const failed = useRun((run) => run.failure !== null);
  const { axis, hiddenStrips } = useDesk((state) => state.view);
  const waits = useDesk(({ sheet }) => issuesOf(sheet.draft).length > 0);
  const [cursor, setCursor] = useState<number | null>(null);
  const hidden = useMemo(() => new Set(hiddenStrips as StripKey[]), [hiddenStrips]);
  const taper = useMemo(() => taperTableOf(study), [study]);
  const bounds = useMemo(() => boundsOf(study), [study]);
  return (
    <section aria-labelledby="strips-title">
      <div className="bar">
        <h2 id="strips-title">Strips</h2>
        <AxisSwitch />
        <StripKeyLine hasBaseline={baseline !== null} hasTaper={taper !== null} />
        <StripToggles />
      </div>
      <SessionStrips
        ref={drawing}
        result={answer.result}
        baseline={baseline?.result ?? null}
        axis={axis}
        hidden={hidden}
        cursor={cursor}
        onCursor={setCursor}
        stale={working || waits || failed}
        working={working}
        taper={taper}
        bounds={bounds}
      />
      <LimitMinutes result={answer.result} baseline={baseline?.result ?? null} />
    </section>
  );
}

const AxisSwitch = memo(function AxisSwitch() {
  const dispatch = useDispatch();
  const axis = useDesk((state) => state.view.axis);
  return (
    <WordSwitch
      label="Axis of the strips"
      value={axis}
      options={AXES}
      onChange={(chosen) => dispatch({ type: 'view', view: { axis: chosen } })}
    />
  );
});

/** Only tapers over soc have a line on the strips. */
function taperTableOf(study: SessionStudyInput): TaperTable | null {
  const { taper } = filledOf(study).strategy;
  if (taper.shape !== 'ledges' && taper.shape !== 'slope') return null;
  return { taper, packAh: study.cell.capacityAh * study.pack.parallel };
}

function boundsOf({ strategy, cell }: SessionStudyInput): StrategyBounds {
  return {
    ceilingV: strategy.cellVoltageCeilingV,
    hotToC: strategy.hotDerate.toC,
    ...(cell.anode && strategy.anodeMarginMv !== undefined ? { marginMv: strategy.anodeMarginMv } : {}),
  };
}

type KeyProps = { hasBaseline: boolean; hasTaper: boolean };

/** What the lines mean. */
const StripKeyLine = memo(function StripKeyLine({ hasBaseline, hasTaper }: KeyProps) {
  return (
    <p className="key">
      <span>
        <svg width="24" height="8" aria-hidden="true">
          <path d="M0 4H24" stroke="var(--s-power)" strokeWidth="2" />
        </svg>
        present
      </span>
      {hasBaseline && (
        <span>
          <svg width="24" height="8" aria-hidden="true">
            <path d="M0 4H24" stroke="var(--base)" strokeWidth="1.6" />
          </svg>
          baseline
        </span>
      )}
      {hasTaper && (
        <span>
          <svg width="24" height="8" aria-hidden="true">
            <path d="M0 4H24" stroke="var(--clay)" strokeWidth="1.3" strokeDasharray="4 3" />
          </svg>
          taper
        </span>
      )}
    </p>
  );
});

/** One word per strip; pressed while it is shown. */
const StripToggles = memo(function StripToggles() {
  const dispatch = useDispatch();
  const hidden = useDesk((state) => state.view.hiddenStrips);
  const toggle = (key: StripKey) =>
    dispatch({
      type: 'view',
      view: { hiddenStrips: hidden.includes(key) ? hidden.filter((one) => one !== key) : [...hidden, key] },
    });
  return (
    <div className="pick strip-toggles" role="group" aria-label="Strips shown">
      {stripKeys.map((key) => (
        <button key={key} type="button" aria-pressed={!hidden.includes(key)} onClick={() => toggle(key)}>
          {key}
        </button>
      ))}
    </div>
  );
});
