import { describe, expect, it } from 'vitest';
import { tracePath, type TraceFrame } from './trace-path.ts';

const frame: TraceFrame = { xRange: [0, 10], yRange: [100, 200], width: 500, height: 80 };

describe('tracePath', () => {
  it('counts pixels from the top left, to a hundredth', () => {
    expect(tracePath([0, 3, 10], [100, 133.3333, 200], frame)).toBe('M0,80L150,53.33L500,0');
  });
  it('draws every row, also those that stand on one spot or outside the strip', () => {
    expect(tracePath([5, 5, 12], [150, 150, 250], frame)).toBe('M250,40L250,40L600,-40');
  });
  it('leaves lines to Plotly that it would break or cut off', () => {
    expect(tracePath([0, 5, 10], [100, null, 200], frame)).toBeNull();
    expect(tracePath([0, 5], [100, 100 + 22 * 100], frame)).toBeNull();
    expect(tracePath([0, 10 * 22], [100, 100], frame)).toBeNull();
    expect(tracePath([], [], frame)).toBeNull();
  });
});
