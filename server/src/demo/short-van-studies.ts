import type { DemoStudy } from './demo-study.ts';
import { town } from './example-studies.ts';
import { ledges } from './strategies.ts';

/** Sessions of the short van with the 86 kWh pack, and of the town van. */
export const shortVanStudies: readonly DemoStudy[] = [
  {
    revisions: [
      {
        when: '51d 15:20',
        by: 'rosa',
        message: 'First prototype, slope in C',
        title: 'Short van with the chiller of 2.6 kW',
        take: {
          cell: ['pouch', 1],
          pack: ['vicuna86', 1],
          thermal: ['smallChiller', 1],
          inlet: ['vicunaInlet', 1],
          station: ['tola', 1],
          strategy: ['vicunaSlope', 1],
        },
        session: { ambientC: 38, startSoc: 0.1, startTempC: 37, hotelW: 2200, whPerKm: 232 },
      },
      {
        when: '46d 17:15',
        by: 'rosa',
        message: 'Entropic coefficient: hardly a change. The chiller is too small',
        take: { cell: ['pouch', 2] },
      },
    ],
    archived: { when: '39d 17:00', by: 'rosa' },
  },
  {
    revisions: [
      {
        when: '44d 15:30',
        by: 'mateo',
        message: 'Quirque at −6 °C, pack at −3 °C',
        title: 'Cold arrival against a weak station',
        take: {
          cell: ['pouch', 2],
          pack: ['vicuna86', 1],
          thermal: ['vicunaLoop', 1],
          inlet: ['vicunaInlet', 1],
          station: ['quirque', 1],
          strategy: ['vicuna86Ledges', 1],
        },
        session: { ambientC: -6, startSoc: 0.05, startTempC: -3, targetSoc: 0.85, hotelW: 1200, whPerKm: 252 },
      },
      {
        when: '95m',
        by: 'mateo',
        message: 'Cells, plate and inlet as measured; 2.8 kW for the cabin, as logged',
        take: {
          cell: ['pouch', 3],
          thermal: ['vicunaLoop', 3],
          inlet: ['vicunaInlet', 2],
          strategy: ['vicuna86Ledges', 2],
        },
        session: { hotelW: 2800 },
      },
    ],
  },
  {
    revisions: [
      {
        when: '40d 17:20',
        by: 'ines',
        message: 'Ledge at 40 %, the reference',
        title: 'Ledge at 36 %, worth it?',
        take: {
          cell: ['pouch', 2],
          pack: ['vicuna86', 1],
          thermal: ['vicunaLoop', 2],
          inlet: ['vicunaInlet', 1],
          station: ['oro', 1],
          strategy: ['vicuna86Ledges', 1],
        },
        session: { ambientC: 26, startSoc: 0.05, startTempC: 29, hotelW: 500, whPerKm: 232 },
      },
      {
        when: '35d 15:50',
        by: 'ines',
        message: '400 A to 36 %: Oro hides it, 150 kW hold',
        own: { strategy: { taper: ledges([0, 400], [0.36, 330], [0.5, 290], [0.62, 225], [0.74, 155], [0.86, 95]) } },
      },
      {
        when: '33d 10:40',
        by: 'ines',
        message: 'The same at Tola, where the station does not hold',
        take: { station: ['tola', 1] },
      },
      {
        when: '30d 16:05',
        by: 'ines',
        message: 'Arriving at 33 °C: the hot limit takes what the ledge gives',
        session: { startTempC: 33 },
      },
      {
        when: '21d 09:45',
        by: 'rosa',
        message: 'As taken into the library: 380 A. Loop and inlet as measured',
        take: {
          thermal: ['vicunaLoop', 3],
          inlet: ['vicunaInlet', 2],
          station: ['tola', 2],
          strategy: ['vicuna86Ledges', 2],
        },
        own: { strategy: { taper: ledges([0, 380], [0.36, 330], [0.5, 290], [0.62, 225], [0.74, 155], [0.86, 95]) } },
      },
      {
        when: '1d 14:55',
        by: 'ines',
        message: 'Formed cells, 29 °C again: nothing gained to speak of',
        take: { cell: ['pouch', 3] },
        session: { startTempC: 29 },
      },
    ],
  },
  {
    revisions: [
      {
        when: '32d 09:15',
        by: 'rosa',
        message: 'Oro as on its nameplate',
        title: 'Station that sags at noon',
        take: {
          cell: ['pouch', 2],
          pack: ['vicuna86', 1],
          thermal: ['vicunaLoop', 2],
          inlet: ['vicunaInlet', 2],
          station: ['oro', 1],
          strategy: ['vicuna86Ledges', 1],
        },
        session: { ambientC: 30, startSoc: 0.08, startTempC: 27, hotelW: 1100, whPerKm: 232 },
      },
      {
        when: '31d 13:40',
        by: 'rosa',
        message: '75 kW from minute 9: what the display said',
        own: { station: { powerSteps: [{ atMin: 9, powerKw: 75 }] } },
      },
      {
        when: '29d 10:55',
        by: 'rosa',
        message: 'It comes back after 19 min',
        own: {
          station: {
            powerSteps: [
              { atMin: 9, powerKw: 75 },
              { atMin: 28, powerKw: 150 },
            ],
          },
        },
      },
      {
        when: '20d 15:15',
        by: 'mateo',
        message: 'Ledge at 36 % as well',
        take: { strategy: ['vicuna86Ledges', 2] },
      },
      {
        when: '5d 11:35',
        by: 'rosa',
        message: 'Two steps down, as in the second log',
        own: {
          station: {
            powerSteps: [
              { atMin: 9, powerKw: 90 },
              { atMin: 15, powerKw: 60 },
              { atMin: 28, powerKw: 150 },
            ],
          },
        },
      },
    ],
  },
  {
    revisions: [
      {
        when: '42d 11:10',
        by: 'mateo',
        message: 'Three voltage steps',
        title: 'Town van, LFP, steps at cell voltages',
        take: {
          cell: ['blade', 1],
          pack: ['town45', 1],
          thermal: ['townLoop', 1],
          station: ['oro', 1],
          strategy: ['townSteps', 1],
        },
        session: town.session,
      },
      {
        when: '26d 14:30',
        by: 'mateo',
        message: 'Resistance after 50 cycles',
        take: { cell: ['blade', 2] },
      },
      {
        when: '8d 15:40',
        by: 'mateo',
        message: '230 A first, four steps',
        take: { strategy: ['townSteps', 2] },
      },
    ],
  },
];
