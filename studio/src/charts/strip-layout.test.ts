import { describe, expect, it } from 'vitest';
import { unitsOf } from '../lib/units.ts';
import { stripLayout } from './strip-layout.ts';
import { stripSpecs } from './strip-specs.ts';

const strips = stripSpecs(unitsOf({ temperature: '°C', distance: 'km' })).map((spec) => ({
  spec,
  range: [0, 100] as [number, number],
}));

describe('stripLayout', () => {
  it.each([360, 700, 1020])('stacks without overlap at %i px', (width) => {
    const layout = stripLayout(width, strips);
    layout.strips.forEach((strip, i) => {
      const next = layout.strips[i + 1];
      if (next) expect(strip.top + strip.height).toBeLessThan(next.top);
    });
    expect(layout.bandTop).toBeGreaterThan(layout.plotBottom);
    expect(layout.rowsTop).toBeGreaterThan(layout.bandTop + layout.bandHeight);
    expect(layout.left).toBeLessThan(layout.right);
  });
  it('maps the range onto the plot area', () => {
    const [power] = stripLayout(1020, strips).strips;
    expect(power!.y(0)).toBe(power!.top + power!.height);
    expect(power!.y(100)).toBe(power!.top);
  });
  it('grows shorter when a strip is hidden', () => {
    expect(stripLayout(1020, strips.slice(1)).height).toBeLessThan(stripLayout(1020, strips).height);
  });
});
