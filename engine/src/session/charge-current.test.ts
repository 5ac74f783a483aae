import { describe, expect, test } from 'vitest';
import { bareStudy, constant } from '../../validation/studies.ts';
import type { SessionStudyInput } from '../study/schema.ts';
import { LIMIT } from './charge-current.ts';
import { limitCodes, type LimitCode } from './limits.ts';
import { SessionSystem } from './session-system.ts';

/** A system of 350 V and 60 mΩ at rest, without auxiliaries unless asked for, looked at `tS` after plug-in. */
function looked(change: (study: SessionStudyInput) => void, tS = 100, states: (y: number[]) => void = () => {}) {
  const system = new SessionSystem(bareStudy(change));
  const y = system.start.slice();
  states(y);
  system.at(tS, y);
  const { charge, pack } = system;
  return {
    charge,
    code: limitCodes[charge.code],
    allowed: (code: LimitCode) => charge.allowedBy(LIMIT[code], tS),
    y,
    pack,
  };
}

describe('ChargeCurrent.allowedBy', () => {
  test('station-current: I_d ≤ currentMaxA, less what the auxiliaries take at the pack’s voltage', () => {
    const { allowed, charge, code } = looked((s) => {
      s.station.currentMaxA = 400;
      s.session.hotelW = 3000;
    });
    const I = allowed('station-current');
    expect((350 + 0.06 * I) * (400 - I)).toBeCloseTo(3000, 6);
    expect([charge.current, charge.stationCurrent, code]).toEqual([I, 400, 'station-current']);
  });

  test('station-power: V_d·I_d behind an inlet of 1 mΩ', () => {
    const { allowed, charge, code } = looked((s) => {
      s.station.powerMaxKw = 150;
      s.inlet = { resistanceMilliohm: 1 };
    });
    const I = allowed('station-power');
    expect((350 + 0.061 * I) * I).toBeCloseTo(150_000, 5);
    expect(charge.stationVoltage * charge.stationCurrent).toBeCloseTo(150_000, 5);
    expect(code).toBe('station-power');
  });

  test('station-voltage: V + I_d·R_i ≤ voltageMaxV', () => {
    const { allowed, charge, code } = looked((s) => {
      s.station.voltageMaxV = 380;
      s.inlet = { resistanceMilliohm: 15 };
    });
    expect(allowed('station-voltage')).toBeCloseTo(30 / 0.075, 9);
    expect(charge.stationVoltage).toBeCloseTo(380, 9);
    expect(code).toBe('station-voltage');
  });

  test('station-ramp: rampAPerS·t; at plug-in the pack feeds the auxiliaries', () => {
    const ramp = (s: SessionStudyInput) => {
      s.station.rampAPerS = 20;
      s.session.hotelW = 3500;
    };
    expect(looked(ramp, 7).charge.stationCurrent).toBeCloseTo(140, 9);
    const { charge, code } = looked(ramp, 0);
    expect([charge.stationCurrent, code]).toEqual([0, 'station-ramp']);
    expect((350 + 0.06 * charge.current) * -charge.current).toBeCloseTo(3500, 6);
  });

  test.each([
    [70, 400],
    [75, 400],
    [81, 240],
    [90, 0],
    [100, 0],
  ])('inlet at %s °C allows %s A between 75 and 90 °C of derating', (inletC, amperes) => {
    const { allowed, charge } = looked(
      (s) => (s.inlet = { currentMaxA: 400 }),
      100,
      (y) => (y[y.length - 15] = inletC),
    );
    expect(allowed('inlet')).toBeCloseTo(amperes, 9);
    expect(charge.current).toBeCloseTo(amperes, 9);
  });

  test('inlet without currentMaxA: no limit, however warm', () => {
    const { allowed } = looked(
      (s) => (s.inlet = {}),
      100,
      (y) => (y[y.length - 15] = 120),
    );
    expect(allowed('inlet')).toBe(Infinity);
  });

  test('cell-voltage: the tightest segment’s (n·ceiling − U − Σv)/R0, never below 0', () => {
    const ceiling = (v: number) =>
      looked(
        (s) => {
          s.pack.segments = 2;
          s.cell.rcPairs = [{ rMilliohm: 0.5, tauS: 20 }];
          s.strategy.cellVoltageCeilingV = 4.1;
        },
        100,
        // Segments of 50 cells and 30 mΩ; the second stands 5 V higher by its RC pair.
        (y) => (y[4] = v),
      );
    const { allowed, code } = ceiling(5);
    expect(allowed('cell-voltage')).toBeCloseTo((50 * 4.1 - 175 - 5) / 0.03, 6);
    expect(code).toBe('cell-voltage');
    expect(ceiling(60).allowed('cell-voltage')).toBe(0);
  });

  test.each([
    ['A', 300, 300],
    ['C', 0.05, 250],
    ['kW', 150, 401.00487],
  ] as const)('taper in %s: %s is %s A (Q = 5000 Ah; kW is V·I at the pack’s terminals)', (unit, value, amperes) => {
    const { allowed, code } = looked((s) => (s.strategy.taper = constant(value, unit)));
    expect(allowed('taper')).toBeCloseTo(amperes, 4);
    expect(code).toBe('taper');
  });

  test('anode: [n(φ_ocp − margin)/share − Σv]/R0; a share of 0 sets no limit', () => {
    const guarded = (share: number) =>
      looked(
        (s) => {
          s.cell.anode = { potential: { x: [0, 1], y: [0.09, 0.09] }, share };
          s.cell.rcPairs = [{ rMilliohm: 0.5, tauS: 20 }];
          s.strategy.anodeMarginMv = 10;
        },
        100,
        (y) => (y[2] = 4),
      );
    const { allowed, charge, pack, code } = guarded(0.5);
    expect(allowed('anode')).toBeCloseTo((100 * 0.08) / 0.5 / 0.06 - 4 / 0.06, 6);
    expect(pack.lowestAnodeV(charge.current)).toBeCloseTo(0.01, 12);
    expect(code).toBe('anode');
    expect(guarded(0).allowed('anode')).toBe(Infinity);
  });

  test('hot reads the hottest surface, cold the coldest, in one state', () => {
    const { allowed } = looked(
      (s) => {
        s.pack.segments = 2;
        s.pack.chargeCurrentMaxA = 500;
        s.strategy.hotDerate = { fromC: 45, toC: 55 };
        s.strategy.coldLimit = { tempC: [0, 20], cRate: [0.02, 0.1] };
      },
      100,
      (y) => y.splice(1, 2, 47, 5),
    );
    expect(allowed('hot')).toBeCloseTo(400, 9);
    expect(allowed('cold')).toBeCloseTo(0.04 * 5000, 9);
  });
});

