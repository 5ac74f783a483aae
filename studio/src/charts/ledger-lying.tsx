import { useId } from 'react';
import { formatQuantity } from '../lib/format.ts';
import { Label } from './label.tsx';
import { ledgerFoot, type LedgerStep } from './ledger-steps.ts';
import { LimitPatterns } from './limit-marks.tsx';

type Props = { steps: LedgerStep[]; width: number };

const NAMES = 104;
const FIGURES = 70;
const ROW = 26;

/** The plateau on its side, one row per step, for narrow sheets. */
export function LedgerLying({ steps, width }: Props) {
  const prefix = `${useId()}-`;
  const low = ledgerFoot(steps);
  const high = Math.max(...steps.map((step) => step.to), low + 1e-6);
  const x = (kwh: number) => NAMES + ((kwh - low) / (high - low)) * (width - NAMES - FIGURES);
  const whole = ROW * steps.length;
  return (
    <svg className="block w-full" width={width} height={whole + 2} aria-hidden="true">
      <LimitPatterns prefix={prefix} />
      {steps.map((step, i) => (
        <Row key={step.name} step={step} top={i * ROW} width={width} x={x} fill={`url(#${prefix}loss)`} />
      ))}
      <path
        d={`M${NAMES + 6} 0v${ROW * 5}l-4 3l8 4l-4 3V${whole}`}
        fill="none"
        stroke="var(--edge)"
        strokeWidth={0.9}
      />
    </svg>
  );
}

type RowProps = { step: LedgerStep; top: number; width: number; x: (kwh: number) => number; fill: string };

function Row({ step, top, width, x, fill }: RowProps) {
  const level = step.kind === 'level';
  const end = x(step.to);
  const start = Math.min(x(step.from), end);
  return (
    <>
      <rect x={NAMES} y={top} width={Math.max(0, end - NAMES)} height={ROW} fill="var(--sheet)" />
      {!level && (
        <rect
          x={start}
          y={top + 1}
          width={Math.max(1, Math.abs(x(step.from) - end))}
          height={ROW - 2}
          fill={fill}
          stroke="var(--edge)"
          strokeWidth={0.8}
        />
      )}
      <line x1={end} x2={end} y1={top} y2={top + ROW} stroke="var(--ink)" strokeWidth={2} />
      <line x1={0} x2={width} y1={top + ROW} y2={top + ROW} stroke="var(--rule)" strokeWidth={0.8} />
      <Label x={0} y={top + 17} ink={level ? 'var(--ink)' : undefined} weight={level ? 600 : 400}>
        {step.name}
      </Label>
      <Label x={width} y={top + 17} anchor="end" figure ink="var(--ink)">
        {formatQuantity('ledgerKwh', level ? step.kwh : -step.kwh)}
      </Label>
    </>
  );
}
