import type { DemoItem } from './demo-item.ts';
import { suri, suriBoosted, vicuna, vicunaShared } from './example-studies.ts';

const { powerSteps: _whatTheOtherLeaves, ...quillaAlone } = vicunaShared.station;

/** Six places of the Salar network. */
export const stations = {
  tola: {
    kind: 'station',
    name: vicuna.station.name,
    notes: 'Four posts at the crossing. Holds 500 A for a full session.',
    asIfFrom: 'visits in the first season',
    revisions: [
      {
        when: '58d 09:20',
        by: 'ines',
        message: 'Nameplate',
        body: { ...vicuna.station, rampAPerS: 20 },
      },
      { when: '29d 17:10', by: 'rosa', message: 'Ramp read from a log: 60 A/s', body: vicuna.station },
    ],
  },
  cima: {
    kind: 'station',
    name: suri.station.name,
    notes: 'The only post beyond 300 kW on the road to Altamira.',
    asIfFrom: 'nameplate',
    revisions: [{ when: '56d 10:30', by: 'ines', message: 'Added', body: suri.station }],
  },
  oro: {
    kind: 'station',
    name: 'Salar Oro 150',
    notes: 'Liquid-cooled cable for 400 A. Sags at noon when the mine draws.',
    asIfFrom: 'nameplate and two visits',
    revisions: [
      {
        when: '55d 16:00',
        by: 'ines',
        message: 'Added',
        body: { powerMaxKw: 150, currentMaxA: 400, voltageMinV: 200, voltageMaxV: 920, rampAPerS: 40 },
      },
    ],
  },
  quirque: {
    kind: 'station',
    name: 'Salar Quirque 60',
    notes: 'One small post behind the hostel. 150 A whatever the voltage.',
    asIfFrom: 'nameplate',
    revisions: [
      {
        when: '47d 15:45',
        by: 'rosa',
        message: 'Added',
        body: {
          powerMaxKw: 60,
          currentMaxA: 150,
          voltageMinV: 150,
          voltageMaxV: 500,
          rampAPerS: 20,
          rectifierEfficiency: 0.93,
        },
      },
    ],
  },
  quilla: {
    kind: 'station',
    name: vicunaShared.station.name,
    notes: 'One cabinet of 300 kW, two posts. What the other car leaves stands in the power steps.',
    asIfFrom: 'a session with a second van beside it',
    revisions: [
      {
        when: '45d 12:10',
        by: 'rosa',
        message: 'Added, alone at the cabinet',
        body: quillaAlone,
      },
      { when: '30d 10:00', by: 'rosa', message: 'A second van from 18 to 27 min', body: vicunaShared.station },
    ],
  },
  puente: {
    kind: 'station',
    name: suriBoosted.station.name,
    notes: 'Older cabinet: 500 V at most. An 800-V-class pack needs its boost converter here.',
    asIfFrom: 'nameplate',
    revisions: [{ when: '43d 09:50', by: 'rosa', message: 'Added', body: suriBoosted.station }],
  },
} as const satisfies Record<string, DemoItem>;
