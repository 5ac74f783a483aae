import type { EnergyLedger } from '@voltiplano/engine';
import { useId, type Ref } from 'react';
import { formatNumber, formatQuantity } from '../lib/format.ts';
import { ledgerFoot, ledgerSteps, type LedgerStep } from './ledger-steps.ts';
import { Label } from './label.tsx';
import { LedgerLying } from './ledger-lying.tsx';
import { LimitPatterns } from './limit-marks.tsx';
import { linePath, type Point } from './svg-path.ts';
import { useWidth } from './use-width.ts';

type Props = {
  ledger: EnergyLedger;
  /** The drawing, for export. */
  ref?: Ref<HTMLDivElement>;
};

/** Below this width [px] the plateau lies on its side. */
const LYING_BELOW = 820;

/** Where the energy went, as a descending plateau: each loss one ledge, heights to scale above the break. */
export function LedgerFlow({ ledger, ref }: Props) {
  const [frame, width] = useWidth<HTMLDivElement>();
  const steps = ledgerSteps(ledger);
  return (
    <div ref={frame}>
      <div ref={ref} role="group" aria-label={`Energy ledger: ${inWords(steps)}`}>
        {width > 0 &&
          (width < LYING_BELOW ? (
            <LedgerLying steps={steps} width={width} />
          ) : (
            <Standing steps={steps} width={width} />
          ))}
      </div>
    </div>
  );
}

const TOP = 26;
const FOOT = 150;

function Standing({ steps, width }: { steps: LedgerStep[]; width: number }) {
  const prefix = `${useId()}-`;
  const column = width / steps.length;
  const low = ledgerFoot(steps);
  const high = Math.max(...steps.map((step) => step.to), low + 1e-6);
  const y = (kwh: number) => TOP + (FOOT - TOP - 14) * (1 - (kwh - low) / (high - low));
  const ground = steps.flatMap(({ to }, i): Point[] => [
    [i * column, y(to)],
    [(i + 1) * column, y(to)],
  ]);
  return (
    <svg className="block w-full" width={width} height={214} aria-hidden="true">
      <LimitPatterns prefix={prefix} />
      <path d={`${linePath(ground)}V${FOOT}H0Z`} fill="var(--sheet)" />
      {steps.map((step, i) => (
        <Loss key={step.name} step={step} x={i * column} width={column / 2} y={y} fill={`url(#${prefix}loss)`} />
      ))}
      <path d={linePath(ground)} fill="none" stroke="var(--ink)" strokeWidth={2} />
      <path d={breakLine(width)} fill="none" stroke="var(--paper)" strokeWidth={4} />
      <path d={breakLine(width)} fill="none" stroke="var(--edge)" strokeWidth={0.9} />
      <line x1={0} x2={width} y1={FOOT + 10} y2={FOOT + 10} stroke="var(--ink)" />
      {steps.map((step, i) => (
        <Column key={step.name} step={step} x={i * column} first={i === 0} y={y} whole={steps[0]!.kwh} />
      ))}
    </svg>
  );
}

type LossProps = { step: LedgerStep; x: number; width: number; y: (kwh: number) => number; fill: string };

/** One ledge: its height hatched, and an arrow out of the drawing where it is tall enough to matter. */
function Loss({ step, x, width, y, fill }: LossProps) {
  if (step.kind === 'level' || step.kwh <= 0) return null;
  const top = y(step.from);
  const foot = y(step.to);
  const middle = x + width / 2;
  return (
    <>
      <rect
        x={x}
        y={top}
        width={width}
        height={Math.max(0.8, foot - top)}
        fill={fill}
        stroke="var(--edge)"
        strokeWidth={0.8}
      />
      {foot - top > 3 && (
        <path d={`M${middle} ${foot}V${FOOT + 2}m-3 -5l3 5l3 -5`} fill="none" stroke="var(--edge)" strokeWidth={0.9} />
      )}
    </>
  );
}

type ColumnProps = {
  step: LedgerStep;
  x: number;
  first: boolean;
  y: (kwh: number) => number;
  whole: number;
};

function Column({ step, x, first, y, whole }: ColumnProps) {
  const level = step.kind === 'level';
  const at = x + (first ? 0 : 8);
  const amount = formatQuantity('kWh', step.kwh);
  return (
    <>
      {level && (
        <text x={x + (first ? 0 : 2)} y={y(step.to) - 8}>
          <tspan className="n" style={{ fill: 'var(--ink)', fontSize: 15, fontWeight: 500 }}>
            {amount}
          </tspan>
          <tspan dx={5}>kWh</tspan>
        </text>
      )}
      {!first && <line x1={x} x2={x} y1={FOOT + 10} y2={FOOT + 50} stroke="var(--rule)" />}
      <Label x={at} y={FOOT + 24} ink={level ? 'var(--ink)' : undefined} weight={level ? 600 : 400}>
        {step.name}
      </Label>
      <Label x={at} y={FOOT + 42} figure ink="var(--ink)">
        {formatQuantity('ledgerKwh', level ? step.kwh : -step.kwh)}
      </Label>
      <Label x={at} y={FOOT + 58} figure>
        {`${formatNumber(whole > 0 ? (Math.abs(step.kwh) / whole) * 100 : 0, 1)} %`}
      </Label>
    </>
  );
}

function breakLine(width: number): string {
  const pitch = width / 11;
  let path = `M0 ${FOOT - 8}`;
  for (let x = 0; x < width - 1; x += pitch) path += `H${x + pitch / 2 - 5}l3 -5l4 10l3 -5`;
  return `${path}H${width}`;
}

function inWords(steps: readonly LedgerStep[]): string {
  return steps.map(({ name, kwh }) => `${name} ${formatQuantity('ledgerKwh', kwh)} kWh`).join(', ');
}
