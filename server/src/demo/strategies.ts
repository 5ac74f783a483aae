import type { DemoItem } from './demo-item.ts';
import { suri, suriMap, town, vicuna, vicunaColdMorning } from './example-studies.ts';

type LedgeRow = [fromSoc: number, amperes: number];

/** A taper of ledges in A. */
export function ledges(...rows: LedgeRow[]) {
  return { shape: 'ledges', unit: 'A', steps: rows.map(([fromSoc, value]) => ({ fromSoc, value })) } as const;
}

export const strategies = {
  vicunaLedges: {
    kind: 'strategy',
    name: vicuna.strategy.name,
    notes: 'For the 110 on 500 A stations. The last digit counts the campaigns, not the revisions.',
    asIfFrom: 'the campaign on the plain',
    revisions: [
      {
        when: '55d 10:20',
        by: 'ines',
        message: 'Four ledges, read from the old van',
        body: { ...vicuna.strategy, taper: ledges([0, 450], [0.5, 360], [0.66, 260], [0.84, 140]) },
      },
      {
        when: '42d 17:30',
        by: 'ines',
        message: 'Six ledges; first one to 40 %',
        body: {
          ...vicuna.strategy,
          taper: ledges([0, 480], [0.4, 440], [0.52, 380], [0.64, 290], [0.76, 200], [0.87, 120]),
        },
      },
      {
        when: '31d 09:55',
        by: 'ines',
        message: 'First ledge 500 A, held 2 % longer',
        body: {
          ...vicuna.strategy,
          hotDerate: { fromC: 36, toC: 44 },
        },
      },
      {
        when: '16d 11:25',
        by: 'rosa',
        message: 'Hot limit from 34 °C: surfaces lag behind the cores',
        body: vicuna.strategy,
      },
    ],
  },
  vicuna86Ledges: {
    kind: 'strategy',
    name: 'Vicuña 86 ledges 3',
    notes: 'For the short van. Its pack gives out at 400 A.',
    asIfFrom: 'the ledges of the 110, three quarters of the current',
    revisions: [
      {
        when: '51d 14:45',
        by: 'ines',
        message: 'Three quarters of the ledges of the 110',
        body: {
          ...vicuna.strategy,
          taper: ledges([0, 360], [0.4, 330], [0.52, 285], [0.64, 215], [0.76, 150], [0.87, 90]),
          cutoffA: 12,
        },
      },
      {
        when: '22d 10:35',
        by: 'ines',
        message: 'Ledge at 36 % in place of 40 %',
        body: {
          ...vicuna.strategy,
          taper: ledges([0, 380], [0.36, 330], [0.5, 290], [0.62, 225], [0.74, 155], [0.86, 95]),
          cutoffA: 12,
        },
      },
    ],
  },
  vicunaSlope: {
    kind: 'strategy',
    name: 'Vicuña slope 2',
    notes: 'In C, so it serves both packs. Beyond the contactors of the 86 below 30 %.',
    asIfFrom: 'a first try at a slope',
    revisions: [
      {
        when: '54d 13:30',
        by: 'ines',
        message: 'Added',
        body: {
          ...vicuna.strategy,
          taper: {
            shape: 'slope',
            unit: 'C',
            points: [
              { soc: 0, value: 1.95 },
              { soc: 0.3, value: 1.9 },
              { soc: 0.5, value: 1.45 },
              { soc: 0.7, value: 0.95 },
              { soc: 0.85, value: 0.5 },
              { soc: 1, value: 0.2 },
            ],
          },
          hotDerate: { fromC: 36, toC: 44 },
        },
      },
    ],
  },
  winter: {
    kind: 'strategy',
    name: 'Vicuña winter 2',
    notes: 'Wider anode margin and a lower cold limit for cells below 10 °C.',
    asIfFrom: 'the frost week at Quirque',
    revisions: [
      {
        when: '38d 10:15',
        by: 'ines',
        message: 'Ledges with an anode margin of 35 mV',
        body: { ...vicunaColdMorning.strategy, anodeMarginMv: 35 },
      },
      {
        when: '25d 15:00',
        by: 'rosa',
        message: 'Cold limit 0.3 C at 0 °C: lower than the cell sheet allows',
        body: {
          ...vicunaColdMorning.strategy,
          anodeMarginMv: 35,
          coldLimit: { tempC: [-20, -10, 0, 10, 20, 28], cRate: [0.03, 0.1, 0.3, 0.7, 1.25, 1.8] },
        },
      },
    ],
  },
  suriSlope: {
    kind: 'strategy',
    name: suri.strategy.name,
    notes: 'Slope in C; 3.3 C at 8 % is the top.',
    asIfFrom: 'the tuning of the third week',
    revisions: [
      {
        when: '53d 11:05',
        by: 'ines',
        message: 'Flat 2.8 C to 30 %',
        body: {
          ...suri.strategy,
          taper: {
            shape: 'slope',
            unit: 'C',
            points: [
              { soc: 0, value: 2.8 },
              { soc: 0.3, value: 2.8 },
              { soc: 0.5, value: 2.1 },
              { soc: 0.7, value: 1.4 },
              { soc: 0.85, value: 0.7 },
              { soc: 1, value: 0.2 },
            ],
          },
        },
      },
      { when: '23d 16:15', by: 'ines', message: '3.3 C at 8 %, earlier taper', body: suri.strategy },
    ],
  },
  suriMap: {
    kind: 'strategy',
    name: suriMap.strategy.name,
    notes: 'Power over soc and temperature, for evenings without preconditioning.',
    asIfFrom: 'the cool evenings at Cima',
    revisions: [{ when: '50d 16:50', by: 'rosa', message: 'Added', body: suriMap.strategy }],
  },
  townSteps: {
    kind: 'strategy',
    name: town.strategy.name,
    notes: 'Steps at cell voltages: soc of an LFP cell is not known well enough to taper by it.',
    asIfFrom: 'cell sheet and one winter',
    revisions: [
      {
        when: '43d 14:10',
        by: 'rosa',
        message: 'Three steps',
        body: {
          ...town.strategy,
          taper: {
            shape: 'voltage-ledges',
            unit: 'A',
            steps: [{ untilCellV: 3.48, value: 200 }, { untilCellV: 3.5, value: 110 }, { value: 45 }],
          },
        },
      },
      { when: '21d 12:30', by: 'rosa', message: '230 A first, then four steps', body: town.strategy },
    ],
  },
} as const satisfies Record<string, DemoItem>;
