import { describe, expect, it } from 'vitest';
import { dimensionLine } from './dimension-lines.ts';

const LABEL = '10–80 %  57.8 min';

describe('dimensionLine', () => {
  it('writes its label in the middle where it fits', () => {
    expect(dimensionLine(LABEL, 100, 500, 0, 800)).toMatchObject({ labelX: 300, ends: [100, 500] });
  });
  it('writes beside itself where it does not, to the right, or to the left at the right end', () => {
    expect(dimensionLine(LABEL, 100, 150, 0, 800)!.labelX).toBeGreaterThan(150);
    expect(dimensionLine(LABEL, 700, 750, 0, 800)!.labelX).toBeLessThan(700);
  });
  it('loses the ends that a zoom leaves outside', () => {
    const line = dimensionLine(LABEL, -300, 500, 0, 800)!;
    expect(line.from).toBe(0);
    expect(line.ends).toEqual([500]);
  });
  it('is not drawn where all of it lies outside', () => expect(dimensionLine(LABEL, -300, -20, 0, 800)).toBeNull());
});
