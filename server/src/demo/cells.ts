import type { DemoItem } from './demo-item.ts';
import { suri, town, vicuna } from './example-studies.ts';

const { entropicMvPerK: _measuredLater, ...beforeCalorimeter } = vicuna.cell;
const beforeBench = { ...vicuna.cell, r0Milliohm: 0.84, anode: { ...vicuna.cell.anode, share: 0.6 } };

export const cells = {
  pouch: {
    kind: 'cell',
    name: vicuna.cell.name,
    notes: 'Pouch of the Vicuña packs. Three-electrode cells of the same lot gave the share of the negative electrode.',
    asIfFrom: 'pulse tests at 25 °C, calorimeter, three-electrode cells',
    revisions: [
      {
        when: '60d 10:15',
        by: 'ines',
        message: 'Values of the cell sheet',
        body: { ...beforeCalorimeter, r0Milliohm: 0.84, anode: beforeBench.anode },
        notes: 'Pouch of the Vicuña packs. Values of the sheet, nothing measured yet.',
      },
      { when: '46d 11:40', by: 'rosa', message: 'Entropic coefficient from the calorimeter', body: beforeBench },
      {
        when: '19d 15:10',
        by: 'rosa',
        message: 'Resistance of formed cells: 0.78 mΩ instead of 0.84; anode share 0.63',
        body: vicuna.cell,
      },
    ],
  },
  prismatic: {
    kind: 'cell',
    name: suri.cell.name,
    notes: 'Low resistance, for the coupé. No entropic coefficient measured yet: reversible heat is left out.',
    asIfFrom: 'cell sheet and pulse tests at 25 °C',
    revisions: [{ when: '59d 10:05', by: 'rosa', message: 'Added', body: suri.cell }],
  },
  blade: {
    kind: 'cell',
    name: town.cell.name,
    notes: 'LFP for the town van. Flat between 20 and 90 %, so its charge is cut by voltage, not by soc.',
    asIfFrom: 'cell sheet',
    revisions: [
      {
        when: '44d 09:30',
        by: 'rosa',
        message: 'Values of the cell sheet',
        body: { ...town.cell, r0Milliohm: 0.52 },
      },
      { when: '27d 10:50', by: 'rosa', message: 'Resistance after the first 50 cycles', body: town.cell },
    ],
  },
} as const satisfies Record<string, DemoItem>;
