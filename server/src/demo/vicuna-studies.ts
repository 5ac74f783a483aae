import type { DemoStudy } from './demo-study.ts';
import { vicuna, vicunaColdMorning, vicunaThirdStop } from './example-studies.ts';
import { ledges } from './strategies.ts';

/** Sessions of the long-distance van with the 110 kWh pack. */
export const vicunaStudies: readonly DemoStudy[] = [
  {
    revisions: [
      {
        when: '54d 15:10',
        by: 'ines',
        message: 'First run on the values of the drawings',
        title: 'Vicuña at Salar Tola, warm arrival',
        take: {
          cell: ['pouch', 1],
          pack: ['vicuna110', 1],
          thermal: ['vicunaLoop', 1],
          inlet: ['vicunaInlet', 1],
          station: ['tola', 1],
          strategy: ['vicunaLedges', 1],
        },
        session: { ...vicuna.session, startSoc: 0.1, startTempC: 28 },
      },
      {
        when: '45d 10:30',
        by: 'ines',
        message: 'Entropic coefficient of the cell',
        take: { cell: ['pouch', 2] },
      },
      {
        when: '41d 09:50',
        by: 'ines',
        message: 'Six ledges',
        take: { strategy: ['vicunaLedges', 2] },
      },
      {
        when: '39d 14:20',
        by: 'rosa',
        message: 'Four segments: the last one 2 K above the first; plate as measured',
        take: { pack: ['vicuna110', 2], thermal: ['vicunaLoop', 2] },
      },
      {
        when: '25d 16:45',
        by: 'rosa',
        message: 'Chiller earlier, ramp read from the log, inlet as measured',
        take: { thermal: ['vicunaLoop', 3], station: ['tola', 2], inlet: ['vicunaInlet', 2] },
      },
      {
        when: '15d 11:05',
        by: 'ines',
        message: '500 A, formed cells, hot limit from 34 °C',
        take: { cell: ['pouch', 3], pack: ['vicuna110', 3], strategy: ['vicunaLedges', 4] },
      },
      {
        when: '1d 17:40',
        by: 'ines',
        message: 'From empty and warm, as the logger had it on the plain',
        session: { startSoc: vicuna.session.startSoc, startTempC: vicuna.session.startTempC },
      },
    ],
    unsaved: {
      when: '14m',
      by: 'ines',
      own: {
        strategy: {
          hotDerate: { fromC: 36, toC: 43 },
          taper: ledges([0, 500], [0.46, 470], [0.55, 400], [0.65, 300], [0.76, 210], [0.87, 130]),
        },
      },
    },
  },
  {
    revisions: [
      {
        when: '37d 10:05',
        by: 'ines',
        message: 'As found after the night at Quirque',
        title: 'Winter van, no preconditioning',
        take: {
          cell: ['pouch', 2],
          pack: ['vicuna110', 2],
          thermal: ['vicunaLoop', 2],
          inlet: ['vicunaInlet', 1],
          station: ['tola', 1],
          strategy: ['winter', 1],
        },
        session: { ...vicunaColdMorning.session, startSoc: 0.1, startTempC: -8, targetSoc: 0.8 },
      },
      {
        when: '24d 11:30',
        by: 'rosa',
        message: 'Cold limit of the frost week; station ramp',
        take: {
          thermal: ['vicunaLoop', 3],
          inlet: ['vicunaInlet', 2],
          station: ['tola', 2],
          strategy: ['winter', 2],
        },
      },
      {
        when: '2d 10:20',
        by: 'ines',
        message: 'Formed cells, to 85 % as the drivers do',
        take: { cell: ['pouch', 3], pack: ['vicuna110', 3] },
        session: { targetSoc: 0.85 },
      },
    ],
  },
  {
    revisions: [
      {
        when: '34d 15:35',
        by: 'rosa',
        message: 'Third stop, loop still warm from the road',
        title: 'Third stop of a hot day',
        take: {
          cell: ['pouch', 2],
          pack: ['vicuna110', 2],
          thermal: ['vicunaLoop', 2],
          inlet: ['vicunaInlet', 1],
          station: ['tola', 1],
          strategy: ['vicunaLedges', 2],
        },
        session: { ...vicunaThirdStop.session, startSoc: 0.1 },
      },
      {
        when: '28d 09:25',
        by: 'rosa',
        message: 'Hot limit 36 to 44 °C; station ramp and inlet as measured',
        take: { inlet: ['vicunaInlet', 2], station: ['tola', 2], strategy: ['vicunaLedges', 3] },
      },
      {
        when: '23d 14:00',
        by: 'rosa',
        message: 'Chiller 3 K earlier: under a minute gained',
        take: { thermal: ['vicunaLoop', 3] },
      },
      {
        when: '6d 16:10',
        by: 'ines',
        message: '42 °C at plug-in, the worst that the logger had',
        session: { startTempC: 42, coolantStartC: 38 },
      },
    ],
  },
  {
    revisions: [
      {
        when: '12d 13:45',
        by: 'rosa',
        message: 'Contacts at 0.9 mΩ after 4,000 plug-ins',
        title: 'Worn inlet contacts, how much is lost',
        take: {
          cell: ['pouch', 3],
          pack: ['vicuna110', 3],
          thermal: ['vicunaLoop', 3],
          inlet: ['vicunaInlet', 2],
          station: ['tola', 2],
          strategy: ['vicunaLedges', 3],
        },
        own: { inlet: { resistanceMilliohm: 0.9 } },
        session: { ambientC: 31, startSoc: 0.1, startTempC: 30, targetSoc: 0.9, hotelW: 900, whPerKm: 245 },
      },
      {
        when: '11d 10:10',
        by: 'rosa',
        message: 'Less air around the socket: 3.4 W/K',
        own: { inlet: { ambientWPerK: 3.4 } },
      },
    ],
  },
  {
    revisions: [
      {
        when: '9d 11:15',
        by: 'mateo',
        message: 'The other van leaves 62 kW from 18 to 27 min',
        title: 'Two vans on one cabinet',
        take: {
          cell: ['pouch', 3],
          pack: ['vicuna110', 3],
          thermal: ['vicunaLoop', 3],
          inlet: ['vicunaInlet', 2],
          station: ['quilla', 2],
          strategy: ['vicunaLedges', 4],
        },
        session: { ambientC: 22, startSoc: 0.08, startTempC: 24, hotelW: 400, whPerKm: 245 },
      },
    ],
  },
  {
    revisions: [
      {
        when: '52d 16:20',
        by: 'rosa',
        message: 'Values of the drawing',
        title: 'Amarel to Tola over the Abra pass',
        take: {
          cell: ['pouch', 1],
          pack: ['vicuna110', 1],
          thermal: ['vicunaLoop', 1],
          inlet: ['vicunaInlet', 1],
          strategy: ['vicunaLedges', 1],
          vehicle: ['vicunaVan', 1],
          route: ['overAbra', 1],
        },
        trip: { ambientC: 8, startSoc: 0.9, startTempC: 16 },
      },
      {
        when: '36d 14:40',
        by: 'rosa',
        message: 'Drag and rolling of the coast-down',
        take: { vehicle: ['vicunaVan', 2], cell: ['pouch', 2], pack: ['vicuna110', 2] },
      },
      {
        when: '13d 09:30',
        by: 'rosa',
        message: 'Pack and loop as they are now',
        take: { cell: ['pouch', 3], pack: ['vicuna110', 3], thermal: ['vicunaLoop', 3], strategy: ['vicunaLedges', 4] },
      },
      {
        when: '3d 12:25',
        by: 'rosa',
        message: 'Leaving at 92 %, garage at 18 °C',
        trip: { startSoc: 0.92, startTempC: 18 },
      },
    ],
  },
];
