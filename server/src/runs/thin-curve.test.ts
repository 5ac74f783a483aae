import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type CurvePoint, thinCurve } from './thin-curve.ts';

/** A curve of a point each minute, as the function has it. */
const curveOf = (length: number, valueAt: (min: number) => number): CurvePoint[] =>
  Array.from({ length }, (_none, min) => [min, valueAt(min)]);

describe('thinCurve', () => {
  it('leaves a curve that is short enough as it is', () => {
    const curve = curveOf(10, (min) => min ** 2);
    expect(thinCurve(curve, 10)).toEqual(curve);
  });

  it('takes a straight line down to its ends and its peak', () => {
    const line = curveOf(101, (min) => 5 - min / 100);
    expect(thinCurve(line, 10)).toEqual([line[0], line[100]]);
  });

  it('keeps both sides of each step, so that it is drawn upright', () => {
    const ledges = curveOf(300, (min) => 200 - min / 10).flatMap(([min, kw]): CurvePoint[] =>
      min % 50 === 0 && min > 0
        ? [
            [min, kw - 20 * (min / 50 - 1)],
            [min, kw - (20 * min) / 50],
          ]
        : [[min, kw - 20 * Math.floor(min / 50)]],
    );
    const thin = thinCurve(ledges, 20);
    for (const min of [50, 100, 150, 200, 250]) expect(thin.filter(([at]) => at === min)).toHaveLength(2);
    expect(thin.length).toBeLessThanOrEqual(20);
  });

  it('stays within a hundredth of a bend that it draws with a tenth of the points', () => {
    const bend = curveOf(1000, (min) => 100 * Math.exp(-min / 200));
    const thin = thinCurve(bend, 96);
    const off = bend.map(([min, kw]) => Math.abs(kw - heightAt(thin, min)));
    expect(Math.max(...off)).toBeLessThan(1);
  });

  it('keeps order, ends and peak of whatever curve, and no more points than asked for', () => {
    const steps = fc.array(fc.tuple(fc.constantFrom(0, 1, 1, 1), fc.double({ min: -500, max: 500, noNaN: true })), {
      minLength: 1,
      maxLength: 400,
    });
    fc.assert(
      fc.property(steps, fc.integer({ min: 8, max: 96 }), (moves, most) => {
        let at = 0;
        const curve = moves.map(([wait, kw]): CurvePoint => [(at += wait), kw]);
        const thin = thinCurve(curve, most);
        expect(thin.length).toBeLessThanOrEqual(Math.max(most, 1));
        expect(thin[0]).toEqual(curve[0]);
        expect(thin.at(-1)).toEqual(curve.at(-1));
        expect(Math.max(...thin.map(([, kw]) => kw))).toBe(Math.max(...curve.map(([, kw]) => kw)));
        let row = -1;
        for (const point of thin) expect((row = curve.indexOf(point, row + 1))).toBeGreaterThanOrEqual(0);
      }),
    );
  });
});

/** Height of a drawn curve at a minute that it covers. */
function heightAt(drawn: CurvePoint[], min: number): number {
  const to = drawn.findIndex(([at]) => at >= min);
  const [[t0, y0], [t1, y1]] = [drawn[Math.max(0, to - 1)]!, drawn[to]!];
  return t1 === t0 ? y1 : y0 + ((y1 - y0) * (min - t0)) / (t1 - t0);
}
