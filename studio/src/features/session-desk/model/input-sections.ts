import type { LimitCode, SessionStudyInput } from '@voltiplano/engine';

/** One numeric input of the desk. */
export type FieldSpec = {
  path: string;
  /** The limit it sets, whose swatch and minutes stand beside it. */
  sets?: LimitCode;
  label?: string;
  /** Path of the input whose value holds while this one is empty. */
  emptyAs?: string;
};

/** The parts of the inputs, in the order of the chain from station to cell. */
export const sectionNames = [
  'station',
  'inlet',
  'boost',
  'pack',
  'taper',
  'guards',
  'cell',
  'cooling',
  'session',
] as const;
export type SectionName = (typeof sectionNames)[number];

export type SectionSpec = {
  title: string;
  /** Where the part stands in the chain; the session is no part of it. */
  side: 'station' | 'vehicle' | 'cell' | null;
  /** Always in sight while the section is open. */
  fields: FieldSpec[];
  /** Behind "more inputs". */
  more: FieldSpec[];
  /** Paths whose issues and changes belong to this section. */
  covers: string[];
};

const at = (path: string, sets?: LimitCode, label?: string): FieldSpec => ({
  path,
  ...(sets ? { sets } : {}),
  ...(label ? { label } : {}),
});

export const sections: Record<SectionName, SectionSpec> = {
  station: {
    title: 'Station',
    side: 'station',
    fields: [
      at('station.powerMaxKw', 'station-power'),
      at('station.currentMaxA', 'station-current'),
      at('station.voltageMaxV', 'station-voltage'),
    ],
    more: [at('station.rampAPerS', 'station-ramp'), at('station.voltageMinV'), at('station.rectifierEfficiency')],
    covers: ['station'],
  },
  inlet: {
    title: 'Inlet',
    side: 'vehicle',
    fields: [
      at('inlet.currentMaxA', 'inlet'),
      at('inlet.derateFromC'),
      at('inlet.derateToC'),
      at('inlet.resistanceMilliohm'),
    ],
    more: [at('inlet.heatCapacityJPerK'), at('inlet.ambientWPerK')],
    covers: ['inlet'],
  },
  boost: {
    title: 'Boost',
    side: 'vehicle',
    fields: [at('boost.powerMaxKw'), at('boost.efficiency')],
    more: [],
    covers: ['boost'],
  },
  pack: {
    title: 'Pack',
    side: 'vehicle',
    fields: [
      at('pack.chargeCurrentMaxA', 'pack-current'),
      at('pack.series'),
      at('pack.parallel'),
      at('pack.socWindow[0]', undefined, 'Usable window, low'),
      at('pack.socWindow[1]', undefined, 'Usable window, high'),
    ],
    more: [at('pack.busbarMilliohm'), at('pack.structureJPerK'), at('pack.segments'), at('pack.dischargeCurrentMaxA')],
    covers: ['pack'],
  },
  taper: { title: 'Taper', side: 'vehicle', fields: [], more: [], covers: ['strategy.taper'] },
  guards: {
    title: 'Guards',
    side: 'cell',
    fields: [
      at('strategy.cellVoltageCeilingV', 'cell-voltage'),
      at('strategy.hotDerate.fromC', 'hot'),
      at('strategy.hotDerate.toC'),
      at('strategy.anodeMarginMv', 'anode'),
      at('strategy.cutoffA'),
    ],
    more: [],
    covers: [
      'strategy.cellVoltageCeilingV',
      'strategy.hotDerate',
      'strategy.anodeMarginMv',
      'strategy.cutoffA',
      'strategy.coldLimit',
    ],
  },
  cell: {
    title: 'Cell',
    side: 'cell',
    fields: [
      at('cell.capacityAh'),
      at('cell.r0Milliohm'),
      at('cell.activationKjPerMol'),
      at('cell.vMaxV'),
      at('cell.vMinV'),
    ],
    more: [at('cell.massKg'), at('cell.specificHeatJPerKgK')],
    covers: ['cell'],
  },
  cooling: {
    title: 'Cooling',
    side: 'cell',
    fields: [
      at('thermal.coolant.flowLPerMin'),
      at('thermal.plateWPerK'),
      at('thermal.coreToSurfaceWPerK'),
      at('thermal.ambientWPerK'),
    ],
    more: [
      at('thermal.surfaceShare'),
      at('thermal.coolant.volumeL'),
      at('thermal.coolant.densityKgPerM3'),
      at('thermal.coolant.specificHeatJPerKgK'),
      at('thermal.pumpW'),
    ],
    covers: ['thermal'],
  },
  session: {
    title: 'Session',
    side: null,
    fields: [at('session.ambientC'), at('session.startTempC'), at('session.startSoc'), at('session.targetSoc')],
    more: [
      { path: 'session.coolantStartC', emptyAs: 'session.startTempC' },
      at('session.maxMin'),
      at('session.hotelW'),
      at('session.whPerKm'),
    ],
    covers: ['session'],
  },
};

