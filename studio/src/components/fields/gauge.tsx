type Props = { value: number | null; usual: readonly [number, number]; min: number; max: number };

const WIDTH = 128;
/** The scale reaches beyond the usual range by this share of it, so that an unusual value is seen to be one. */
const BEYOND = 0.4;

/** The usual range as ticks and the value as a bar; words beside it say the same. */
export function Gauge({ value, usual: [low, high], min, max }: Props) {
  const from = Math.max(min, low - BEYOND * (high - low));
  const to = Math.min(max, high + BEYOND * (high - low));
  const x = (at: number) => 1.5 + ((Math.min(to, Math.max(from, at)) - from) / (to - from || 1)) * (WIDTH - 3);
  return (
    <svg className="gauge" viewBox={`0 0 ${WIDTH} 7`} preserveAspectRatio="none" aria-hidden="true">
      <path d={`M0 3.5H${WIDTH}`} stroke="var(--rule)" />
      <path
        d={`M${x(low)} .5V6.5M${x(high)} .5V6.5M${x(low)} 3.5H${x(high)}`}
        stroke="var(--edge)"
        strokeWidth="1.4"
        fill="none"
      />
      {value !== null && <path d={`M${x(value)} 0V7`} stroke="var(--ink)" strokeWidth="2.4" />}
    </svg>
  );
}
