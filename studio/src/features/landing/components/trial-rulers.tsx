import type { LimitCode, SessionResult } from '@voltiplano/engine';
import { LimitBandThumbnail } from '../../../charts/limit-band.tsx';
import { LimitName } from '../../../charts/limit-marks.tsx';
import { formatNumber, formatQuantity } from '../../../lib/format.ts';
import { useUnits } from '../../../lib/units.ts';
import type { Trial } from '../model/trial-study.ts';
import { Ruler } from './ruler.tsx';

type Props = { trial: Trial; onChange: (trial: Trial) => void; result: SessionResult | null };

/** Four rulers under the hero, and what they make of the session. */
export function TrialRulers({ trial, onChange, result }: Props) {
  const units = useUnits();
  const degrees = (celsius: number) => `${formatNumber(units.temperature(celsius), 0)} ${units.temperatureUnit}`;
  const set = (change: Partial<Trial>) => onChange({ ...trial, ...change });
  return (
    <section className="try" aria-label="Try the engine">
      <Ruler
        label="Ambient"
        value={trial.ambientC}
        min={-20}
        max={40}
        step={2}
        shown={degrees(trial.ambientC)}
        onChange={(ambientC) => set({ ambientC })}
      />
      <Ruler
        label="Start temperature"
        value={trial.startTempC}
        min={-10}
        max={40}
        step={1}
        shown={degrees(trial.startTempC)}
        onChange={(startTempC) => set({ startTempC })}
      />
      <Ruler
        label="Station power, most"
        value={trial.stationKw}
        min={50}
        max={250}
        step={5}
        shown={`${formatNumber(trial.stationKw, 0)} kW`}
        onChange={(stationKw) => set({ stationKw })}
      />
      <Ruler
        label="Ledges, all"
        value={Math.round(trial.ledges * 100)}
        min={70}
        max={130}
        step={5}
        shown={`${formatNumber(trial.ledges * 100, 0)} %`}
        onChange={(percent) => set({ ledges: percent / 100 })}
      />
      <Outcome result={result} />
    </section>
  );
}

function Outcome({ result }: { result: SessionResult | null }) {
  const minutes = result?.metrics.minutes10To80 ?? null;
  const longest = result && longestLimit(result);
  return (
    <div className="res">
      <span className="text-table text-ink2">10–80 %, and what holds longest</span>
      <div className="v" aria-live="polite">
        {result ? formatQuantity('min', minutes) : ' '}
        {minutes !== null && <small>min</small>}
      </div>
      <div className="text-table min-h-[18px]">
        {longest && (
          <>
            <LimitName code={longest.code} />{' '}
            <span className="num text-ink3">{formatQuantity('min', longest.minutes)} min</span>
          </>
        )}
      </div>
      <div className="mt-[8px] min-h-[15px]">
        {result && <LimitBandThumbnail result={result} width={226} height={15} />}
      </div>
    </div>
  );
}

function longestLimit({ metrics }: SessionResult): { code: LimitCode; minutes: number } {
  const held = Object.entries(metrics.limitMinutes) as [LimitCode, number][];
  const [code, minutes] = held.reduce((longest, next) => (next[1] > longest[1] ? next : longest));
  return { code, minutes };
}
