import { describe, expect, test } from 'vitest';
import { StudyError, TuneCancelled, tuneTaper, parseTuneRequest, type TuneProgress } from '../index.ts';
import { plainVicuna, tuning } from '../../validation/tune-cases.ts';

const goal = { kind: 'least-minutes', fromSoc: 0.1, toSoc: 0.8 } as const;
const ledges = (count: number) => ({ kind: 'ledges', count }) as const;
const small = () =>
  tuning(plainVicuna(), {
    shape: ledges(2),
    unit: 'A',
    bounds: { lowestAnodeMinMv: 25 },
    goal,
    tradeOff: { steps: 6 },
  });

describe('tuneTaper', () => {
  test('the same request gives the same bytes', () => {
    expect(JSON.stringify(tuneTaper(small()))).toBe(JSON.stringify(tuneTaper(small())));
  });

  test('tells progress after every run: shares from 0 to 1 that never fall, phases in order', () => {
    const told: TuneProgress[] = [];
    const { effort } = tuneTaper(small(), { onProgress: (progress) => told.push(progress) });
    const shares = told.map(({ share }) => share);
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
    expect(shares[0]).toBeLessThan(0.05);
    expect(shares.at(-1)).toBeLessThanOrEqual(1);
    expect(shares.at(-1)).toBeGreaterThan(0.8);
    expect([...new Set(told.map(({ phase }) => phase))]).toEqual(['tuning', 'proof', 'trade-off']);
    expect(told.at(-1)!.runs).toBe(effort.runs);
  });

  test('is called off between two runs', () => {
    let runs = 0;
    const cancelled = () => tuneTaper(small(), { onProgress: () => runs++, isCancelled: () => runs >= 10 });
    expect(cancelled).toThrow(TuneCancelled);
    expect(runs).toBe(10);
  });

  test('a start above the bound is infeasible, and says which bound, where and by how much', () => {
    const study = plainVicuna((s) => (s.session.startTempC = 48));
    const result = tuneTaper(tuning(study, { shape: ledges(2), unit: 'A', bounds: { hottestCoreMaxC: 45 }, goal }));
    expect(result).toMatchObject({ verdict: 'infeasible', taper: null, parts: [], proofs: [], tradeOff: null });
    expect(result.obstacle).toMatchObject({ bound: 'hottestCoreMaxC', condition: 0, atMin: 0, value: 48, margin: -3 });
    expect(result.message).toContain('hottest core, most 45.0 °C: 48.0 °C at 0.0 min');
  });

  test('where the station holds everywhere there is nothing to gain', () => {
    const study = plainVicuna((s) => {
      s.station.currentMaxA = 100;
      s.strategy.taper = { shape: 'ledges', unit: 'A', steps: [{ fromSoc: 0, value: 500 }] };
    });
    const result = tuneTaper(tuning(study, { shape: ledges(2), unit: 'A', bounds: { lowestAnodeMinMv: 0 }, goal }));
    expect(result.verdict).toBe('nothing-to-gain');
    expect(result.message).toContain('station-current');
    expect(result.parts.every(({ holds }) => holds.by === 'limits')).toBe(true);
  });

  test('a goal that the session’s longest time does not reach is not reached', () => {
    const study = plainVicuna((s) => (s.session.maxMin = 5));
    const result = tuneTaper(tuning(study, { shape: ledges(1), unit: 'A', bounds: { lowestAnodeMinMv: 0 }, goal }));
    expect(result).toMatchObject({ verdict: 'not-reached', taper: null, obstacle: null });
  });

  test('never slower than a present taper that lies in the space and keeps the bounds', () => {
    const first = tuneTaper(small());
    const study = plainVicuna();
    study.strategy.taper = first.taper!;
    const again = tuneTaper(tuning(study, { shape: ledges(2), unit: 'A', bounds: { lowestAnodeMinMv: 25 }, goal }));
    expect(again.goal.gained!).toBeGreaterThanOrEqual(0);
    expect(again.presentPasses).toEqual([]);
  });

  test('a condition that cannot start is refused under its own path', () => {
    const weak = { name: 'x', powerMaxKw: 50, currentMaxA: 100, voltageMaxV: 250 };
    const request = tuning(plainVicuna(), {
      shape: ledges(1),
      unit: 'A',
      bounds: { lowestAnodeMinMv: 0 },
      goal,
      conditions: [{}, { name: 'low voltage', station: weak }],
    });
    const error = caught(() => tuneTaper(request));
    expect(error).toMatchObject({ code: 'REFUSED', issues: [{ path: 'tune.conditions[1].station.voltageMaxV' }] });
    expect(error.message).toContain('In low voltage: Cannot start');
  });
});

