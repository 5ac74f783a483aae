import fc from 'fast-check';
import type { SessionStudyInput } from '../src/index.ts';

/** Seeded studies of packs, coolings and stations as they might be met, for checks that must hold for all of them. */

type Taper = SessionStudyInput['strategy']['taper'];
type Cell = SessionStudyInput['cell'];
type Thermal = SessionStudyInput['thermal'];

/** Even over the range, where `fc.double` favours the ends and the smallest numbers of all. */
export const between = (min: number, max: number) =>
  fc.integer({ min: 0, max: 10_000 }).map((share) => min + ((max - min) * share) / 10_000);
const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined });

/** Rising numbers from `min` to `max`, both ends among them. */
const rising = (min: number, max: number, most: number) =>
  fc
    .array(between(0.05, 1), { minLength: 1, maxLength: most })
    .map((gaps) => gaps.reduce((edges, gap) => [...edges, edges.at(-1)! + gap], [0]))
    .map((edges) => edges.map((edge) => min + ((max - min) * edge) / edges.at(-1)!));

const tableOver = (min: number, max: number) =>
  rising(0, 1, 6).chain((x) =>
    fc.array(between(min, max), { minLength: x.length, maxLength: x.length }).map((y) => ({ x, y })),
  );

type Chemistry = { ocv: Cell['ocv']; anode: Cell['ocv']; vMaxV: number; vMinV: number };
const chemistry: fc.Arbitrary<Chemistry> = fc.constantFrom<Chemistry>(
  { ocv: { electrodes: 'nmc811-graphite' }, anode: { electrodes: 'nmc811-graphite' }, vMaxV: 4.2, vMinV: 2.5 },
  { ocv: { electrodes: 'lfp-graphite' }, anode: { electrodes: 'lfp-graphite' }, vMaxV: 3.65, vMinV: 2.2 },
  {
    ocv: { x: [0, 0.05, 0.2, 0.6, 0.9, 1], y: [3.1, 3.35, 3.5, 3.72, 4.05, 4.18] },
    anode: { x: [0, 0.1, 0.5, 1], y: [0.8, 0.3, 0.13, 0.085] },
    vMaxV: 4.25,
    vMinV: 2.7,
  },
);

/** A cell by its resistance times capacity [mΩ·Ah], as cells of one kind share it. */
const cell = fc
  .record({
    chemistry,
    capacityAh: between(3, 200),
    r0: between(20, 90),
    pairs: fc.array(fc.tuple(between(5, 40), between(3, 300)), { maxLength: 3 }),
    entropic: maybe(tableOver(-0.4, 0.3)),
    shape: maybe(tableOver(0.8, 2.5)),
    activationKjPerMol: between(0, 35),
    share: maybe(between(0, 0.8)),
  })
  .map(({ chemistry, capacityAh, r0, pairs, entropic, shape, activationKjPerMol, share }): Cell => ({
    name: 'random',
    capacityAh,
    massKg: capacityAh / 65,
    ocv: chemistry.ocv,
    entropicMvPerK: entropic,
    r0Milliohm: r0 / capacityAh,
    rcPairs: pairs.map(([r, tauS]) => ({ rMilliohm: r / capacityAh, tauS })),
    resistanceShape: shape,
    activationKjPerMol,
    anode: share === undefined ? undefined : { potential: chemistry.anode, share },
    vMaxV: chemistry.vMaxV,
    vMinV: chemistry.vMinV,
  }));

const band = (onMin: number, onMax: number) => fc.tuple(between(onMin, onMax), between(2, 12));

const thermal: fc.Arbitrary<Thermal> = fc.record({
  coreToSurfaceWPerK: maybe(between(200, 2000)),
  surfaceShare: between(0.05, 0.3),
  plateWPerK: between(0, 2000),
  ambientWPerK: between(0, 30),
  coolant: fc.record({ flowLPerMin: fc.oneof(fc.constant(0), between(3, 30)), volumeL: between(3, 20) }),
  pumpW: between(0, 200),
  chiller: maybe(
    fc
      .tuple(between(1000, 8000), band(15, 35), between(5, 20))
      .map(([ratedW, [onC, width], minCoolantC]) => ({ ratedW, onC, fullC: onC + width, minCoolantC })),
  ),
  radiator: maybe(
    fc
      .tuple(between(20, 200), band(15, 35))
      .map(([parkedWPerK, [onC, width]]) => ({ parkedWPerK, onC, fullC: onC + width })),
  ),
  heater: maybe(
    fc.tuple(between(1000, 8000), band(-5, 20)).map(([ratedW, [onC, width]]) => ({ ratedW, onC, offC: onC + width })),
  ),
});

/** Power classes and posts: [kW, A, V]. */
const station = fc
  .record({
    post: fc.constantFrom([50, 125, 500], [150, 300, 920], [150, 500, 500], [250, 500, 920], [350, 500, 1000]),
    rampAPerS: between(10, 200),
    steps: fc.option(fc.tuple(rising(2, 30, 2), fc.array(between(0, 400), { minLength: 3, maxLength: 3 }))),
  })
  .map(({ post: [powerMaxKw, currentMaxA, voltageMaxV], rampAPerS, steps }) => ({
    name: 'random',
    powerMaxKw,
    currentMaxA,
    voltageMaxV,
    rampAPerS,
    powerSteps: steps?.[0].map((atMin, i) => ({ atMin, powerKw: steps[1][i] })),
  }));

