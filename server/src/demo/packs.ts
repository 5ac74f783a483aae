import type { DemoItem } from './demo-item.ts';
import { suri, town, vicuna } from './example-studies.ts';

export const packs = {
  vicuna110: {
    kind: 'pack',
    name: vicuna.pack.name,
    notes: '400-V class, four modules in a row along the plate, one segment each.',
    asIfFrom: 'drawing set B and the contactor test',
    revisions: [
      {
        when: '59d 11:20',
        by: 'ines',
        message: 'Drawing set A',
        body: { ...vicuna.pack, segments: 2, busbarMilliohm: 6.5, chargeCurrentMaxA: 450 },
      },
      {
        when: '41d 14:05',
        by: 'rosa',
        message: 'Four segments along the coolant instead of two',
        body: { ...vicuna.pack, busbarMilliohm: 6.5, chargeCurrentMaxA: 450 },
      },
      {
        when: '18d 16:40',
        by: 'ines',
        message: '500 A after the contactor test; busbars of drawing set B',
        body: vicuna.pack,
      },
    ],
  },
  vicuna86: {
    kind: 'pack',
    name: 'Vicuña 86, 108 in series',
    notes: 'The short van: same cell, three in parallel. Contactors for 400 A.',
    asIfFrom: 'drawing set B',
    revisions: [
      {
        when: '52d 09:45',
        by: 'rosa',
        message: 'Added',
        body: {
          ...vicuna.pack,
          series: 108,
          parallel: 3,
          chargeCurrentMaxA: 400,
          dischargeCurrentMaxA: 700,
          structureJPerK: 40_000,
        },
      },
    ],
  },
  suri88: {
    kind: 'pack',
    name: suri.pack.name,
    notes: '800-V class. Rests at 600 V and more: a 500 V station needs the boost converter.',
    asIfFrom: 'drawing set of the coupé',
    revisions: [
      { when: '58d 15:30', by: 'rosa', message: 'Added', body: { ...suri.pack, chargeCurrentMaxA: 380 } },
      { when: '24d 11:15', by: 'ines', message: '420 A: new fuse', body: suri.pack },
    ],
  },
  town45: {
    kind: 'pack',
    name: town.pack.name,
    notes: 'One string of long cells under the floor of the town van.',
    asIfFrom: 'drawing set of the town van',
    revisions: [{ when: '44d 10:10', by: 'rosa', message: 'Added', body: town.pack }],
  },
} as const satisfies Record<string, DemoItem>;
