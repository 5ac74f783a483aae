import type { SessionResult } from '@voltiplano/engine';
import { Fragment } from 'react';
import { Label } from '../../../charts/label.tsx';
import { linePath } from '../../../charts/svg-path.ts';
import { rangeFromZero, ticks } from '../../../charts/ticks.ts';
import { useWidth } from '../../../charts/use-width.ts';
import { differenceInWords } from '../../../components/headline-difference.ts';
import { decimals } from '../../../lib/format.ts';
import { useUnits } from '../../../lib/units.ts';

type Props = { live: SessionResult | null; baseline: SessionResult | null };

const HEIGHT = 96;
const GUTTER = 58;

/** Two runs over one axis: the baseline in grey, the live one in ink, and the difference in words. */
export function BaselineOverlay({ live, baseline }: Props) {
  const [ref, width] = useWidth<HTMLDivElement>();
  const words = useDifference(live, baseline);
  return (
    <div ref={ref} role="group" aria-label={`Power of two runs: ${words}`}>
      {width > 0 && live && baseline && <Curves live={live} baseline={baseline} width={width} words={words} />}
    </div>
  );
}

function useDifference(live: SessionResult | null, baseline: SessionResult | null): string {
  const units = useUnits();
  if (!live || !baseline) return 'being computed';
  const [a, b] = [live.metrics, baseline.metrics];
  const slower = differenceInWords(a.minutes10To80, b.minutes10To80, decimals.min, 'duration');
  const warmer = differenceInWords(
    units.temperature(a.hottestCoreC),
    units.temperature(b.hottestCoreC),
    decimals.temperature,
    'temperature',
  );
  const part = (difference: string | null, unit: string) => difference?.replace(' ', ` ${unit} `) ?? '';
  return `${part(slower, 'min')}, ${part(warmer, units.temperatureUnit)}`;
}

type CurvesProps = { live: SessionResult; baseline: SessionResult; width: number; words: string };

function Curves({ live, baseline, width, words }: CurvesProps) {
  const endMin = Math.max(live.metrics.endMin, baseline.metrics.endMin);
  const peak = Math.max(live.metrics.peakStationPowerKw, baseline.metrics.peakStationPowerKw);
  const [, top] = rangeFromZero(peak, 2);
  const x = (minute: number) => GUTTER + ((width - GUTTER - 2) * minute) / endMin;
  const y = (kw: number) => HEIGHT - ((HEIGHT - 2) * kw) / top;
  const curve = ({ series }: SessionResult) =>
    linePath(series.tS.map((t, i) => [x(t / 60), y(series.stationPowerKw[i]!)]));
  return (
    <svg className="block" width={width} height={HEIGHT + 34} aria-hidden="true">
      {ticks(1, top, 3).map((kw) => (
        <Fragment key={kw}>
          <line x1={GUTTER} x2={width} y1={y(kw)} y2={y(kw)} stroke="var(--rule)" strokeWidth={0.8} />
          <Label x={GUTTER - 8} y={y(kw) + 4} anchor="end" figure>
            {`${kw} kW`}
          </Label>
        </Fragment>
      ))}
      <path d={curve(baseline)} fill="none" stroke="var(--base)" strokeWidth={1.6} />
      <path d={curve(live)} fill="none" stroke="var(--ink)" strokeWidth={2.1} strokeLinejoin="round" />
      <line x1={GUTTER} x2={width} y1={HEIGHT} y2={HEIGHT} stroke="var(--ink)" />
      <Label x={width - 2} y={18} anchor="end" ink="var(--ink)" weight={600} halo>
        {words}
      </Label>
      {ticks(0, endMin, 4).map((minute) => (
        <Fragment key={minute}>
          <line x1={x(minute)} x2={x(minute)} y1={HEIGHT} y2={HEIGHT + 5} stroke="var(--ink)" />
          <Label x={x(minute)} y={HEIGHT + 20} anchor={minute === 0 ? 'start' : 'middle'} figure>
            {minute === 0 ? '0 min' : minute}
          </Label>
        </Fragment>
      ))}
    </svg>
  );
}
