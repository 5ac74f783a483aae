import type { DemoStudy } from './demo-study.ts';
import { suri, suriBoosted, suriMap } from './example-studies.ts';

/** Sessions of the coupé with the 800-V-class pack. */
export const suriStudies: readonly DemoStudy[] = [
  {
    revisions: [
      {
        when: '49d 11:00',
        by: 'rosa',
        message: 'Map over soc and temperature, evening at 4 °C',
        title: 'Suri map against slope, cool evening',
        take: {
          cell: ['prismatic', 1],
          pack: ['suri88', 1],
          thermal: ['suriLoop', 1],
          inlet: ['suriInlet', 1],
          station: ['cima', 1],
          strategy: ['suriMap', 1],
        },
        session: { ...suriMap.session, startSoc: 0.1 },
      },
      {
        when: '48d 15:05',
        by: 'rosa',
        message: 'The slope on the same evening: five minutes faster, less anode margin',
        take: { strategy: ['suriSlope', 1] },
      },
    ],
    archived: { when: '22d 16:00', by: 'rosa' },
  },
  {
    revisions: [
      {
        when: '43d 10:45',
        by: 'ines',
        message: 'Flat 2.8 C, preconditioned',
        title: 'Suri at full power',
        take: {
          cell: ['prismatic', 1],
          pack: ['suri88', 1],
          thermal: ['suriLoop', 1],
          inlet: ['suriInlet', 1],
          station: ['cima', 1],
          strategy: ['suriSlope', 1],
        },
        session: { ...suri.session, startSoc: 0.1, startTempC: 30 },
      },
      {
        when: '22d 13:35',
        by: 'ines',
        message: '3.3 C at 8 %, 420 A',
        take: { pack: ['suri88', 2], strategy: ['suriSlope', 2] },
      },
      {
        when: '4d 10:00',
        by: 'ines',
        message: 'From 6 %, preconditioned to 33 °C',
        session: { startSoc: suri.session.startSoc, startTempC: suri.session.startTempC },
      },
    ],
  },
  {
    revisions: [
      {
        when: '17d 11:50',
        by: 'mateo',
        message: 'Without the converter: refused, the pack rests above 500 V',
        title: 'Suri on a 500 V cabinet, with boost',
        take: {
          cell: ['prismatic', 1],
          pack: ['suri88', 2],
          thermal: ['suriLoop', 1],
          inlet: ['suriInlet', 1],
          station: ['puente', 1],
          strategy: ['suriSlope', 2],
        },
        session: suriBoosted.session,
      },
      {
        when: '17d 12:05',
        by: 'mateo',
        message: 'Boost converter of 150 kW',
        boost: suriBoosted.boost,
      },
    ],
  },
];
