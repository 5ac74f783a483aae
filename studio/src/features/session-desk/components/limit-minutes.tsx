import type { LimitCode, SessionResult } from '@voltiplano/engine';
import { LimitName } from '../../../charts/limit-marks.tsx';
import { limitsInOrder } from '../../../charts/limits.ts';
import { formatNumber } from '../../../lib/format.ts';

type Props = { result: SessionResult; baseline: SessionResult | null };

/** Below this a limit held for less than the figure shows. */
const SHOWN_MIN = 0.05;

/** Minutes per limit, from the station to the cell, beside the baseline's. */
export function LimitMinutes({ result, baseline }: Props) {
  const of = (run: SessionResult | null, code: LimitCode) => run?.metrics.limitMinutes[code] ?? 0;
  const held = limitsInOrder.filter((code) => of(result, code) >= SHOWN_MIN || of(baseline, code) >= SHOWN_MIN);
  return (
    <dl className="limit-minutes" aria-label="Minutes per limit">
      {held.map((code) => (
        <div key={code}>
          <dt>
            <LimitName code={code} />
          </dt>
          <dd>
            <span className="num">{formatNumber(of(result, code), 1)}</span> min
            {baseline && (
              <span className="before">
                was <span className="num">{formatNumber(of(baseline, code), 1)}</span>
              </span>
            )}
          </dd>
        </div>
      ))}
    </dl>
  );
}
