import type { SessionStudyInput } from '@voltiplano/engine';

/** A small study with every guard on, for tests of the desk. */
export const sampleStudy: SessionStudyInput = {
  format: 'voltiplano/study',
  version: 1,
  kind: 'session',
  title: 'Sample',
  cell: {
    name: 'sample 78 Ah',
    capacityAh: 78,
    massKg: 1.12,
    ocv: { electrodes: 'nmc811-graphite' },
    r0Milliohm: 0.72,
    rcPairs: [{ rMilliohm: 0.3, tauS: 8 }],
    activationKjPerMol: 21,
    anode: { potential: { electrodes: 'nmc811-graphite' }, share: 0.5 },
    vMaxV: 4.25,
    vMinV: 2.7,
  },
  pack: { name: '96 in series', series: 96, parallel: 2, socWindow: [0.03, 0.97], chargeCurrentMaxA: 380 },
  thermal: {
    coreToSurfaceWPerK: 520,
    plateWPerK: 900,
    ambientWPerK: 6,
    coolant: { flowLPerMin: 12, volumeL: 7 },
    chiller: { ratedW: 5500, onC: 27, fullC: 33 },
  },
  inlet: { resistanceMilliohm: 0.25, currentMaxA: 500 },
  station: { name: 'hall', powerMaxKw: 250, currentMaxA: 500, voltageMaxV: 500 },
  strategy: {
    name: 'ledges',
    taper: {
      shape: 'ledges',
      unit: 'A',
      steps: [
        { fromSoc: 0, value: 360 },
        { fromSoc: 0.3, value: 310 },
        { fromSoc: 0.5, value: 230 },
      ],
    },
    cellVoltageCeilingV: 4.17,
    hotDerate: { fromC: 45, toC: 55 },
    anodeMarginMv: 20,
  },
  session: { ambientC: 5, startSoc: 0.1, startTempC: 8 },
};