/** Parts of the cooling that a study may be without. */
export type CoolingPart = {
  key: 'chiller' | 'radiator' | 'heater';
  title: string;
  fields: FieldSpec[];
  more: FieldSpec[];
};

export const coolingParts: CoolingPart[] = [
  {
    key: 'chiller',
    title: 'Chiller',
    fields: [at('thermal.chiller.ratedW'), at('thermal.chiller.onC'), at('thermal.chiller.fullC')],
    more: [
      at('thermal.chiller.minCoolantC'),
      at('thermal.chiller.cop35'),
      at('thermal.chiller.copPerK'),
      at('thermal.chiller.deratePerKAbove35'),
    ],
  },
  {
    key: 'radiator',
    title: 'Radiator',
    fields: [at('thermal.radiator.parkedWPerK'), at('thermal.radiator.onC'), at('thermal.radiator.fullC')],
    more: [at('thermal.radiator.perMpsWPerK')],
  },
  {
    key: 'heater',
    title: 'Heater',
    fields: [at('thermal.heater.ratedW'), at('thermal.heater.onC'), at('thermal.heater.offC')],
    more: [at('thermal.heater.efficiency'), at('thermal.heater.maxCoolantC')],
  },
];

/** What a part is added with: usual values of the table of quantities, to be set by the person who adds it. */
export const newParts = {
  inlet: {
    resistanceMilliohm: 0.3,
    heatCapacityJPerK: 600,
    ambientWPerK: 5,
    currentMaxA: 500,
    derateFromC: 75,
    derateToC: 90,
  },
  boost: { powerMaxKw: 150, efficiency: 0.97 },
  'thermal.chiller': { ratedW: 5000, onC: 28, fullC: 34 },
  'thermal.radiator': { parkedWPerK: 60, perMpsWPerK: 9, onC: 24, fullC: 30 },
  'thermal.heater': { ratedW: 5000, onC: 8, offC: 16 },
  'strategy.coldLimit': { tempC: [-10, 0, 10, 20], cRate: [0.15, 0.5, 1.1, 2] },
  'station.powerSteps': [{ atMin: 10, powerKw: 75 }],
  'cell.anode': { potential: { electrodes: 'nmc811-graphite' }, share: 0.5 },
  'cell.entropicMvPerK': { x: [0, 0.5, 1], y: [-0.2, 0.05, -0.05] },
  'cell.resistanceShape': { x: [0, 0.2, 0.8, 1], y: [1.8, 1, 1, 1.2] },
} as const;

/** What stands where in a shut section, in a few words. */
export function sectionSummary(name: SectionName, study: SessionStudyInput): string {
  const { station, inlet, boost, pack, strategy, cell, thermal, session } = study;
  switch (name) {
    case 'station':
      return station.name;
    case 'inlet':
      return inlet
        ? [inlet.currentMaxA && `${inlet.currentMaxA} A`, `${inlet.resistanceMilliohm ?? 0} mΩ`]
            .filter(Boolean)
            .join(', ')
        : 'none';
    case 'boost':
      return boost ? `${boost.powerMaxKw} kW` : 'none';
    case 'pack':
      return pack.name;
    case 'taper':
      return taperSummary(strategy.taper);
    case 'guards':
      return 'of the strategy';
    case 'cell':
      return cell.name;
    case 'cooling':
      return coolingSummary(thermal);
    case 'session':
      return `${Math.round(session.startSoc * 100)} to ${Math.round((session.targetSoc ?? 1) * 100)} %`;
  }
}

function taperSummary(taper: SessionStudyInput['strategy']['taper']): string {
  switch (taper.shape) {
    case 'none':
      return 'none';
    case 'slope':
      return `${taper.points.length} points, in ${taper.unit}`;
    case 'ledges':
      return `${taper.steps.length} ledges, in ${taper.unit}`;
    case 'voltage-ledges':
      return `${taper.steps.length} voltage ledges, in ${taper.unit}`;
    case 'map':
      return `map ${taper.soc.length} × ${taper.tempC.length}, in ${taper.unit}`;
  }
}

function coolingSummary(thermal: SessionStudyInput['thermal']): string {
  const { chiller, radiator, heater, coolant } = thermal;
  if (coolant.flowLPerMin === 0) return 'no flow';
  const parts = [chiller && `chiller ${chiller.ratedW / 1000} kW`, radiator && 'radiator', heater && 'heater'].filter(
    Boolean,
  );
  return parts.length > 0 ? parts.join(', ') : 'coolant alone';
}
