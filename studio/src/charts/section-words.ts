import type { LimitCode } from '@voltiplano/engine';
import { formatQuantity } from '../lib/format.ts';
import { limitLabel } from './limits.ts';
import type { PowerSection } from './section-shape.ts';

/** "Power over 92.4 min, 118.0 kW at most. Held by taper 42.8 min, hot limit 28.2 min", longest first. */
export function sectionWords({ endMin, points, limits }: PowerSection): string {
  const most = points.reduce((peak, [, kw]) => Math.max(peak, kw), 0);
  const curve = `Power over ${formatQuantity('min', endMin)} min, ${formatQuantity('kW', most)} kW at most`;
  const minutes = new Map<LimitCode, number>();
  for (const { limit, fromMin, toMin } of limits) minutes.set(limit, (minutes.get(limit) ?? 0) + toMin - fromMin);
  const held = [...minutes].sort(([, a], [, b]) => b - a);
  if (held.length === 0) return curve;
  return `${curve}. Held by ${held.map(([code, held]) => `${limitLabel(code)} ${formatQuantity('min', held)} min`).join(', ')}`;
}
