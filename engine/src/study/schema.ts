import { z } from 'zod';
import { electrodePairs } from '../cell/electrodes.ts';
import { mustLieAbove, quantity, rising, sameLength, table } from './rules.ts';
import { taperSchema } from './taper-schema.ts';

const name = z.string().max(200);
const electrodes = z.strictObject({ electrodes: z.enum(electrodePairs) });
const volts = z.number().gte(-1).lte(10);
const overZ = table(z.number().gte(-1000).lte(1000));

const cell = z
  .strictObject({
    name,
    capacityAh: quantity('cell.capacityAh'),
    massKg: quantity('cell.massKg'),
    specificHeatJPerKgK: quantity('cell.specificHeatJPerKgK').default(1000),
    ocv: z.union([electrodes, table(volts)]),
    entropicMvPerK: overZ.optional(),
    r0Milliohm: quantity('cell.r0Milliohm'),
    rcPairs: z
      .array(z.strictObject({ rMilliohm: quantity('cell.rcPairs[].rMilliohm'), tauS: quantity('cell.rcPairs[].tauS') }))
      .max(3)
      .default([]),
    resistanceShape: table(z.number().gt(0).lte(1000)).optional(),
    activationKjPerMol: quantity('cell.activationKjPerMol'),
    anode: z
      .strictObject({ potential: z.union([electrodes, table(volts)]), share: quantity('cell.anode.share') })
      .optional(),
    vMaxV: quantity('cell.vMaxV'),
    vMinV: quantity('cell.vMinV'),
  })
  .superRefine((value, context) => {
    mustLieAbove(context, ['vMaxV'], value.vMaxV, 'vMinV', value.vMinV);
    if ('electrodes' in value.ocv) return;
    const { y } = value.ocv;
    mustLieAbove(context, ['ocv', 'y', y.length - 1], y[y.length - 1], 'the first row', y[0]);
  });

const pack = z
  .strictObject({
    name,
    series: quantity('pack.series'),
    parallel: quantity('pack.parallel'),
    socWindow: z.tuple([quantity('pack.socWindow[]'), quantity('pack.socWindow[]')]).default([0, 1]),
    busbarMilliohm: quantity('pack.busbarMilliohm').default(0),
    chargeCurrentMaxA: quantity('pack.chargeCurrentMaxA'),
    dischargeCurrentMaxA: quantity('pack.dischargeCurrentMaxA').optional(),
    structureJPerK: quantity('pack.structureJPerK').default(0),
    segments: quantity('pack.segments').default(1),
  })
  .superRefine(({ socWindow: [low, high] }, context) =>
    mustLieAbove(context, ['socWindow', 1], high, 'socWindow[0]', low),
  );

const band = (parts: { onC: number; fullC: number }, context: Parameters<typeof rising>[0]) =>
  mustLieAbove(context, ['fullC'], parts.fullC, 'onC', parts.onC);

