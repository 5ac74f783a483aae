import { useMemo, useState, type RefObject } from 'react';
import { SessionStrips, type StrategyBounds } from '../../../charts/session-strips.tsx';
import type { TaperTable } from '../../../charts/taper-line.ts';
import { stripKeys, type StripKey } from '../../../charts/strip-specs.ts';
import { WordSwitch } from '../../../components/word-switch.tsx';
import type { SessionStudyInput } from '@voltiplano/engine';
import type { SessionAnswer } from '@voltiplano/engine/worker';
import { LimitMinutes } from './limit-minutes.tsx';
import { useDesk, useDispatch } from '../hooks/use-desk.ts';
import { useRun } from '../hooks/run-context.ts';
import { filledOf, issuesOf } from '../model/derived.ts';

type Props = { answer: SessionAnswer; study: SessionStudyInput; drawing: RefObject<HTMLDivElement | null> };

const AXES = [
  { value: 'time' as const, label: 'over time' },
  { value: 'soc' as const, label: 'over soc' },
];

/** The stacked charts over one shared axis, with what they show and what they leave out. */
export function StripsSection({ answer, study, drawing }: Props) {
  const dispatch = useDispatch();
  const { axis, hiddenStrips } = useDesk((state) => state.view);
  const waits = useDesk(({ sheet }) => issuesOf(sheet.draft).length > 0);
  const { isWorking, baseline, failure } = useRun();
  const [cursor, setCursor] = useState<number | null>(null);
  const hidden = useMemo(() => new Set(hiddenStrips as StripKey[]), [hiddenStrips]);
  const taper = useMemo(() => taperTableOf(study), [study]);
  const bounds = useMemo(() => boundsOf(study), [study]);
  return (
    <section aria-labelledby="strips-title">
      <div className="bar">
        <h2 id="strips-title">Strips</h2>
        <WordSwitch
          label="Axis of the strips"
          value={axis}
          options={AXES}
          onChange={(chosen) => dispatch({ type: 'view', view: { axis: chosen } })}
        />
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
        stale={isWorking || waits || failure !== null}
        working={isWorking}
        taper={taper}
        bounds={bounds}
      />
      <LimitMinutes result={answer.result} baseline={baseline?.result ?? null} />
    </section>
  );
}

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

/** What the lines mean. */
function StripKeyLine({ hasBaseline, hasTaper }: { hasBaseline: boolean; hasTaper: boolean }) {
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
}

/** One word per strip; pressed while it is shown. */
function StripToggles() {
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
}
