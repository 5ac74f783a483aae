import type { DemoItem } from './demo-item.ts';
import { suri, town, vicuna } from './example-studies.ts';

const { chiller } = vicuna.thermal;
const [vicunaInlet, suriInlet] = [vicuna.inlet ?? {}, suri.inlet ?? {}];

/** Thermal systems and inlets: what is kept cool. */
export const cooling = {
  vicunaLoop: {
    kind: 'thermal',
    name: 'Vicuña loop, chiller 4.2 kW',
    notes: 'Plate below the modules. The chiller comes in at 29 °C of the hottest surface and is full at 36 °C.',
    asIfFrom: 'loop test on the bench, flow 14 L/min',
    revisions: [
      {
        when: '57d 10:25',
        by: 'rosa',
        message: 'Loop as drawn',
        body: {
          ...vicuna.thermal,
          plateWPerK: 700,
          chiller: chiller && { ...chiller, onC: 32, fullC: 38 },
        },
      },
      {
        when: '40d 16:20',
        by: 'rosa',
        message: 'Plate from the loop test: 820 W/K',
        body: { ...vicuna.thermal, chiller: chiller && { ...chiller, onC: 32, fullC: 38 } },
      },
      { when: '26d 09:35', by: 'rosa', message: 'Chiller starts 3 K earlier', body: vicuna.thermal },
    ],
  },
  suriLoop: {
    kind: 'thermal',
    name: 'Suri loop, chiller 7.5 kW',
    notes: 'Plates on both sides of the cells.',
    asIfFrom: 'loop simulation, flow 18 L/min',
    revisions: [{ when: '57d 11:50', by: 'rosa', message: 'Added', body: suri.thermal }],
  },
  townLoop: {
    kind: 'thermal',
    name: 'Town van loop',
    notes: 'Chiller and radiator of the Vicuña on a smaller plate.',
    asIfFrom: 'loop test, scaled by area',
    revisions: [{ when: '44d 10:40', by: 'rosa', message: 'Added', body: town.thermal }],
  },
  smallChiller: {
    kind: 'thermal',
    name: 'Vicuña loop, chiller 2.6 kW',
    notes: 'First prototype. Kept for the studies that used it.',
    asIfFrom: 'the first prototype',
    revisions: [
      {
        when: '56d 09:15',
        by: 'rosa',
        message: 'First prototype',
        body: { ...vicuna.thermal, plateWPerK: 560, chiller: chiller && { ...chiller, ratedW: 2600 } },
      },
    ],
    archived: { when: '40d 16:35', by: 'rosa' },
  },
  vicunaInlet: {
    kind: 'inlet',
    name: 'Vicuña inlet 500 A',
    notes: 'Contacts new. Worn ones are a matter of the study.',
    asIfFrom: 'temperature rise at 500 A, one hour',
    revisions: [
      { when: '57d 14:00', by: 'rosa', message: 'Added', body: { ...vicunaInlet, resistanceMilliohm: 0.32 } },
      { when: '33d 13:20', by: 'rosa', message: 'Contact resistance measured at 500 A', body: vicunaInlet },
    ],
  },
  suriInlet: {
    kind: 'inlet',
    name: 'Suri inlet 450 A',
    notes: 'Larger pins, shorter leads.',
    asIfFrom: 'temperature rise at 450 A, one hour',
    revisions: [{ when: '57d 14:25', by: 'rosa', message: 'Added', body: suriInlet }],
  },
} as const satisfies Record<string, DemoItem>;
