import { legDifferences } from './leg-differences.ts';
import { fieldLabel, fieldText, fieldUnit, potentialWords, sectionOfPath } from './study-words.ts';
import { tableDifference, taperTableDifferences, type TableDifference } from './table-differences.ts';
import { tableAt } from './table-specs.ts';
import type { TemperatureUnit } from './units.ts';

/** A field that says something else, as it is shown on screen; null on a side that does not have it. */
export type ValueDifference = {
  kind: 'value';
  /** Path of the field in the file. */
  path: string;
  /** The part it lies in: "Strategy"; empty for the study's own fields. */
  section: string;
  label: string;
  unit: string;
  before: string | null;
  after: string | null;
};

export type Difference = ValueDifference | TableDifference;

/**
 * What differs between two studies of any kind, in the words and units on screen, in the order of the file: fields one
 * by one, tables by the rows that differ. What stands in the files is compared, not filled-in defaults.
 *
 * @param before  a study file, a part of one such as `{ station }`, or nothing: then everything in `after` is listed
 */
export function studyDifferences(before: unknown, after: unknown, temperature: TemperatureUnit): Difference[] {
  return differing({ path: '', key: '', section: '' }, before, after, temperature);
}

/**
 * What differs between two revisions of a part, as `studyDifferences` says it.
 *
 * @param kind  the part's name in a study file, or `route` for `{ legs }`
 */
export function partDifferences(
  kind: string,
  before: unknown,
  after: unknown,
  temperature: TemperatureUnit,
): Difference[] {
  const name = kind === 'route' ? 'trip' : kind;
  return studyDifferences({ [name]: before }, { [name]: after }, temperature);
}

/** Where the comparison stands: the path in the file, and the path that words are looked up by. */
type Place = { path: string; key: string; section: string };

function differing(place: Place, a: unknown, b: unknown, temperature: TemperatureUnit): Difference[] {
  if (JSON.stringify(a) === JSON.stringify(b)) return [];
  const { key } = place;
  if (key === 'strategy.taper') return taperDifferences(place, a, b, temperature);
  if (key === 'cell.ocv' || key === 'cell.anode.potential') return potentialDifferences(place, a, b, temperature);
  if (key === 'trip.legs') return routeDifferences(place, a, b, temperature);
  const table = tableAt(key, {});
  if (table) return atPlace(place, tableDifference(table, '', [a, b], temperature));
  if (!key.endsWith('depart') && [a, b].some(isComposite)) return memberDifferences(place, a, b, temperature);
  return valueDifference(place, a, b, temperature);
}

function memberDifferences(place: Place, a: unknown, b: unknown, temperature: TemperatureUnit): Difference[] {
  // A whole that takes the place of a single value, or goes for one, is said as well.
  const plain = [a, b].map((side) => (isComposite(side) ? undefined : side));
  const own = plain.some((side) => side !== undefined) ? valueDifference(place, plain[0], plain[1], temperature) : [];
  const [old, next] = [membersOf(a), membersOf(b)];
  const names = new Set([...Object.keys(old), ...Object.keys(next)]);
  const within = (name: string) => memberPlace(place, name, Array.isArray(a) || Array.isArray(b));
  return [...own, ...[...names].flatMap((name) => differing(within(name), old[name], next[name], temperature))];
}

function isComposite(value: unknown): boolean {
  return typeof value === 'object' && value !== null;
}

function membersOf(value: unknown): Record<string, unknown> {
  return isComposite(value) ? (value as Record<string, unknown>) : {};
}

function memberPlace({ path, key, section }: Place, name: string, isRow: boolean): Place {
  const below = (at: string) => (isRow ? `${at}[${name}]` : at ? `${at}.${name}` : name);
  return { path: below(path), key: below(key), section: section || sectionOfPath(below(key)) };
}

function valueDifference(place: Place, a: unknown, b: unknown, temperature: TemperatureUnit): Difference[] {
  const { path, key, section } = place;
  const text = (value: unknown) => fieldText(key, value, temperature);
  const words = { label: fieldLabel(key), unit: fieldUnit(key, temperature), before: text(a), after: text(b) };
  return [{ kind: 'value', path, section, ...words }];
}

function atPlace({ path, section }: Place, table: TableDifference | null): Difference[] {
  return table ? [{ ...table, path, section }] : [];
}

type TaperHead = { shape: string; unit?: 'A' | 'C' | 'kW' } | undefined;

function taperDifferences(place: Place, a: unknown, b: unknown, temperature: TemperatureUnit): Difference[] {
  const [old, next] = [a as TaperHead, b as TaperHead];
  const heads = (['shape', 'unit'] as const).flatMap((name) =>
    differing(memberPlace(place, name, false), old?.[name], next?.[name], temperature),
  );
  return [...heads, ...taperTableDifferences(old, next, temperature)];
}

function potentialDifferences(place: Place, a: unknown, b: unknown, temperature: TemperatureUnit): Difference[] {
  const [before, after] = [potentialWords(a), potentialWords(b)];
  const { path, key, section } = place;
  const source: Difference = { kind: 'value', path, section, label: fieldLabel(key), unit: '', before, after };
  const table = tableDifference(tableAt(key, {})!, section, [a, b], temperature);
  return [...(before === after ? [] : [source]), ...atPlace(place, table)];
}

type Legs = Parameters<typeof legDifferences>[0];

function routeDifferences(place: Place, a: unknown, b: unknown, temperature: TemperatureUnit): Difference[] {
  const { table, stations } = legDifferences((a ?? []) as Legs, (b ?? []) as Legs, temperature);
  const ofStations = stations.flatMap(({ leg, before, after }) => {
    const path = `${place.path}[${leg - 1}].station`;
    const section = `Station after leg ${leg}`;
    return differing({ path, key: 'station', section }, withoutName(before), withoutName(after), temperature);
  });
  return [...atPlace(place, table), ...ofStations];
}

/** The station's name stands in the table of legs. */
function withoutName(station: Legs[number]['station']): object | undefined {
  if (!station) return undefined;
  const { name: _inTheTable, ...others } = station;
  return others;
}
