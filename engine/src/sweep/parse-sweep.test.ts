import { expect, test } from 'vitest';
import { timedStudy } from '../../bench/studies.ts';
import { StudyError } from '../study/study-error.ts';
import { parseSessionStudy } from '../study/parse-study.ts';
import { studyInputs } from './input-path.ts';
import { parseSweep, parseSweepText } from './parse-sweep.ts';
import { cellStudy, coordinatesOf, indexAt, type GridPlan, type NumberAxis, type SpreadPlan } from './sweep-plan.ts';

const base = timedStudy('b1');
const file = (sweep: unknown, over: object = {}) => ({
  format: 'voltiplano/study',
  version: 1,
  kind: 'sweep',
  base: { ...base, ...over },
  sweep,
});
const grid = (...axes: unknown[]) => parseSweep(file({ axes })) as GridPlan;
const valuesOf = (axis: unknown) => (grid(axis).axes[0] as NumberAxis).values;

function issuesOf(sweep: unknown, over: object = {}) {
  try {
    parseSweep(file(sweep, over));
  } catch (error) {
    return (error as StudyError).issues;
  }
  throw new Error('taken without complaint');
}

test('a range has both ends and even steps without rounding noise; log steps are even in ratio', () => {
  expect(valuesOf({ path: 'session.startSoc', from: 0, to: 0.6, count: 7 })).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6]);
  expect(valuesOf({ path: 'station.powerMaxKw', from: 3, to: 300, count: 3, scale: 'log' })).toEqual([3, 30, 300]);
  expect(valuesOf({ path: 'session.ambientC', from: 40, to: -20, count: 3 })).toEqual([40, 10, -20]);
});

test('an axis has the label and unit of its quantity, a taper value the unit of its taper, a row its number', () => {
  const { axes } = grid(
    { path: 'session.ambientC', values: [0, 10] },
    { path: 'strategy.taper.steps[1].value', values: [100, 200] },
  );
  expect(axes).toMatchObject([
    { label: 'Ambient', unit: '°C' },
    { label: 'Taper value, row 2', unit: base.strategy.taper.shape === 'none' ? '' : base.strategy.taper.unit },
  ]);
});

test('cells are row-major, the last axis fastest, and the inverse holds', () => {
  const plan = grid(
    { path: 'session.ambientC', values: [0, 10] },
    { path: 'session.startSoc', values: [0, 0.1, 0.2] },
    {
      part: 'station',
      items: [
        { name: 'A', body: base.station },
        { name: 'B', body: base.station },
      ],
    },
  );
  expect(plan.size).toBe(12);
  expect(coordinatesOf(plan.axes, 7)).toEqual([1, 0, 1]);
  for (let index = 0; index < 12; index++) expect(indexAt(plan.axes, coordinatesOf(plan.axes, index))).toBe(index);
  expect(() => cellStudy(plan, 12)).toThrow(RangeError);
});

test('cellStudy sets parts, then values, then factors, leaves the base alone, and its title says where it stands', () => {
  const other = { ...base.station, name: 'Salar Cima', powerMaxKw: 120 };
  const before = structuredClone(base);
  const plan = grid(
    { path: 'station.currentMaxA', values: [333] },
    { part: 'station', items: [{ name: 'Salar Cima', body: other }] },
    { path: 'cell.resistanceFactor', values: [1.5] },
  );
  const study = cellStudy(plan, 0);
  expect(study.station).toEqual({ ...other, currentMaxA: 333 });
  expect(study.cell.r0Milliohm).toBeCloseTo(base.cell.r0Milliohm * 1.5, 12);
  expect(study.cell.rcPairs?.[0]?.rMilliohm).toBeCloseTo(base.cell.rcPairs[0].rMilliohm * 1.5, 12);
  expect(study.title).toContain('Station current, most 333 A; Station Salar Cima; Cell resistance, all of it 1.5 ×');
  expect(parseSessionStudy(study)).toEqual(study);
  expect(base).toEqual(before);
});

test('a negative value stands in a title with a real minus sign and its unit', () => {
  expect(cellStudy(grid({ path: 'session.ambientC', values: [-10] }), 0).title).toContain('Ambient −10 °C');
});

test('an optional field of a part that is there can be swept; an optional part can be left out', () => {
  const { coolantStartC: _, ...session } = base.session;
  const plan = parseSweep(file({ axes: [{ path: 'session.coolantStartC', values: [12] }] }, { session }));
  expect(cellStudy(plan, 0).session.coolantStartC).toBe(12);
  const inlets = grid({
    part: 'inlet',
    items: [
      { name: 'none', body: null },
      { name: 'plain', body: {} },
    ],
  });
  expect(cellStudy(inlets, 0)).not.toHaveProperty('inlet');
  expect(cellStudy(inlets, 1).inlet?.derateFromC).toBe(75);
});

