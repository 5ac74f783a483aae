import type { LimitCode } from '@voltiplano/engine';
import { LimitSwatch } from '../../../charts/limit-marks.tsx';
import { formatNumber } from '../../../lib/format.ts';
import { useRun } from '../hooks/run-context.ts';

/** Beside an input that sets a limit: the limit's swatch, and for how long it held the session. */
export function HeldNote({ code }: { code: LimitCode }) {
  const words = useRun(({ answer, study }) =>
    answer ? heldText(code, answer.result.metrics, study?.strategy.anodeMarginMv) : '\u00a0',
  );
  return (
    <span className="held">
      <LimitSwatch code={code} />
      <span>{words}</span>
    </span>
  );
}

type Metrics = { limitMinutes: Record<LimitCode, number>; lowestAnodeMv: number | null };

function heldText(code: LimitCode, { limitMinutes, lowestAnodeMv }: Metrics, marginMv: number | undefined): string {
  const minutes = limitMinutes[code];
  if (minutes >= 0.05) return `held ${formatNumber(minutes, 1)} min`;
  if (minutes > 0) return 'held for a moment';
  const spareMv = code === 'anode' && marginMv !== undefined && lowestAnodeMv !== null ? lowestAnodeMv - marginMv : 0;
  return spareMv > 0 ? `not reached, ${formatNumber(spareMv, 0)} mV to spare` : 'not reached';
}
