import type { DemoItem } from './demo-item.ts';
import { suri, vicuna, vicunaLeg } from './example-studies.ts';

/** Both vehicles, and routes across the plain. */
export const vehicles = {
  vicunaVan: {
    kind: 'vehicle',
    name: 'Vicuña, long-distance van',
    notes: 'With four people and their things.',
    asIfFrom: 'coast-down on the salt flat',
    revisions: [
      {
        when: '54d 09:30',
        by: 'ines',
        message: 'Values of the drawing',
        body: { ...vicunaLeg.vehicle, dragAreaM2: 1.24, rollingCoefficient: 0.01 },
      },
      { when: '37d 15:25', by: 'rosa', message: 'Drag and rolling from the coast-down', body: vicunaLeg.vehicle },
    ],
  },
  suriCoupe: {
    kind: 'vehicle',
    name: 'Suri, coupé',
    notes: 'Two people, summer tyres.',
    asIfFrom: 'wind tunnel of the scale model',
    revisions: [
      {
        when: '54d 10:00',
        by: 'ines',
        message: 'Added',
        body: {
          massKg: 2080,
          dragAreaM2: 0.52,
          rollingCoefficient: 0.0088,
          driveEfficiency: 0.9,
          regenEfficiency: 0.76,
          hotelW: 300,
          cabinWPerAmbient: { tempC: [-20, 0, 20, 26, 40], watts: [3600, 1900, 200, 400, 1900] },
          cabinAtStops: 0.5,
        },
      },
    ],
  },
  overAbra: {
    kind: 'route',
    name: 'Amarel to Tola over the Abra pass',
    notes: 'One leg, 620 m higher at its end.',
    asIfFrom: 'the road book of the plain',
    revisions: [{ when: '53d 09:40', by: 'rosa', message: 'Added', body: { legs: vicunaLeg.trip.legs } }],
  },
  toAltamira: {
    kind: 'route',
    name: 'Amarel to Altamira in one day',
    notes: 'Three legs with stops at Hornillo and Tola. The engine drives one leg so far; the route is kept whole.',
    asIfFrom: 'the road book of the plain',
    revisions: [
      {
        when: '36d 09:20',
        by: 'rosa',
        message: 'Added',
        body: {
          legs: [
            {
              km: 176,
              kmPerH: 108,
              climbM: 410,
              station: { ...vicuna.station, name: 'Salar Hornillo 500 A' },
              depart: { rule: 'target', soc: 0.8 },
            },
            { km: 203, kmPerH: 112, climbM: -150, station: vicuna.station, depart: { rule: 'reach-next' } },
            { km: 168, kmPerH: 104, climbM: 380, windKmPerH: 15 },
          ],
        },
      },
      {
        when: '20d 10:45',
        by: 'rosa',
        message: 'Depart from Hornillo at 70 %: the second leg is mostly downhill',
        body: {
          legs: [
            {
              km: 176,
              kmPerH: 108,
              climbM: 410,
              station: { ...vicuna.station, name: 'Salar Hornillo 500 A' },
              depart: { rule: 'target', soc: 0.7 },
            },
            { km: 203, kmPerH: 112, climbM: -150, station: vicuna.station, depart: { rule: 'reach-next' } },
            { km: 168, kmPerH: 104, climbM: 380, windKmPerH: 15 },
          ],
        },
      },
    ],
  },
  oroRing: {
    kind: 'route',
    name: 'Ring by Oro and Cima',
    notes: 'The coupé’s fast round: one stop at Cima.',
    asIfFrom: 'the road book of the plain',
    revisions: [
      {
        when: '32d 14:50',
        by: 'rosa',
        message: 'Added',
        body: {
          legs: [
            { km: 212, kmPerH: 124, climbM: 280, station: suri.station, depart: { rule: 'taper', powerKw: 120 } },
            { km: 188, kmPerH: 120, climbM: -280 },
          ],
        },
      },
    ],
  },
} as const satisfies Record<string, DemoItem>;
