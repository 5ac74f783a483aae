import { describe, expect, test } from 'vitest';
import { tuneTaper, type SessionStudyInput } from '../src/index.ts';
import { bareStudy } from './studies.ts';
import { tuning } from './tune-cases.ts';

/*
 * 100 cells of 100 Ah and a constant 0.6 mΩ, no RC pairs, rest voltage 3.2 + 0.8·z, no auxiliaries: a cell bound V_b allows
 * I(z) = (V_b − 3.2 − 0.8·z)/0.0006 at every moment, whatever came before. With s = 0.8/0.0006 A, I(0) = I₀ and I(1) = I₁:
 *
 * a slope that lies on I(z) takes T = 3600·Q·∫dz/I = 3600·Q/s·ln(I₀/I₁);
 *
 * N ledges take Σ 3600·Q·Δz_k/I_k, where I_k is what is allowed at the ledge's end and Δz_k = (I_{k−1} − I_k)/s, so
 * T = 3600·Q/s·Σ(I_{k−1}/I_k − 1). The product of the ratios is I₀/I₁, and by the inequality of the means their sum is least where
 * they are equal: T = 3600·Q/s·N·((I₀/I₁)^(1/N) − 1).
 */
const Q = 100;
const linear = (change: (study: SessionStudyInput) => void = () => {}) =>
  bareStudy((s) => {
    s.cell.capacityAh = Q;
    s.cell.ocv = { x: [0, 1], y: [3.2, 4.0] };
    s.strategy.cellVoltageCeilingV = 5;
    s.session.maxMin = 120;
    change(s);
  });
const SLOPE = 0.8 / 0.0006;
const allowed = (z: number, bound = 4.2) => (bound - 3.2 - 0.8 * z) / 0.0006;
const goal = { kind: 'least-minutes', fromSoc: 0, toSoc: 1 } as const;
const minutes = (seconds: number) => seconds / 60;

describe('constant resistance, linear rest voltage', () => {
  test.each([1, 2, 3, 5, 8])(
    '%i ledges under a voltage bound take no more than 1.005 times the closed form’s least time',
    (count) => {
      const request = tuning(linear(), {
        shape: { kind: 'ledges', count },
        unit: 'A',
        bounds: { highestCellMaxV: 4.2 },
        goal,
      });
      const { goal: found, closest } = tuneTaper(request);
      const ratio = (allowed(0) / allowed(1)) ** (1 / count);
      const least = minutes(((3600 * Q) / SLOPE) * count * (ratio - 1));
      expect(found.tuned! / least).toBeGreaterThan(0.9999);
      expect(found.tuned! / least).toBeLessThan(1.005);
      expect(closest[0].margin).toBeGreaterThanOrEqual(0);
    },
  );

  test('ledges in C find the same time as in A', () => {
    const asked = { shape: { kind: 'ledges', count: 3 }, bounds: { highestCellMaxV: 4.2 }, goal } as const;
    const [inA, inC] = (['A', 'C'] as const).map((unit) => tuneTaper(tuning(linear(), { ...asked, unit })).goal.tuned!);
    expect(Math.abs(inC / inA - 1)).toBeLessThan(5e-4);
  });

  test('a slope of two points lies on the line that a voltage bound allows', () => {
    const shape = { kind: 'slope', points: 2 } as const;
    const request = tuning(linear(), { shape, unit: 'A', bounds: { highestCellMaxV: 4.2 }, goal });
    const least = minutes(((3600 * Q) / SLOPE) * Math.log(allowed(0) / allowed(1)));
    const { goal: found } = tuneTaper(request);
    expect(found.tuned! / least).toBeGreaterThan(0.9999);
    expect(found.tuned! / least).toBeLessThan(1.005);
  });

  /*
   * An anode of potential 0.6 − 0.55·z with share 0.5 and a bound of 10 mV allows I(z) = (0.59 − 0.55·z)/0.0003: 1967 A at z = 0,
   * 133 A at 1. It crosses the voltage bound's line where (1 − 0.8·z)/2 = 0.59 − 0.55·z, at z = 0.6. Three points lie on both lines:
   * T = 3600·Q·[ ln(I(0)/I(0.6))/s₁ + ln(I(0.6)/I(1))/s₂ ].
   */
  test('a slope of three points follows a voltage bound, then an anode bound', () => {
    const study = linear((s) => {
      s.cell.anode = { potential: { x: [0, 1], y: [0.6, 0.05] }, share: 0.5 };
    });
    const bounds = { highestCellMaxV: 4.2, lowestAnodeMinMv: 10 };
    const result = tuneTaper(tuning(study, { shape: { kind: 'slope', points: 3 }, unit: 'A', bounds, goal }));
    const byAnode = (z: number) => (0.59 - 0.55 * z) / 0.0003;
    const early = Math.log(allowed(0) / allowed(0.6)) / SLOPE;
    const late = Math.log(byAnode(0.6) / byAnode(1)) / (0.55 / 0.0003);
    const least = minutes(3600 * Q * (early + late));
    expect(byAnode(0.6)).toBeCloseTo(allowed(0.6), 9);
    expect(result.goal.tuned! / least).toBeGreaterThan(0.9999);
    expect(result.goal.tuned! / least).toBeLessThan(1.005);
    expect(result.parts[0].holds).toMatchObject({ by: 'bound', bound: 'highestCellMaxV' });
    expect(result.parts[2].holds).toMatchObject({ by: 'bound', bound: 'lowestAnodeMinMv' });
  });

  test('the most energy in a given time is what the line allows by then', () => {
    // On the line I(t) = I₀·exp(−s·t/(3600·Q)), and the cell stands at 4.2 V: energy is 100·4.2 V times the charge.
    const after = 6 * 60;
    const charge = ((3600 * Q) / SLOPE) * allowed(0) * (1 - Math.exp((-SLOPE * after) / (3600 * Q)));
    const most = (420 * charge) / 3.6e6;
    const request = tuning(linear(), {
      shape: { kind: 'slope', points: 2 },
      unit: 'A',
      bounds: { highestCellMaxV: 4.2 },
      goal: { kind: 'most-energy', minutes: 6 },
    });
    const { tuned } = tuneTaper(request).goal;
    expect(tuned! / most).toBeLessThan(1.0001);
    expect(tuned! / most).toBeGreaterThan(0.995);
  });
});
