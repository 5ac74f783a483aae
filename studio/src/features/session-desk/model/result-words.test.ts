import type { LimitCode, SessionResult } from '@voltiplano/engine';
import { expect, test } from 'vitest';
import { unitsOf } from '../../../lib/units.ts';
import { ledgeMinutes } from './ledge-minutes.ts';
import { sampleStudy } from './sample-study.ts';
import { sessionCsv } from './session-csv.ts';
import { sessionHeadlines } from './session-headlines.ts';
import { sentenceText, sessionSentence } from './session-sentence.ts';

// Only what the words read: ten minutes under the station, then twenty on the ledge from 30 %, five on the next.
const others = [
  'packCurrentA',
  'packVoltageV',
  'stationVoltageV',
  'stationCurrentA',
  'stationPowerKw',
  'batteryPowerKw',
  'highestCellV',
  'lowestAnodeV',
  'hottestCoreC',
  'hottestSurfaceC',
  'coldestSurfaceC',
  'coolantInC',
  'coolantOutC',
  'loopC',
  'inletC',
  'chillerW',
  'radiatorW',
  'heaterW',
  'auxiliaryW',
];
const series = {
  ...Object.fromEntries(others.map((name) => [name, new Array<number>(6).fill(1)])),
  tS: [0, 600, 600, 1800, 1800, 2100],
  soc: [0.1, 0.3, 0.3, 0.5, 0.5, 0.55],
  limit: ['station-current', 'station-current', 'taper', 'taper', 'taper', 'taper'] as LimitCode[],
};
const result = {
  series,
  events: [],
  metrics: {
    endReason: 'target',
    endMin: 35,
    endSoc: 0.55,
    limitMinutes: { taper: 25, 'station-current': 10, hot: 0 },
    minutes0To50: null,
    minutes10To80: null,
    minutes0To100: null,
    peakStationPowerKw: 150.44,
    meanStationPower10To80Kw: null,
    kmAfterMin: { '10': 100, '20': 160 },
    hottestCoreC: 56,
    lowestAnodeMv: 22.4,
  },
  energyLedger: { stationKwh: 50, storedKwh: 47 },
} as unknown as SessionResult;

test('ledgeMinutes gives each ledge the time it held', () => {
  expect(ledgeMinutes(result, sampleStudy.strategy.taper)).toEqual([0, 20, 5]);
});

test('ledgeMinutes follows the ledge events of voltage ledges', () => {
  const steps = [{ untilCellV: 4, value: 300 }, { value: 200 }];
  const moved = { ...result, events: [{ tS: 1800, event: 'ledge:2' }] };
  expect(ledgeMinutes(moved, { shape: 'voltage-ledges', unit: 'A', steps })).toEqual([20, 5]);
});

test('sessionSentence names the first limit, the second, and the end', () => {
  expect(sentenceText(sessionSentence(result))).toBe(
    'The taper holds this session back for 25.0 of its 35.0 minutes, the station’s current for 10.0. It ends at its target of 55 %, held by the taper.',
  );
});

test('sessionHeadlines says why a number is not there and marks a core over the hot limit', () => {
  const units = unitsOf({ temperature: '°F', distance: 'km' });
  const numbers = sessionHeadlines(result, sampleStudy, units, null);
  expect(numbers).toHaveLength(10);
  expect(numbers[0]).toMatchObject({ caption: '0–50 %', value: null, absent: 'starts at 10 %' });
  expect(numbers[1]).not.toHaveProperty('absent');
  expect(numbers.find((one) => one.caption === 'Hottest core')).toMatchObject({ unit: '°F', over: true });
  expect(numbers.at(-1)?.value).toBeCloseTo(94, 10);
});

test('sessionCsv writes cautions as comments, units in the header and one line per row', () => {
  const lines = sessionCsv(result, sampleStudy).split('\r\n');
  expect(lines.slice(0, 3).every((line) => line.startsWith('# '))).toBe(true);
  expect(lines[2]).toMatch(/not a test/i);
  expect(lines[3]).toMatch(/^time \[s\],soc \[-\],pack current \[A\],.*,limit$/);
  expect(lines).toHaveLength(4 + series.tS.length + 1);
  expect(lines[4]).toMatch(/^0,0\.1,.*station-current$/);
});