const thermal = z.strictObject({
  coreToSurfaceWPerK: quantity('thermal.coreToSurfaceWPerK').optional(),
  surfaceShare: quantity('thermal.surfaceShare').default(0.1),
  plateWPerK: quantity('thermal.plateWPerK'),
  ambientWPerK: quantity('thermal.ambientWPerK'),
  coolant: z.strictObject({
    flowLPerMin: quantity('thermal.coolant.flowLPerMin'),
    densityKgPerM3: quantity('thermal.coolant.densityKgPerM3').default(1065),
    specificHeatJPerKgK: quantity('thermal.coolant.specificHeatJPerKgK').default(3400),
    volumeL: quantity('thermal.coolant.volumeL'),
  }),
  pumpW: quantity('thermal.pumpW').default(0),
  chiller: z
    .strictObject({
      ratedW: quantity('thermal.chiller.ratedW'),
      onC: quantity('thermal.chiller.onC'),
      fullC: quantity('thermal.chiller.fullC'),
      minCoolantC: quantity('thermal.chiller.minCoolantC').default(10),
      cop35: quantity('thermal.chiller.cop35').default(2.2),
      copPerK: quantity('thermal.chiller.copPerK').default(0.03),
      deratePerKAbove35: quantity('thermal.chiller.deratePerKAbove35').default(0.01),
    })
    .superRefine(band)
    .optional(),
  radiator: z
    .strictObject({
      parkedWPerK: quantity('thermal.radiator.parkedWPerK'),
      perMpsWPerK: quantity('thermal.radiator.perMpsWPerK').default(0),
      onC: quantity('thermal.radiator.onC'),
      fullC: quantity('thermal.radiator.fullC'),
    })
    .superRefine(band)
    .optional(),
  heater: z
    .strictObject({
      ratedW: quantity('thermal.heater.ratedW'),
      efficiency: quantity('thermal.heater.efficiency').default(0.95),
      onC: quantity('thermal.heater.onC'),
      offC: quantity('thermal.heater.offC'),
      maxCoolantC: quantity('thermal.heater.maxCoolantC').default(60),
    })
    .superRefine((value, context) => mustLieAbove(context, ['offC'], value.offC, 'onC', value.onC))
    .optional(),
});

const inlet = z
  .strictObject({
    resistanceMilliohm: quantity('inlet.resistanceMilliohm').default(0),
    heatCapacityJPerK: quantity('inlet.heatCapacityJPerK').default(500),
    ambientWPerK: quantity('inlet.ambientWPerK').default(4),
    currentMaxA: quantity('inlet.currentMaxA').optional(),
    derateFromC: quantity('inlet.derateFromC').default(75),
    derateToC: quantity('inlet.derateToC').default(90),
  })
  .superRefine((value, context) =>
    mustLieAbove(context, ['derateToC'], value.derateToC, 'derateFromC', value.derateFromC),
  );

const station = z
  .strictObject({
    name,
    powerMaxKw: quantity('station.powerMaxKw'),
    currentMaxA: quantity('station.currentMaxA'),
    voltageMinV: quantity('station.voltageMinV').default(150),
    voltageMaxV: quantity('station.voltageMaxV'),
    rampAPerS: quantity('station.rampAPerS').default(20),
    rectifierEfficiency: quantity('station.rectifierEfficiency').default(0.95),
    powerSteps: z
      .array(
        z.strictObject({
          atMin: quantity('station.powerSteps[].atMin'),
          powerKw: quantity('station.powerSteps[].powerKw'),
        }),
      )
      .optional(),
  })
  .superRefine((value, context) => {
    mustLieAbove(context, ['voltageMaxV'], value.voltageMaxV, 'voltageMinV', value.voltageMinV);
    rising(
      context,
      (value.powerSteps ?? []).map((step) => step.atMin),
      (i) => ['powerSteps', i, 'atMin'],
    );
  });

const boost = z.strictObject({
  powerMaxKw: quantity('boost.powerMaxKw'),
  efficiency: quantity('boost.efficiency').default(0.97),
});

const strategy = z.strictObject({
  name,
  taper: taperSchema,
  cellVoltageCeilingV: quantity('strategy.cellVoltageCeilingV'),
  anodeMarginMv: quantity('strategy.anodeMarginMv').optional(),
  hotDerate: z
    .strictObject({ fromC: quantity('strategy.hotDerate.fromC'), toC: quantity('strategy.hotDerate.toC') })
    .superRefine((value, context) => mustLieAbove(context, ['toC'], value.toC, 'fromC', value.fromC)),
  coldLimit: z
    .strictObject({
      tempC: z.array(quantity('strategy.coldLimit.tempC[]')).min(2),
      cRate: z.array(quantity('strategy.coldLimit.cRate[]')).min(2),
    })
    .superRefine((value, context) => {
      rising(context, value.tempC, (i) => ['tempC', i]);
      sameLength(context, value.tempC, value.cRate, 'cRate', 'tempC');
    })
    .optional(),
  cutoffA: quantity('strategy.cutoffA').default(0),
});

