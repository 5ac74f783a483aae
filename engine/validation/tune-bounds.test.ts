import { describe, expect, test } from 'vitest';
import { simulateSession, tuneTaper, type BoundName, type SessionResult, type TuneResult } from '../src/index.ts';
import { plainVicuna, tuning } from './tune-cases.ts';

const goal = { kind: 'least-minutes', fromSoc: 0.1, toSoc: 0.8 } as const;
const station = (currentMaxA: number) => ({
  name: `Salar ${currentMaxA} A`,
  powerMaxKw: 250,
  currentMaxA,
  voltageMaxV: 920,
  rampAPerS: 60,
});
const conditions = [
  { name: 'warm', weight: 3 },
  { name: 'hot day', ambientC: 36, startTempC: 38, weight: 1 },
  { name: 'late start on a weak station', startSoc: 0.05, startTempC: 24, station: station(350), weight: 1 },
];
const bounds = {
  hottestCoreMaxC: 47.5,
  hottestSurfaceMaxC: 44,
  lowestAnodeMinMv: 25,
  highestCellMaxV: 4.11,
  inletMaxC: 60,
  stationPowerMaxKw: 185,
};

/** The column of a result that a bound is about, and its worst value. */
const READ: Record<keyof typeof bounds, (series: SessionResult['series']) => number> = {
  hottestCoreMaxC: (s) => Math.max(...s.hottestCoreC),
  hottestSurfaceMaxC: (s) => Math.max(...s.hottestSurfaceC),
  lowestAnodeMinMv: (s) => 1000 * Math.min(...s.lowestAnodeV.map(Number)),
  highestCellMaxV: (s) => Math.max(...s.highestCellV),
  inletMaxC: (s) => Math.max(...s.inletC),
  stationPowerMaxKw: (s) => Math.max(...s.stationPowerKw),
};
const LEAST = new Set<BoundName>(['lowestAnodeMinMv']);

/** Runs the proofs again, on a grid of 1 s, and holds each bound against what they show. */
function expectKept(result: TuneResult): void {
  result.proofs.forEach(({ name, result: proof }, i) => {
    const { ambientC, startSoc, startTempC } = conditions[i] as {
      ambientC?: number;
      startSoc?: number;
      startTempC?: number;
    };
    const study = plainVicuna((s) => {
      s.session = {
        ...s.session,
        ambientC: ambientC ?? s.session.ambientC,
        startSoc: startSoc ?? s.session.startSoc,
        startTempC: startTempC ?? s.session.startTempC,
      };
      s.station = conditions[i].station ?? s.station;
    });
    study.strategy = { ...study.strategy, taper: result.taper! };
    const again = simulateSession(study, { everyS: 1 }).result;
    expect(simulateSession(study).result, name).toStrictEqual(proof);
    for (const [bound, read] of Object.entries(READ)) {
      const limit = bounds[bound as keyof typeof bounds];
      const sign = LEAST.has(bound as BoundName) ? -1 : 1;
      expect(sign * (read(again.series) - limit), `${bound}, ${name}`).toBeLessThanOrEqual(1e-9);
      expect(sign * (read(proof.series) - limit), `${bound}, ${name}, proof`).toBeLessThanOrEqual(1e-9);
    }
    expect(sign(again.metrics.hottestCoreC, 47.5)).toBeLessThanOrEqual(0);
  });
}
const sign = (value: number, limit: number) => Math.sign(value - limit);

describe('three conditions at once', () => {
  const request = tuning(plainVicuna(), {
    shape: { kind: 'ledges', count: 4, leastWidthSoc: 0.04 },
    unit: 'A',
    bounds,
    goal,
    conditions,
  });
  const result = tuneTaper(request);

  test('every proof run keeps every bound, on a finer grid too, and is the ordinary run of its study', () => {
    expect(result.verdict).toBe('tuned');
    expectKept(result);
  });

  test('the goal is the weighted mean of the conditions’', () => {
    const mean = result.proofs.reduce((sum, { weight, goal: { tuned } }) => sum + weight * tuned!, 0) / 5;
    expect(result.goal.tuned!).toBeCloseTo(mean, 9);
    expect(result.goal.gained!).toBeCloseTo(result.goal.present! - result.goal.tuned!, 9);
  });

  test('some bound is met to the last decimal shown, and every part says what holds it', () => {
    const tight = result.closest.filter(({ margin, digits }) => margin < 0.5 * 10 ** -digits);
    expect(tight.length).toBeGreaterThan(0);
    expect(result.parts.map(({ fromSoc }) => fromSoc)[0]).toBe(0.05);
    for (const part of result.parts) expect(part.holds.by).not.toBe('nothing');
  });

  test('edges stand on the grid of soc, at least the width apart, and values fall', () => {
    const taper = result.taper!;
    if (taper.shape !== 'ledges') throw new Error('not ledges');
    taper.steps.forEach(({ fromSoc, value }, i) => {
      if (i === 0) return;
      expect(Number(fromSoc.toFixed(3))).toBe(fromSoc);
      expect(fromSoc - taper.steps[i - 1].fromSoc).toBeGreaterThanOrEqual(0.04 - 1e-9);
      expect(value).toBeLessThanOrEqual(taper.steps[i - 1].value);
    });
  });
});

test('the trade-off curve has six points or more, tighter is never faster, and the first is the tuned taper', () => {
  const shape = { kind: 'ledges', count: 3 } as const;
  const request = tuning(plainVicuna(), {
    shape,
    unit: 'A',
    bounds: { hottestCoreMaxC: 46, lowestAnodeMinMv: 20 },
    goal,
    tradeOff: { bound: 'lowestAnodeMinMv', steps: 7, span: 18 },
  });
  const { tradeOff, goal: found, taper } = tuneTaper(request);
  const minutes = tradeOff!.points.map((point) => point.goal!);
  expect(tradeOff!.points.map((point) => point.limit)).toEqual([20, 23, 26, 29, 32, 35, 38]);
  expect(minutes[0]).toBeCloseTo(found.tuned!, 6);
  expect(tradeOff!.points[0].taper).toEqual(taper);
  minutes.forEach((value, i) => expect(value).toBeGreaterThanOrEqual((minutes[i - 1] ?? 0) - 1e-9));
  expect(minutes.at(-1)!).toBeGreaterThan(minutes[0] + 0.5);
});