const inlet = fc.record({
  resistanceMilliohm: between(0, 1),
  heatCapacityJPerK: between(300, 1500),
  ambientWPerK: between(2, 8),
  currentMaxA: maybe(between(150, 600)),
  derateFromC: between(40, 75),
  derateToC: between(80, 95),
});

type Unit = 'A' | 'C' | 'kW';

/** Tapers of every shape in every unit; values are C-rates until the pack is known. */
function taper(shape: Taper['shape'], unit: Unit, vMaxV: number): fc.Arbitrary<Taper> {
  const rates = (count: number) => fc.array(between(0.1, 3), { minLength: count, maxLength: count });
  if (shape === 'none') return fc.constant({ shape });
  if (shape === 'map')
    return fc
      .tuple(rising(0, 1, 4), rising(-10, 45, 3))
      .chain(([soc, tempC]) =>
        fc.tuple(...soc.map(() => rates(tempC.length))).map((values): Taper => ({ shape, unit, soc, tempC, values })),
      );
  return rising(0, 1, 5).chain((edges) =>
    rates(edges.length).map((values): Taper => {
      if (shape === 'slope') return { shape, unit, points: edges.map((soc, i) => ({ soc, value: values[i] })) };
      const falling = [...values].sort((a, b) => b - a);
      if (shape === 'ledges')
        return { shape, unit, steps: edges.map((fromSoc, i) => ({ fromSoc, value: falling[i] })) };
      const until = (i: number) => (i === edges.length - 1 ? undefined : vMaxV - 0.5 + 0.5 * edges[i]);
      return { shape, unit, steps: falling.map((value, i) => ({ untilCellV: until(i), value })) };
    }),
  );
}

/** C-rates into the taper's unit, for a pack of so many Ah at about so many volts. */
function inUnit(taper: Taper, ampereHours: number, volts: number): Taper {
  const factor = taper.shape === 'none' ? 1 : { A: ampereHours, C: 1, kW: (ampereHours * volts) / 1000 }[taper.unit];
  const scaled = <T extends { value: number }>(rows: T[]) => rows.map((row) => ({ ...row, value: row.value * factor }));
  if (taper.shape === 'slope') return { ...taper, points: scaled(taper.points) };
  if (taper.shape === 'map') return { ...taper, values: taper.values.map((row) => row.map((v) => v * factor)) };
  if (taper.shape === 'ledges') return { ...taper, steps: scaled(taper.steps) };
  return taper.shape === 'voltage-ledges' ? { ...taper, steps: scaled(taper.steps) } : taper;
}

const shapes = fc.constantFrom<Taper['shape']>('none', 'slope', 'ledges', 'voltage-ledges', 'map');

/** A session study with every part drawn from usual ranges. */
export const anyStudy: fc.Arbitrary<SessionStudyInput> = cell.chain((drawn) =>
  fc
    .record({
      thermal,
      inlet: maybe(inlet),
      station,
      taper: fc.tuple(shapes, fc.constantFrom<Unit>('A', 'C', 'kW')).chain(([s, u]) => taper(s, u, drawn.vMaxV)),
      capacity: between(50, 300),
      series: fc.integer({ min: 80, max: 220 }),
      segments: fc.integer({ min: 1, max: 6 }),
      window: fc.tuple(between(0, 0.06), between(0.92, 1)),
      busbarMilliohm: between(0, 15),
      structureJPerK: between(0, 60000),
      maxRate: between(1, 4),
      under: between(0, 0.15),
      anodeMarginMv: maybe(between(0, 40)),
      hot: fc.tuple(between(30, 48), between(4, 15)),
      cold: maybe(fc.tuple(between(0.02, 0.5), between(1, 3))),
      cutoffA: between(0, 30),
      startSoc: between(0, 0.6),
      session: fc.record({
        ambientC: between(-20, 42),
        startTempC: between(-15, 45),
        coolantStartC: maybe(between(-15, 45)),
        maxMin: between(10, 120),
        hotelW: between(0, 4000),
      }),
      target: between(0.05, 1),
    })
    .map((parts): SessionStudyInput => {
      const parallel = Math.max(1, Math.round(parts.capacity / drawn.capacityAh));
      const ampereHours = parallel * drawn.capacityAh;
      const [fromC, width] = parts.hot;
      return {
        format: 'voltiplano/study',
        version: 1,
        kind: 'session',
        cell: drawn,
        pack: {
          name: 'random',
          series: parts.series,
          parallel,
          socWindow: parts.window,
          busbarMilliohm: parts.busbarMilliohm,
          chargeCurrentMaxA: parts.maxRate * ampereHours,
          structureJPerK: parts.structureJPerK,
          segments: parts.segments,
        },
        thermal: parts.thermal,
        inlet: parts.inlet,
        station: parts.station,
        boost: { powerMaxKw: 150 },
        strategy: {
          name: 'random',
          taper: inUnit(parts.taper, ampereHours, 3.6 * parts.series),
          cellVoltageCeilingV: drawn.vMaxV - parts.under,
          anodeMarginMv: drawn.anode ? parts.anodeMarginMv : undefined,
          hotDerate: { fromC, toC: fromC + width },
          coldLimit: parts.cold && { tempC: [-20, 0, 25], cRate: [parts.cold[0], parts.cold[0] * 2, parts.cold[1]] },
          cutoffA: parts.cutoffA,
        },
        session: {
          ...parts.session,
          startSoc: parts.startSoc,
          targetSoc: parts.startSoc + parts.target * (1 - parts.startSoc),
        },
      };
    }),
);
