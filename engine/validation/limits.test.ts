import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  limitCodes,
  parseSessionStudy,
  StudyError,
  type LimitCode,
  type SessionStudy,
  type SessionStudyInput,
} from '../src/index.ts';
import { SessionSystem } from '../src/session/session-system.ts';
import { boundsAt, type Bounds } from './limit-bounds.ts';
import { anyStudy, between } from './random-studies.ts';
import { bareStudy, constant, run } from './studies.ts';

/** Limits on the pack's own current, which never go below 0 A. */
const PACK_SIDE: LimitCode[] = ['pack-current', 'cell-voltage', 'taper', 'anode', 'hot', 'cold'];

const SEEDED = { seed: 20240611, numRuns: 150, unbiased: true, endOnFailure: true };

/** A run, or null where the session cannot start. */
function tryRun(study: SessionStudy) {
  try {
    return run(study, { everyS: 20 }).result;
  } catch (error) {
    if (error instanceof StudyError && error.code === 'REFUSED') return null;
    throw error;
  }
}

describe('every row of a wide set of studies', () => {
  const seen = new Set<LimitCode>();

  test('keeps every limit, and stands on the one that binds', () => {
    fc.assert(
      fc.property(anyStudy, (input) => {
        const study = parseSessionStudy(input);
        const result = tryRun(study);
        if (result === null) return;
        const { tS, limit } = result.series;
        for (const row of tS.keys()) {
          const bounds = boundsAt(study, result, row);
          for (const code of limitCodes) expectKept(code, bounds[code], row);
          // On both sides of a hand-over two limits are equal to what 1e-7 s makes of the ramp.
          const twin = tS[row] === tS[row + 1] || tS[row] === tS[row - 1];
          const binding = bounds[limit[row]]!;
          expect(Math.abs(binding.room)).toBeLessThan((twin ? 1e-4 : 1e-8) * binding.scale);
          // Only the station's side lets the pack feed the auxiliaries.
          if (PACK_SIDE.includes(limit[row])) expect(result.series.packCurrentA[row]).toBeGreaterThan(-1e-6);
          seen.add(limit[row]);
        }
      }),
      SEEDED,
    );
  });

  test('meets every code', () => {
    expect([...limitCodes].filter((code) => !seen.has(code))).toEqual([]);
  });
});

/** Room that a limit leaves, in its own unit, is not negative beyond rounding; none is asked where no current flows in. */
function expectKept(code: LimitCode, bound: Bounds[LimitCode], row: number): void {
  if (bound === null || bound.room >= -1e-9 * bound.scale) return;
  throw new Error(`${code} is passed at row ${row} by ${-bound.room} of ${bound.scale}`);
}

test('the current is the smallest of all limits at any state, under the first code that gives it', () => {
  // Half of the moments in the ramp.
  const moment = fc.oneof(between(0, 12), between(0, 3000));
  fc.assert(
    fc.property(anyStudy, moment, fc.array(between(0, 1), { minLength: 40, maxLength: 40 }), (input, t, u) => {
      let system: SessionSystem;
      try {
        system = new SessionSystem(parseSessionStudy(input));
      } catch (error) {
        expect((error as StudyError).code).toBe('REFUSED');
        return;
      }
      const { layout, cellsPerSegment } = system.pack;
      const y = system.start.slice();
      for (let i = 0; i < layout.integrals; i++)
        y[i] =
          i === 0 ? u[0] : i >= layout.rc && i < layout.loop ? 0.1 * u[i % 40] * cellsPerSegment : -20 + 80 * u[i % 40];
      system.at(t, y);
      const { charge } = system;
      const allowed = limitCodes.map((_, code) => charge.allowedBy(code, t));
      const least = Math.min(...allowed);
      for (const code of PACK_SIDE) expect(allowed[limitCodes.indexOf(code)]).toBeGreaterThanOrEqual(0);
      expect(Math.abs(charge.current - least)).toBeLessThan(1e-9 * (1 + Math.abs(least)));
      const first = allowed.findIndex((value) => value <= least + 1e-9 * (1 + Math.abs(least)));
      // Where two agree to rounding either may be named; else the first that gives the least.
      expect(allowed[charge.code] - allowed[first]).toBeLessThan(2e-9 * (1 + Math.abs(least)));
    }),
    { ...SEEDED, numRuns: 400 },
  );
});

describe('of equal limits the one listed first is named', () => {
  // 350 V behind 62.5 mΩ takes 400 A at 375 V, 150 kW, 3.75 V a cell: all of it exact in binary.
  const tied = (): SessionStudyInput => {
    const input = structuredClone(bareStudy()) as SessionStudyInput;
    input.cell.ocv = { x: [0, 0.5, 1], y: [3.5, 3.5, 3.6] };
    input.cell.r0Milliohm = 0.625;
    input.cell.capacityAh = 4000;
    input.cell.anode = { potential: { x: [0, 1], y: [0.125, 0.125] }, share: 0.5 };
    input.pack.chargeCurrentMaxA = 400;
    input.inlet = { currentMaxA: 400 };
    Object.assign(input.station, { currentMaxA: 400, powerMaxKw: 150, voltageMaxV: 375 });
    input.strategy.taper = constant(400);
    input.strategy.cellVoltageCeilingV = 3.75;
    input.strategy.anodeMarginMv = 0;
    input.strategy.coldLimit = { tempC: [0, 50], cRate: [0.1, 0.1] };
    return input;
  };
  const lift: Partial<Record<LimitCode, (s: SessionStudyInput) => void>> = {
    'station-current': (s) => (s.station.currentMaxA = 800),
    'station-power': (s) => (s.station.powerMaxKw = 800),
    'station-voltage': (s) => (s.station.voltageMaxV = 800),
    inlet: (s) => delete s.inlet,
    // The hot limit stays at 400 A: half of 800 A in the middle of its band.
    'pack-current': (s) => {
      s.pack.chargeCurrentMaxA = 800;
      s.strategy.hotDerate = { fromC: 20, toC: 30 };
    },
    'cell-voltage': (s) => (s.strategy.cellVoltageCeilingV = 9),
    taper: (s) => (s.strategy.taper = { shape: 'none' }),
    anode: (s) => delete s.strategy.anodeMarginMv,
    hot: (s) => (s.strategy.hotDerate = { fromC: 40, toC: 50 }),
  };

  test('all ten at 400 A, lifted one after another', () => {
    const input = tied();
    const named: LimitCode[] = [];
    for (const code of limitCodes) {
      if (code === 'station-ramp') continue;
      const system = new SessionSystem(parseSessionStudy(input));
      system.at(1000, system.start);
      expect(system.charge.current).toBe(400);
      named.push(limitCodes[system.charge.code]);
      lift[code]?.(input);
    }
    expect(named).toEqual(limitCodes.filter((code) => code !== 'station-ramp'));
  });

  test('at plug-in, where the ramp allows nothing, the ramp is named before the hot limit that allows nothing either', () => {
    const study = bareStudy((s) => (s.strategy.hotDerate = { fromC: 0, toC: 1 }));
    const { events, series } = run(study).result;
    expect(events.slice(0, 2).map(({ event }) => event)).toEqual(['limit:station-ramp', 'limit:hot']);
    expect(series.packCurrentA.every((current) => current === 0)).toBe(true);
  });
});
