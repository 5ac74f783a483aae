import type { LimitCode } from '@voltiplano/engine';
import { memo, useId, type ReactNode } from 'react';
import { hatchTiles, limitBedEdge, limitLabel, limitOverprint, limitsInOrder, limitTint } from './limits.ts';

/** Fill of a bed whose patterns stand in the same drawing under `prefix`. */
export const limitFill = (prefix: string, code: LimitCode): string => `url(#${prefix}${code})`;

function LimitPattern({ prefix, code }: { prefix: string; code: LimitCode }) {
  const { width, height, path, circles = [], radius, filled } = hatchTiles[code];
  const ink = limitOverprint(code);
  return (
    <pattern id={prefix + code} width={width} height={height} patternUnits="userSpaceOnUse">
      <rect width={width} height={height} fill={limitTint(code)} />
      {path && <path d={path} fill="none" stroke={ink} strokeWidth={0.9} />}
      {circles.map(([x, y]) => (
        <circle key={x} cx={x} cy={y} r={radius} {...(filled ? { fill: ink } : { fill: 'none', stroke: ink })} />
      ))}
    </pattern>
  );
}

/** The eleven hatches, and the hatch of losses, for one drawing; ids are unique under `prefix`. */
export const LimitPatterns = memo(function LimitPatterns({ prefix }: { prefix: string }) {
  return (
    <defs>
      {limitsInOrder.map((code) => (
        <LimitPattern key={code} prefix={prefix} code={code} />
      ))}
      <pattern id={`${prefix}loss`} width={5} height={5} patternUnits="userSpaceOnUse">
        <path d="M-1 6L6 -1M-1 1L1 -1M4 6L6 4" stroke="var(--edge)" strokeWidth={0.9} />
      </pattern>
    </defs>
  );
});

type SwatchProps = { code: LimitCode; w?: number; h?: number };

/** A piece of a limit's bed, to stand before its name. */
export const LimitSwatch = memo(function LimitSwatch({ code, w = 20, h = 12 }: SwatchProps) {
  const prefix = `${useId()}-`;
  return (
    <span className="sw" style={{ width: w, height: h }}>
      <svg width={w} height={h} aria-hidden="true">
        <defs>
          <LimitPattern prefix={prefix} code={code} />
        </defs>
        <rect x={0.5} y={0.5} width={w - 1} height={h - 1} fill={limitFill(prefix, code)} stroke={limitBedEdge(code)} />
      </svg>
    </span>
  );
});

type NameProps = {
  code: LimitCode;
  /** Other words than the plain label, such as "the taper". */
  children?: ReactNode;
};

export function LimitName({ code, children }: NameProps) {
  return (
    <span className="lim">
      <LimitSwatch code={code} />
      {children ?? limitLabel(code)}
    </span>
  );
}
