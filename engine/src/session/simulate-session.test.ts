import { describe, expect, test } from 'vitest';
import { bareStudy, constant, exampleStudies } from '../../validation/studies.ts';
import type { SessionStudyInput } from '../study/schema.ts';
import { simulateSession, type SessionOptions } from './simulate-session.ts';

/** 100 Ah at constant currents, 350 V at rest, no ramp to speak of. */
const run = (change: (study: SessionStudyInput) => void, options: SessionOptions = {}) =>
  simulateSession(
    bareStudy((s) => {
      s.cell.capacityAh = 100;
      s.session.maxMin = 300;
      change(s);
    }),
    options,
  ).result;

const ledges = (...steps: [number, number][]): SessionStudyInput['strategy']['taper'] => ({
  shape: 'ledges',
  unit: 'A',
  steps: steps.map(([fromSoc, value]) => ({ fromSoc, value })),
});
const rowsAt = (series: { tS: number[] }, tS: number) => series.tS.filter((t) => t === tS).length;
const named = (result: { events: { event: string }[] }, kind: string) =>
  result.events.map(({ event }) => event).filter((event) => event.startsWith(kind));

describe('simulateSession at ledges', () => {
  test('stops exactly on an edge: soc within 1e-9, both currents at one moment', () => {
    const { events, series } = run((s) => (s.strategy.taper = ledges([0, 200], [1 / 3, 90], [0.77, 40])));
    for (const [name, soc, from, to] of [
      ['ledge:2', 1 / 3, 200, 90],
      ['ledge:3', 0.77, 90, 40],
    ] as const) {
      const { tS } = events.find(({ event }) => event === name)!;
      const row = series.tS.indexOf(tS);
      expect(rowsAt(series, tS)).toBe(2);
      // 200 A move 5.6e-4 of 100 Ah a second, and moments are found to 1e-7 s.
      expect(Math.abs(series.soc[row] - soc)).toBeLessThan(1e-10);
      expect(series.packCurrentA.slice(row, row + 2)).toEqual([expect.closeTo(from, 9), expect.closeTo(to, 9)]);
    }
  });

  test('a start on an edge stands on the ledge above it, with no event for it', () => {
    const result = run((s) => {
      s.strategy.taper = ledges([0, 200], [0.4, 90]);
      s.session.startSoc = 0.4;
    });
    expect(named(result, 'ledge')).toEqual([]);
    expect(result.series.packCurrentA[1]).toBeCloseTo(90, 9);
  });

  test('the dip at plug-in does not leave the ledge it starts on; a longer one does, and comes back', () => {
    const start = (rampAPerS: number) =>
      run((s) => {
        s.strategy.taper = ledges([0, 200], [0.4, 90]);
        s.session.startSoc = 0.4;
        s.station.rampAPerS = rampAPerS;
        s.session.hotelW = 7000;
      });
    // 20 A of auxiliaries against a ramp of r draw 200/r As: on 2000 A/s 2.8e-7 of 100 Ah, on 5 A/s 1.1e-4, above the 1e-6
    // allowed below an edge, and 20·t − 2.5·t² is back at 0 after 8 s.
    expect(named(start(2000), 'ledge')).toEqual([]);
    const slow = start(5);
    expect(named(slow, 'ledge')).toEqual(['ledge:1', 'ledge:2']);
    const [left, back] = slow.events.filter(({ event }) => event.startsWith('ledge')).map(({ tS }) => tS);
    expect(left).toBeCloseTo(0.36 / 20, 3);
    expect(back).toBeCloseTo(8, 1);
  });

  test('a ledge that changes nothing is an event without rows', () => {
    const result = run((s) => {
      s.strategy.taper = ledges([0, 300], [0.45, 200]);
      s.pack.chargeCurrentMaxA = 100;
    });
    const { tS } = result.events.find(({ event }) => event === 'ledge:2')!;
    expect(rowsAt(result.series, tS)).toBe(0);
    expect(named(result, 'limit')).toEqual(['limit:station-ramp', 'limit:pack-current']);
  });
});

describe('simulateSession at voltage-ledges', () => {
  test('moves chain at once where the first step’s voltage has passed already at plug-in', () => {
    const result = run((s) => {
      s.cell.ocv = { x: [0, 1], y: [3.4, 4.2] };
      s.session.startSoc = 0.5;
      s.strategy.taper = {
        shape: 'voltage-ledges',
        unit: 'A',
        steps: [{ untilCellV: 3.6, value: 200 }, { untilCellV: 3.7, value: 150 }, { value: 50 }],
      };
    });
    expect(result.events.filter(({ event }) => event.startsWith('ledge'))).toEqual([
      { tS: 0, event: 'ledge:2' },
      { tS: 0, event: 'ledge:3' },
    ]);
    expect(rowsAt(result.series, 0)).toBe(1);
  });

  test('never moves back, though the voltage falls with the current', () => {
    const result = run((s) => {
      s.cell.ocv = { x: [0, 1], y: [3.4, 4.2] };
      s.cell.r0Milliohm = 1;
      s.strategy.taper = {
        shape: 'voltage-ledges',
        unit: 'A',
        steps: [{ untilCellV: 3.8, value: 200 }, { value: 20 }],
      };
    });
    expect(named(result, 'ledge')).toEqual(['ledge:2']);
    const after = result.series.packCurrentA.slice(result.series.packCurrentA.findIndex((I) => I < 21 && I > 19));
    for (const I of after) expect(I).toBeCloseTo(20, 6);
  });
});

