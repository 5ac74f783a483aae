import type { SessionStudyInput, TripStudyInput } from '@voltiplano/engine';
import type { LibraryItem, LibraryKind } from '../../../../../server/src/contract/library.ts';
import { formatNumber } from '../../../lib/format.ts';
import { potentialWords } from '../../../lib/study-words.ts';
import type { Units } from '../../../lib/units.ts';

type Body = LibraryItem['body'];
type Session = SessionStudyInput;
type Taper = Session['strategy']['taper'];

/** What a part is, on one line: "102 in series, 4 parallel, 500 A". */
export function partSummary(kind: LibraryKind, body: Body, units: Units): string {
  return [...piecesOf(kind, body, units)].filter((piece): piece is string => Boolean(piece)).join(', ');
}

type Piece = string | false | undefined;

function piecesOf(kind: LibraryKind, body: Body, units: Units): Piece[] {
  switch (kind) {
    case 'cell':
      return cellPieces(body as Session['cell']);
    case 'pack':
      return packPieces(body as Session['pack']);
    case 'thermal':
      return coolingPieces(body as Session['thermal']);
    case 'inlet':
      return inletPieces(body, units);
    case 'station':
      return stationPieces(body as Session['station']);
    case 'strategy':
      return strategyPieces(body as Session['strategy']);
    case 'vehicle':
      return vehiclePieces(body as TripStudyInput['vehicle']);
    case 'route':
      return routePieces(body as Pick<TripStudyInput['trip'], 'legs'>, units);
  }
}

function cellPieces({ capacityAh, ocv, vMaxV, anode }: Session['cell']): Piece[] {
  return [
    quantity(capacityAh, 'Ah'),
    potentialWords(ocv)?.replace(/^A table/, 'a table') ?? false,
    `up to ${quantity(vMaxV, 'V')}`,
    !anode && 'no anode',
  ];
}

function packPieces({ series, parallel, chargeCurrentMaxA }: Session['pack']): Piece[] {
  return [`${series} in series`, `${parallel} parallel`, quantity(chargeCurrentMaxA, 'A')];
}

function coolingPieces({ coolant, chiller, radiator, heater }: Session['thermal']): Piece[] {
  return [
    coolant.flowLPerMin === 0 ? 'no flow' : quantity(coolant.flowLPerMin, 'L/min'),
    chiller && `chiller ${quantity(chiller.ratedW / 1000, 'kW')}`,
    radiator && 'radiator',
    heater && `heater ${quantity(heater.ratedW / 1000, 'kW')}`,
  ];
}

function inletPieces(inlet: NonNullable<Session['inlet']>, units: Units): Piece[] {
  const { resistanceMilliohm = 0, currentMaxA, derateFromC } = inlet;
  return [
    quantity(resistanceMilliohm, 'mΩ'),
    currentMaxA === undefined ? 'no limit of its own' : quantity(currentMaxA, 'A'),
    derateFromC !== undefined && `derates from ${quantity(units.temperature(derateFromC), units.temperatureUnit)}`,
  ];
}

function stationPieces({
  powerMaxKw,
  currentMaxA,
  voltageMinV = 150,
  voltageMaxV,
  powerSteps,
}: Session['station']): Piece[] {
  return [
    quantity(powerMaxKw, 'kW'),
    quantity(currentMaxA, 'A'),
    `${number(voltageMinV)} to ${quantity(voltageMaxV, 'V')}`,
    powerSteps && powerSteps.length > 0 && 'power shared',
  ];
}

function strategyPieces({ taper, cellVoltageCeilingV, anodeMarginMv }: Session['strategy']): Piece[] {
  return [
    taperWords(taper),
    `ceiling ${quantity(cellVoltageCeilingV, 'V')}`,
    anodeMarginMv !== undefined && `margin ${quantity(anodeMarginMv, 'mV')}`,
  ];
}

function taperWords(taper: Taper): string {
  switch (taper.shape) {
    case 'none':
      return 'no taper';
    case 'slope':
      return counted(
        taper.points.length,
        'point',
        span(
          taper.points.map(({ value }) => value),
          taper.unit,
        ),
      );
    case 'ledges':
      return counted(
        taper.steps.length,
        'ledge',
        span(
          taper.steps.map(({ value }) => value),
          taper.unit,
        ),
      );
    case 'voltage-ledges':
      return counted(
        taper.steps.length,
        'voltage ledge',
        span(
          taper.steps.map(({ value }) => value),
          taper.unit,
        ),
      );
    case 'map':
      return `map of ${taper.soc.length} socs by ${taper.tempC.length} temperatures, ${span(extremes(taper.values.flat()), taper.unit)}`;
  }
}

function vehiclePieces({ massKg, dragAreaM2, driveEfficiency }: TripStudyInput['vehicle']): Piece[] {
  return [quantity(massKg, 'kg'), `CdA ${quantity(dragAreaM2, 'm²')}`, `drive ${quantity(driveEfficiency * 100, '%')}`];
}

function routePieces({ legs }: Pick<TripStudyInput['trip'], 'legs'>, units: Units): Piece[] {
  const km = legs.reduce((sum, leg) => sum + leg.km, 0);
  const stops = legs.filter(({ station }) => station).length;
  const climb = legs.reduce((sum, { climbM = 0 }) => sum + Math.max(0, climbM), 0);
  return [
    counted(legs.length, 'leg'),
    `${formatNumber(units.distance(km), 0)} ${units.distanceUnit}`,
    stops === 0 ? 'no station' : counted(stops, 'station'),
    climb > 0 && `${formatNumber(climb, 0)} m climbed`,
  ];
}

const WORDS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve'];

/** "six ledges, 500 to 130 A"; up to twelve as a word. */
function counted(count: number, noun: string, rest?: string): string {
  const words = `${WORDS[count] ?? count} ${noun}${count === 1 ? '' : 's'}`;
  return rest ? `${words}, ${rest}` : words;
}

function span(values: readonly number[], unit: string): string {
  const [first, last] = [values[0]!, values.at(-1)!];
  return first === last ? quantity(first, unit) : `${number(first)} to ${quantity(last, unit)}`;
}

const extremes = (values: number[]) => [Math.max(...values), Math.min(...values)];

/** A number with as many decimals as it has, three at most. */
function number(value: number): string {
  return formatNumber(value, [0, 1, 2].find((digits) => Math.abs(value - Number(value.toFixed(digits))) < 1e-9) ?? 3);
}

const quantity = (value: number, unit: string) => `${number(value)} ${unit}`;