const session = z
  .strictObject({
    ambientC: quantity('session.ambientC'),
    startSoc: quantity('session.startSoc'),
    startTempC: quantity('session.startTempC'),
    coolantStartC: quantity('session.coolantStartC').optional(),
    targetSoc: quantity('session.targetSoc').default(1),
    maxMin: quantity('session.maxMin').default(180),
    hotelW: quantity('session.hotelW').default(300),
    whPerKm: quantity('session.whPerKm').default(180),
  })
  .superRefine((value, context) => {
    if (value.startSoc <= value.targetSoc) return;
    const message = `must not lie below startSoc (${value.startSoc}), but is ${value.targetSoc}`;
    context.addIssue({ code: 'custom', path: ['targetSoc'], message, params: { rule: 'target-below-start' } });
  });

const vehicle = z.strictObject({
  massKg: quantity('vehicle.massKg'),
  dragAreaM2: quantity('vehicle.dragAreaM2'),
  rollingCoefficient: quantity('vehicle.rollingCoefficient'),
  driveEfficiency: quantity('vehicle.driveEfficiency'),
  regenEfficiency: quantity('vehicle.regenEfficiency'),
  hotelW: quantity('vehicle.hotelW'),
  cabinWPerAmbient: z
    .strictObject({
      tempC: z.array(quantity('vehicle.cabinWPerAmbient.tempC[]')).min(2),
      watts: z.array(quantity('vehicle.cabinWPerAmbient.watts[]')).min(2),
    })
    .superRefine((value, context) => {
      rising(context, value.tempC, (i) => ['tempC', i]);
      sameLength(context, value.tempC, value.watts, 'watts', 'tempC');
    })
    .optional(),
  cabinAtStops: quantity('vehicle.cabinAtStops').default(0),
});

const depart = z.discriminatedUnion('rule', [
  z.strictObject({ rule: z.literal('target'), soc: z.number().gte(0).lte(1) }),
  z.strictObject({ rule: z.literal('reach-next') }),
  z.strictObject({ rule: z.literal('taper'), powerKw: z.number().gt(0).lte(10000) }),
]);

const leg = z
  .strictObject({
    km: quantity('trip.legs[].km'),
    kmPerH: quantity('trip.legs[].kmPerH'),
    climbM: quantity('trip.legs[].climbM').default(0),
    windKmPerH: quantity('trip.legs[].windKmPerH').default(0),
    ambientC: quantity('trip.legs[].ambientC').optional(),
    station: station.optional(),
    depart: depart.optional(),
  })
  .superRefine((value, context) => {
    if (Math.abs(value.climbM) > value.km * 1000) {
      const message = `must not pass the leg’s length (${value.km} km), but is ${value.climbM} m`;
      context.addIssue({ code: 'custom', path: ['climbM'], message, params: { rule: 'climb' } });
    }
    if (!value.depart || value.station) return;
    const message = 'needs a station at the end of the leg';
    context.addIssue({ code: 'custom', path: ['depart'], message, params: { rule: 'depart-needs-station' } });
  });

const legs = z.array(leg).min(1).max(500);

/** The legs of a trip with their stations, apart from the trip. */
const route = z.strictObject({ legs });

const trip = z
  .strictObject({
    ambientC: quantity('trip.ambientC').optional(),
    startSoc: quantity('trip.startSoc'),
    startTempC: quantity('trip.startTempC'),
    reserveSoc: quantity('trip.reserveSoc').default(0.1),
    legs,
    stopOverheadMin: quantity('trip.stopOverheadMin').default(5),
    precondition: z
      .strictObject({ targetC: quantity('trip.precondition.targetC'), leadMin: quantity('trip.precondition.leadMin') })
      .optional(),
    depart: depart.optional(),
  })
  .superRefine((value, context) => {
    if (value.ambientC !== undefined) return;
    const at = value.legs.findIndex((one) => one.ambientC === undefined);
    if (at < 0) return;
    const message = 'is missing: give trip.ambientC, or an ambient to every leg';
    context.addIssue({ code: 'custom', path: ['legs', at, 'ambientC'], message, params: { rule: 'missing' } });
  });