describe('simulateSession at power steps', () => {
  const shared = (atMin: number) => (s: SessionStudyInput) => {
    s.strategy.taper = constant(100);
    s.station.powerSteps = [{ atMin, powerKw: 20 }];
  };

  test('a step on a grid row leaves two rows there, not three', () => {
    const { series } = run(shared(5));
    expect(rowsAt(series, 300)).toBe(2);
    expect(series.limit[series.tS.lastIndexOf(300)]).toBe('station-power');
  });

  test('a step that changes nothing leaves the grid’s one row, and none off the grid', () => {
    const idle = (atMin: number) => (s: SessionStudyInput) => {
      s.strategy.taper = constant(100);
      s.station.powerSteps = [{ atMin, powerKw: 300 }];
    };
    expect(rowsAt(run(idle(5)).series, 300)).toBe(1);
    expect(rowsAt(run(idle(5.05)).series, 5.05 * 60)).toBe(0);
  });

  test('a step at minute 0 holds from the start', () => {
    const { events, series } = run(shared(0));
    expect(events[0]).toEqual({ tS: 0, event: 'power:20' });
    expect(Math.max(...series.stationPowerKw)).toBeCloseTo(20, 9);
  });

  test('a step above the station’s own power does not lift it', () => {
    const { metrics } = run((s) => {
      s.station.powerMaxKw = 25;
      s.station.powerSteps = [{ atMin: 1, powerKw: 400 }];
    });
    expect(metrics.peakStationPowerKw).toBeCloseTo(25, 9);
  });
});

describe('simulateSession, its end', () => {
  test('target at the start: one row, ended at once', () => {
    const { metrics, series, events } = run((s) => Object.assign(s.session, { startSoc: 0.6, targetSoc: 0.6 }));
    expect([metrics.endReason, metrics.endMin, metrics.endSoc]).toEqual(['target', 0, 0.6]);
    expect(series.tS).toEqual([0]);
    expect(events.at(-1)).toEqual({ tS: 0, event: 'end:target' });
    expect(metrics.minutesToSoc['60']).toBe(0);
    expect(metrics.minutesToSoc['70']).toBeNull();
  });

  test('cutoff met by a jump ends there, the row after the jump last', () => {
    const { metrics, series, events } = run((s) => {
      s.strategy.taper = ledges([0, 200], [0.5, 10]);
      s.strategy.cutoffA = 15;
    });
    expect(metrics.endReason).toBe('cutoff');
    expect(metrics.endSoc).toBeCloseTo(0.5, 9);
    expect(series.packCurrentA.slice(-2)).toEqual([expect.closeTo(200, 9), expect.closeTo(10, 9)]);
    expect(events.slice(-2).map(({ event }) => event)).toEqual(['ledge:2', 'end:cutoff']);
    expect(new Set(events.slice(-2).map(({ tS }) => tS)).size).toBe(1);
  });

  test('a current below the cutoff under a station’s limit does not end the session', () => {
    const { metrics } = run((s) => {
      s.station.currentMaxA = 10;
      s.strategy.cutoffA = 15;
      s.session.maxMin = 30;
    });
    expect(metrics.endReason).toBe('maxMin');
  });

  test('0 A under the hot limit goes on to maxMin', () => {
    const { metrics, series } = run((s) => {
      s.session.startTempC = 60;
      s.strategy.hotDerate = { fromC: 45, toC: 55 };
      s.session.maxMin = 20;
    });
    expect(metrics.endReason).toBe('maxMin');
    expect(series.limit.at(-1)).toBe('hot');
    expect(metrics.limitMinutes.hot).toBeCloseTo(20, 6);
  });
});

test('simulateSession: same input, same bytes', () => {
  const { study } = exampleStudies()[0];
  const bytes = () => JSON.stringify(simulateSession(study).result);
  expect(bytes()).toBe(bytes());
});

test('simulateSession: the output grid does not move a metric by more than its accuracy', () => {
  const { study } = exampleStudies()[0];
  const [fine, coarse] = [1, 97].map((everyS) => simulateSession(study, { everyS }).result.metrics);
  expect(coarse.endMin).toBeCloseTo(fine.endMin, 8);
  expect(coarse.hottestCoreC).toBeCloseTo(fine.hottestCoreC, 6);
  expect(coarse.peakStationPowerKw).toBeCloseTo(fine.peakStationPowerKw, 6);
});

test('simulateSession tells its progress from 0 to 1, rising', () => {
  const shares: number[] = [];
  simulateSession(exampleStudies()[0].study, { onProgress: (share) => shares.push(share) });
  expect(shares).toEqual([...shares].sort((a, b) => a - b));
  expect(shares[0]).toBeGreaterThanOrEqual(0);
  expect(shares.at(-1)).toBeLessThanOrEqual(1);
});

test('simulateSession stepping across switch-overs finds the same moments as when it stops on them', () => {
  const { study } = exampleStudies()[0];
  const [stopping, across] = [true, false].map(
    (stopAtSwitchOvers) => simulateSession(study, { stopAtSwitchOvers }).result,
  );
  expect(across.events.map(({ event }) => event)).toEqual(stopping.events.map(({ event }) => event));
  across.events.forEach(({ tS }, i) => expect(Math.abs(tS - stopping.events[i].tS)).toBeLessThan(1));
});