describe('parseTuneRequest', () => {
  const asked = (): Record<string, unknown> => ({
    format: 'voltiplano/tune',
    version: 1,
    study: plainVicuna(),
    shape: ledges(3),
    unit: 'A',
    bounds: { lowestAnodeMinMv: 20 },
    goal,
  });
  const study = plainVicuna();
  const cases: [string, Record<string, unknown>, string, string][] = [
    ['no bound', { bounds: {} }, 'tune.bounds', 'must hold at least one of'],
    ['an unknown bound', { bounds: { coreMaxC: 40 } }, 'tune.bounds.coreMaxC', 'is not a field'],
    ['no shape', { shape: { kind: 'map' } }, 'tune.shape.kind', 'must be "ledges" or "slope", but is "map"'],
    ['too many ledges', { shape: ledges(40) }, 'tune.shape.count', 'must be at most 16, but is 40'],
    [
      'ledges too wide',
      { shape: { ...ledges(8), leastWidthSoc: 0.2 } },
      'tune.shape.leastWidthSoc',
      'must let 8 ledges fit between soc 0.1 and 0.8, but is 0.2',
    ],
    [
      'a goal that falls',
      { goal: { ...goal, toSoc: 0.1 } },
      'tune.goal.toSoc',
      'must lie above fromSoc (0.1), but is 0.1',
    ],
    [
      'a goal past the target',
      { goal: { ...goal, toSoc: 0.9 } },
      'tune.goal.toSoc',
      'must not pass study.session.targetSoc (0.8)',
    ],
    [
      'a start past the goal',
      { conditions: [{ startSoc: 0.2 }] },
      'tune.conditions[0].startSoc',
      'must not pass goal.fromSoc (0.1)',
    ],
    [
      'a trade-off of no bound',
      { tradeOff: { bound: 'inletMaxC' } },
      'tune.tradeOff.bound',
      'must name one of the bounds given',
    ],
    ['too few points', { tradeOff: { steps: 3 } }, 'tune.tradeOff.steps', 'must be at least 6, but is 3'],
    [
      'a fault in the study',
      { study: { ...study, pack: { ...study.pack, series: -1 } } },
      'tune.study.pack.series',
      '-1',
    ],
    ['another file', { format: 'voltiplano/study' }, 'tune.format', 'Not a tuning'],
  ];
  test.each(cases)('%s: path, rule and value', (_, change, path, words) => {
    const error = caught(() => parseTuneRequest({ ...asked(), ...change }));
    expect(error.issues.map((issue) => issue.path)).toContain(path);
    expect(error.message).toContain(words);
  });

  test('an anode bound needs an anode', () => {
    const { anode: _, ...cell } = study.cell;
    const error = caught(() => parseTuneRequest({ ...asked(), study: { ...study, cell } }));
    expect(error.issues[0]).toMatchObject({ path: 'tune.bounds.lowestAnodeMinMv', rule: 'needs-anode' });
  });
});

function caught(work: () => unknown): StudyError {
  try {
    work();
  } catch (error) {
    if (error instanceof StudyError) return error;
    throw error;
  }
  throw new Error('did not throw');
}
