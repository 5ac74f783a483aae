import { quantities, type TripStudyInput } from '@voltiplano/engine';
import { quantityPathOf, shownUnit, measureOf, storedText } from '../components/fields/measure.ts';
import { potentialSources, sourceOf } from './potential-sources.ts';
import type { TemperatureUnit } from './units.ts';

/** What the parts of a study are called, by their name in the file. */
const SECTIONS: Record<string, string> = {
  station: 'Station',
  inlet: 'Inlet',
  boost: 'Boost',
  pack: 'Pack',
  strategy: 'Strategy',
  cell: 'Cell',
  thermal: 'Cooling',
  session: 'Session',
  vehicle: 'Vehicle',
  trip: 'Trip',
};

/** Fields that are no quantity, or whose quantity stands for more than one of them. */
const LABELS: Record<string, string> = {
  title: 'Title',
  'pack.socWindow[0]': 'Usable window, low',
  'pack.socWindow[1]': 'Usable window, high',
  'strategy.taper.shape': 'Shape',
  'strategy.taper.unit': 'Numbers in',
  'cell.ocv': 'Rest voltage',
  'cell.anode.potential': 'Anode potential',
  'trip.depart': 'Depart',
};

const SHAPES: Record<string, string> = { 'voltage-ledges': 'voltage ledges' };

/** The part a path lies in, as the inputs head it; empty for the study's own fields. */
export function sectionOfPath(path: string): string {
  return SECTIONS[/^[A-Za-z]+/.exec(path)?.[0] ?? ''] ?? '';
}

/** What a field is called on screen; its path where nobody has named it. */
export function fieldLabel(path: string): string {
  if (LABELS[path]) return LABELS[path];
  if (/^[A-Za-z]+\.name$/.test(path)) return 'Name';
  const quantity = quantityPathOf(path);
  return quantity ? quantities[quantity].label : path;
}

/** The unit a field has on screen; empty for a word or a pure number. */
export function fieldUnit(path: string, temperature: TemperatureUnit): string {
  const quantity = quantityPathOf(path);
  return quantity ? shownUnit(measureOf(quantity), temperature) : '';
}

/** A value as its field shows it, without the unit; null where nothing stands. */
export function fieldText(path: string, value: unknown, temperature: TemperatureUnit): string | null {
  if (value === undefined || value === null) return null;
  const quantity = quantityPathOf(path);
  if (quantity && typeof value === 'number') return storedText(value, measureOf(quantity), temperature);
  if (path === 'strategy.taper.shape') return SHAPES[value as string] ?? (value as string);
  if (path.endsWith('depart')) return departWords(value as Depart);
  return typeof value === 'string' ? value : JSON.stringify(value);
}

/** Where a potential comes from. */
export function potentialWords(potential: unknown): string | null {
  if (potential === undefined || potential === null) return null;
  const source = sourceOf(potential as Parameters<typeof sourceOf>[0]);
  return potentialSources.find(({ value }) => value === source)!.label;
}

type Depart = NonNullable<TripStudyInput['trip']['depart']>;

/** When a stop ends, in words. */
export function departWords(depart: Depart): string {
  switch (depart.rule) {
    case 'target':
      return `at ${Number((depart.soc * 100).toPrecision(12))} %`;
    case 'reach-next':
      return 'once the next stop is in reach';
    case 'taper':
      return `once power falls to ${depart.powerKw} kW`;
  }
}
