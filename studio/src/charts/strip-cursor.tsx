import { valueAt, type RowPlace } from './rows.ts';
import type { StripColumns } from './strip-columns.ts';
import type { StripLayout } from './strip-layout.ts';
import { Label } from './label.tsx';

type Props = {
  layout: StripLayout;
  live: StripColumns;
  place: RowPlace;
  /** Where the cursor stands [px]. */
  x: number;
  /** Said at the cursor's head while a newer run is under way. */
  working: boolean;
};

/** The clay line through all strips, with a ring on each line it crosses. */
export function StripCursor({ layout, live, place, x, working }: Props) {
  const { strips, plotTop, bandTop, bandHeight, rowsTop, size } = layout;
  const runs =
    size === 'phone'
      ? [...strips.map((strip) => [strip.top, strip.top + strip.height] as const), [bandTop, rowsTop] as const]
      : [[plotTop - 2, rowsTop] as const];
  return (
    <>
      {runs.map(([from, to]) => (
        <line key={from} x1={x} x2={x} y1={from} y2={to} stroke="var(--clay)" strokeWidth={1.2} />
      ))}
      {strips.flatMap((strip) =>
        strip.spec.lines
          .filter((line) => !line.wideOnly)
          .map((line) => {
            const value = valueAt(live[line.column], place);
            if (value === null || value < strip.range[0] || value > strip.range[1]) return null;
            return (
              <circle
                key={line.column}
                cx={x}
                cy={strip.y(value)}
                r={3}
                fill="var(--paper)"
                stroke={`var(${line.ink})`}
                strokeWidth={1.6}
              />
            );
          }),
      )}
      {working && (
        <Label x={x + 8} y={bandTop + bandHeight + 26} halo ink="var(--clay)" weight={600}>
          working
        </Label>
      )}
    </>
  );
}
