import type { QuantityPath, TripStudyInput } from '@voltiplano/engine';
import { measureOf } from '../components/fields/measure.ts';
import { alignedRows } from './align-rows.ts';
import { departWords } from './study-words.ts';
import { columnOf, gridDifference, type DiffColumn, type TableDifference } from './table-differences.ts';
import type { TemperatureUnit } from './units.ts';

type Leg = TripStudyInput['trip']['legs'][number];

/** A station at the end of a leg, before and after; its place is that of the leg on the side that has it. */
type StationPair = { leg: number; before: Leg['station']; after: Leg['station'] };

type Row = [number, number, number, number, number | null, string | null, Leg['depart'] | null];

/** Two routes as one table, and the stations at the ends of their legs to be compared by themselves. */
export function legDifferences(
  before: readonly Leg[],
  after: readonly Leg[],
  temperature: TemperatureUnit,
): { table: TableDifference | null; stations: StationPair[] } {
  const sides = { before: before.map(rowOf), after: after.map(rowOf) };
  const head = { path: 'trip.legs', section: 'Trip', label: 'Legs' };
  const stations = alignedRows(sides.before, sides.after).map((pair) => ({
    leg: (pair.after ?? pair.before)! + 1,
    before: pair.before === null ? undefined : before[pair.before]!.station,
    after: pair.after === null ? undefined : after[pair.after]!.station,
  }));
  return { table: gridDifference(head, columnsOf(temperature), sides), stations };
}

/** What the engine takes where a leg says nothing is the same as saying it. */
function rowOf({ km, kmPerH, climbM = 0, windKmPerH = 0, ambientC, station, depart }: Leg): Row {
  return [km, kmPerH, climbM, windKmPerH, ambientC ?? null, station?.name ?? null, depart ?? null];
}

function columnsOf(temperature: TemperatureUnit): DiffColumn[] {
  const number = (label: string, path: QuantityPath) => columnOf(label, measureOf(path), temperature);
  return [
    number('Distance', 'trip.legs[].km'),
    number('Speed', 'trip.legs[].kmPerH'),
    number('Climb', 'trip.legs[].climbM'),
    number('Head wind', 'trip.legs[].windKmPerH'),
    { ...number('Ambient', 'trip.legs[].ambientC'), empty: 'of the trip' },
    { label: 'Station', unit: '', text: (cell) => (cell as string | null) ?? 'none' },
    {
      label: 'Depart',
      unit: '',
      text: (cell) => (cell ? departWords(cell as NonNullable<Leg['depart']>) : 'rule of the trip'),
    },
  ];
}