describe('ChargeCurrent boosted: a 400-V-class station under an 800-V-class pack', () => {
  const boosted = (change: (s: SessionStudyInput) => void) =>
    looked((s) => {
      s.pack.series = 200;
      s.station.voltageMaxV = 500;
      s.inlet = { resistanceMilliohm: 2 };
      s.boost = { powerMaxKw: 150, efficiency: 0.96 };
      s.session.hotelW = 2000;
      change(s);
    });

  test('the converter’s own power binds as station-power: V·I + P_aux = boost.powerMaxKw', () => {
    const { charge, code } = boosted(() => {});
    const I = charge.current;
    expect((700 + 0.12 * I) * I + 2000).toBeCloseTo(150_000, 5);
    const input = 150_000 / 0.96;
    expect((500 - 0.002 * charge.stationCurrent) * charge.stationCurrent).toBeCloseTo(input, 5);
    expect(charge.boostLossW).toBeCloseTo(0.04 * input, 5);
    expect([charge.stationVoltage, code]).toEqual([500, 'station-power']);
  });

  test('the station’s current binds on its own side', () => {
    const { charge, code } = boosted((s) => (s.station.currentMaxA = 200));
    expect(charge.stationCurrent).toBe(200);
    const I = charge.current;
    expect((700 + 0.12 * I) * I + 2000).toBeCloseTo(0.96 * (500 - 0.4) * 200, 5);
    expect(code).toBe('station-current');
  });

  test('the station’s power is voltageMaxV·I_d; its voltage is no limit', () => {
    const { charge, code, allowed } = boosted((s) => (s.station.powerMaxKw = 100));
    expect(charge.stationCurrent).toBeCloseTo(200, 6);
    expect(code).toBe('station-power');
    expect(allowed('station-voltage')).toBe(Infinity);
  });
});

test('ChargeCurrent.decide names the first listed of limits that allow the same', () => {
  const { code, charge } = looked((s) => {
    s.station.currentMaxA = 400;
    s.pack.chargeCurrentMaxA = 400;
    s.inlet = { currentMaxA: 400 };
    s.strategy.taper = constant(400);
  });
  expect([code, charge.current]).toEqual(['station-current', 400]);
});

test('ChargeCurrent.follow stands on one limit alone, past the others', () => {
  const { charge } = looked((s) => {
    s.pack.chargeCurrentMaxA = 300;
    s.strategy.taper = constant(350);
  });
  expect(charge.current).toBe(300);
  charge.follow(LIMIT.taper, 100);
  expect([charge.current, limitCodes[charge.code]]).toEqual([350, 'taper']);
});