test.each([
  [
    'out of range',
    [{ path: 'session.ambientC', values: [0, 10, 90] }],
    'sweep.axes[0].values[2]',
    'range',
    'sweep.axes[0].values[2] (Ambient) must be at most 70 °C, but is 90',
  ],
  [
    'the least value refused',
    [{ path: 'station.powerMaxKw', from: 0, to: 100, count: 3 }],
    'sweep.axes[0].from',
    'range',
    '(Station power, most) must be above 0 kW, but is 0',
  ],
  [
    'no such input',
    [{ path: 'session.colour', values: [1] }],
    'sweep.axes[0].path',
    'unknown-input',
    'must name a numeric input of a study, but is "session.colour"',
  ],
  [
    'a name from Object',
    [{ path: 'session.constructor', values: [1] }],
    'sweep.axes[0].path',
    'unknown-input',
    'must name',
  ],
  [
    'an absent part',
    [{ path: 'boost.powerMaxKw', values: [1] }],
    'sweep.axes[0].path',
    'absent',
    'names boost.powerMaxKw, which the base study does not have: it has no boost',
  ],
  [
    'an absent row',
    [{ path: 'cell.rcPairs[7].tauS', values: [1] }],
    'sweep.axes[0].path',
    'absent',
    'it has no cell.rcPairs[7]',
  ],
  [
    'cells in halves',
    [{ path: 'pack.series', values: [96.5] }],
    'sweep.axes[0].values[0]',
    'whole-number',
    'must be a whole number, but is 96.5',
  ],
  [
    'a range of cells in halves',
    [{ path: 'pack.series', from: 96, to: 97, count: 3 }],
    'sweep.axes[0].count',
    'whole-number',
    '96.5',
  ],
  [
    'log from below 0',
    [{ path: 'session.ambientC', from: -5, to: 5, count: 3, scale: 'log' }],
    'sweep.axes[0].from',
    'log-needs-positive',
    'above 0 on a log scale',
  ],
  [
    'an empty range',
    [{ path: 'session.ambientC', from: 5, to: 5, count: 3 }],
    'sweep.axes[0].to',
    'empty-range',
    'must differ from from',
  ],
  [
    'a value twice',
    [{ path: 'session.ambientC', values: [5, 6, 5] }],
    'sweep.axes[0].values[2]',
    'repeated',
    'but is 5 again',
  ],
  [
    'an input twice',
    [
      { path: 'session.ambientC', values: [5] },
      { path: 'session.ambientC', values: [6] },
    ],
    'sweep.axes[1].path',
    'repeated',
    'as does sweep.axes[0].path',
  ],
  [
    'too many',
    [
      { path: 'session.ambientC', from: 0, to: 1, count: 200 },
      { path: 'session.startTempC', from: 0, to: 1, count: 101 },
    ],
    'sweep.axes',
    'too-many-cells',
    'at most 20000 cells, but make 20200 (200 × 101)',
  ],
  [
    'a count of one',
    [{ path: 'session.ambientC', from: 0, to: 1, count: 1 }],
    'sweep.axes[0].count',
    'range',
    'must be at least 2',
  ],
  [
    'an unknown key',
    [{ path: 'session.ambientC', values: [1], step: 2 }],
    'sweep.axes[0].step',
    'unknown-key',
    'is not a field',
  ],
  [
    'a part out of range',
    [{ part: 'station', items: [{ name: 'A', body: { ...base.station, powerMaxKw: -1 } }] }],
    'sweep.axes[0].items[0].body.powerMaxKw',
    'range',
    'must be above 0, but is -1',
  ],
  [
    'a place that an item lacks',
    [
      { path: 'strategy.taper.steps[1].value', values: [1] },
      { part: 'strategy', items: [{ name: 'flat', body: { ...base.strategy, taper: { shape: 'none' } } }] },
    ],
    'sweep.axes[0].path',
    'absent',
    'strategy.taper.steps[1].value',
  ],
])('%s: path, rule and sentence', (_, axes, path, rule, text) => {
  const issue = issuesOf({ axes }).find((one) => one.path === path);
  expect(issue?.rule).toBe(rule);
  expect(issue?.message).toContain(text);
});

test('the base and the kind are checked like a study', () => {
  expect(
    issuesOf({ axes: [{ path: 'session.ambientC', values: [1] }] }, { pack: { ...base.pack, series: -1 } }),
  ).toMatchObject([{ path: 'base.pack.series', rule: 'range' }]);
  expect(issuesOf({})).toMatchObject([{ path: 'sweep', rule: 'one-of' }]);
  expect(() => parseSweepText('{')).toThrow(/as JSON/);
  expect(() => parseSweep(base)).toThrow('Not a sweep: format must be "voltiplano/study" and kind "sweep"');
  expect(() => parseSweep(null)).toThrow(StudyError);
});