const head = {
  format: z.literal('voltiplano/study'),
  version: z.literal(1),
  title: z.string().max(300).optional(),
};

type Parts = {
  cell: z.output<typeof cell>;
  thermal: z.output<typeof thermal>;
  pack: z.output<typeof pack>;
  strategy: z.output<typeof strategy>;
};

/** Rules that hold between parts of a study. */
function acrossParts(study: Parts, context: Parameters<typeof rising>[0]): void {
  const add = (path: string[], rule: string, message: string) =>
    context.addIssue({ code: 'custom', path, message, params: { rule } });
  const { cellVoltageCeilingV: ceiling, anodeMarginMv } = study.strategy;
  const { vMaxV, vMinV, anode } = study.cell;
  if (ceiling > vMaxV)
    add(
      ['strategy', 'cellVoltageCeilingV'],
      'ceiling-above-cell',
      `must not pass cell.vMaxV (${vMaxV}), but is ${ceiling}`,
    );
  mustLieAbove(context, ['strategy', 'cellVoltageCeilingV'], ceiling, 'cell.vMinV', vMinV);
  if (anodeMarginMv !== undefined && !anode)
    add(
      ['strategy', 'anodeMarginMv'],
      'needs-anode',
      `needs cell.anode: a margin of ${anodeMarginMv} mV cannot be guarded without the anode’s potential`,
    );
  const surface = study.thermal.surfaceShare > 0 || study.pack.structureJPerK > 0;
  if (study.thermal.coreToSurfaceWPerK !== undefined && !surface)
    add(
      ['thermal', 'surfaceShare'],
      'no-heat-capacity',
      'must be above 0 where pack.structureJPerK is 0: the surface node needs a heat capacity',
    );
}

export const sessionStudySchema = z
  .strictObject({
    ...head,
    kind: z.literal('session'),
    cell,
    pack,
    thermal,
    inlet: inlet.optional(),
    station,
    boost: boost.optional(),
    strategy,
    session,
  })
  .superRefine(acrossParts);

export const tripStudySchema = z
  .strictObject({
    ...head,
    kind: z.literal('trip'),
    cell,
    pack,
    thermal,
    inlet: inlet.optional(),
    boost: boost.optional(),
    strategy,
    vehicle,
    trip,
  })
  .superRefine(acrossParts);

/** A study file of any kind the engine runs. */
export const studySchema = z.discriminatedUnion('kind', [sessionStudySchema, tripStudySchema]);

/** The parts of a study by name, and a route, which is a part of a trip. */
export const partSchemas = {
  cell,
  pack,
  thermal,
  inlet,
  station,
  boost,
  strategy,
  session,
  vehicle,
  route,
  trip,
} as const;

export type SessionStudy = z.output<typeof sessionStudySchema>;
export type SessionStudyInput = z.input<typeof sessionStudySchema>;
export type TripStudy = z.output<typeof tripStudySchema>;
export type TripStudyInput = z.input<typeof tripStudySchema>;
export type Study = SessionStudy | TripStudy;
export type Cell = z.output<typeof cell>;
export type Pack = z.output<typeof pack>;
export type Thermal = z.output<typeof thermal>;
export type Inlet = z.output<typeof inlet>;
export type Station = z.output<typeof station>;
export type Boost = z.output<typeof boost>;
export type Strategy = z.output<typeof strategy>;
export type Taper = Strategy['taper'];
export type Session = z.output<typeof session>;
export type Vehicle = z.output<typeof vehicle>;
export type Leg = z.output<typeof leg>;