test.each([
  [{ inputs: [{ path: 'session.coolantStartC', minus: 1, plus: 1 }] }, 'sweep.sensitivity.inputs[0].path', 'absent'],
  [
    { inputs: [{ path: 'session.ambientC', minus: 200, plus: 1, as: 'absolute' }] },
    'sweep.sensitivity.inputs[0].minus',
    'range',
  ],
  [{ inputs: [{ path: 'session.ambientC', minus: 0, plus: 0 }] }, 'sweep.sensitivity.inputs[0].plus', 'no-change'],
  [
    { inputs: [{ path: 'session.startSoc', minus: 0.1, plus: 0.1 }] },
    'sweep.sensitivity.inputs[0].as',
    'share-of-nothing',
  ],
])('a sensitivity %# that cannot be', (sensitivity, path, rule) => {
  const { coolantStartC: _, ...session } = base.session;
  const issues = issuesOf({ sensitivity }, { session: { ...session, startSoc: 0 } });
  expect(issues).toContainEqual(expect.objectContaining({ path, rule }));
});

test.each([
  [{ path: 'session.ambientC', distribution: 'uniform', from: 5, to: 2 }, 'to', 'must-lie-above'],
  [{ path: 'session.ambientC', distribution: 'uniform', from: 5, to: 200 }, 'to', 'range'],
  [{ path: 'session.ambientC', distribution: 'triangular', from: 5, mode: 12, to: 10 }, 'mode', 'range'],
  [{ path: 'session.ambientC', distribution: 'normal', mean: 100, sd: 2 }, 'mean', 'range'],
  [{ path: 'pack.series', distribution: 'normal', sd: 2 }, 'path', 'whole-number'],
])('a spread %# that cannot be', (input, field, rule) => {
  const issues = issuesOf({ spread: { inputs: [input], runs: 20 } });
  expect(issues).toContainEqual(expect.objectContaining({ path: `sweep.spread.inputs[0].${field}`, rule }));
});

test('the hash names what is computed: not the titles, not the order of keys, but every number', () => {
  const axes = [{ path: 'session.ambientC', values: [1, 2] }];
  const hashOf = (sweep: unknown, over: object = {}) => parseSweep(file(sweep, over)).hash;
  const hash = hashOf({ axes });
  expect(hash).toMatch(/^[0-9a-f]{16}$/);
  expect(hashOf({ axes }, { title: 'Another' })).toBe(hash);
  expect(hashOf({ axes }, { session: Object.fromEntries(Object.entries(base.session).reverse()) })).toBe(hash);
  expect(hashOf({ axes: [{ path: 'session.ambientC', values: [2, 1] }] })).not.toBe(hash);
  expect(hashOf({ axes }, { session: { ...base.session, hotelW: 301 } })).not.toBe(hash);
});

test('a spread has one sample in every slice of probability, the same for a seed, others left as they are', () => {
  const input = (path: string) => ({ path, distribution: 'uniform', from: 0, to: 50 });
  const spread = (seed: number, ...paths: string[]) =>
    parseSweep(file({ spread: { inputs: paths.map(input), runs: 50, seed } })) as SpreadPlan;
  const [one] = spread(3, 'session.ambientC').inputs;
  expect([...one.samples].map(Math.floor).sort((a, b) => a - b)).toEqual(Array.from({ length: 50 }, (_, i) => i));
  const [temperature, again] = spread(3, 'session.startTempC', 'session.ambientC').inputs;
  expect(again.samples).toEqual(one.samples);
  expect(temperature.samples).not.toEqual(one.samples);
  expect(spread(4, 'session.ambientC').inputs[0].samples).not.toEqual(one.samples);
});

test('studyInputs lists every number of a study once by plain name, rows one by one, each of which can be swept', () => {
  const inputs = studyInputs(base);
  const paths = inputs.map(({ path }) => path);
  const labels = inputs.map(({ label }) => label);
  expect(labels.filter((label, i) => labels.indexOf(label) < i)).toEqual([]);
  expect(labels).toContain('Station power, most');
  expect(new Set(paths).size).toBe(paths.length);
  expect(inputs).toContainEqual(
    expect.objectContaining({ path: 'session.ambientC', label: 'Ambient', unit: '°C', part: 'session' }),
  );
  expect(paths).toContain('strategy.taper.steps[0].value');
  expect(paths).toContain('strategy.taper.factor');
  expect(paths.some((path) => path.startsWith('trip.') || path.startsWith('boost.'))).toBe(false);
  for (const { path, value, quantity } of inputs)
    expect(grid({ path, values: [value ?? quantity.usual![0]] }).axes).toHaveLength(1);
});
