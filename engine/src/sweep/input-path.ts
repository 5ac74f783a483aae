import { quantities, type QuantityPath } from '../study/quantities.ts';
import { quantity, PRACTICE, type Quantity } from '../study/quantity.ts';
import type { SessionStudy } from '../study/schema.ts';

export type Keys = (string | number)[];

/** One numeric input of a study, by its plain name. */
export type StudyInput = {
  /** Path within the study, rows counted from 0: `strategy.taper.steps[2].value`. */
  path: string;
  /** Part of the study it belongs to. */
  part: string;
  /** Plain name, which says by itself what it belongs to: `Station power, most`. */
  label: string;
  /** Unit as in the study file; '' for a pure number or a fraction. */
  unit: string;
  /** Value in the study; null where the study leaves the field out. */
  value: number | null;
  quantity: Quantity;
};

/** Inputs that are no field of a study but move several of them by one factor. */
export const factors = {
  'strategy.taper.factor': quantity(
    'Taper, all values',
    '×',
    0,
    10,
    'Multiplies every value of the taper.',
    [0.8, 1.2],
    PRACTICE,
    'above',
  ),
  'cell.resistanceFactor': quantity(
    'Cell resistance, all of it',
    '×',
    0,
    10,
    'Multiplies the ohmic resistance and that of every RC pair, as ageing does.',
    [0.8, 2],
    PRACTICE,
    'above',
  ),
} as const;
export type FactorPath = keyof typeof factors;

export const isFactor = (path: string): path is FactorPath => Object.hasOwn(factors, path);

/** Places of the taper's shapes that share one row of the table of quantities. */
const TAPER_ROWS: [RegExp, QuantityPath][] = [
  [/^strategy\.taper\.((points|steps)\[\]\.value|values\[\]\[\])$/, 'strategy.taper.value'],
  [/^strategy\.taper\.(points\[\]\.soc|steps\[\]\.fromSoc|soc\[\])$/, 'strategy.taper.soc'],
];

/** The row of the table of quantities that a concrete path stands for, or null. */
export function quantityPathOf(path: string): QuantityPath | null {
  const pattern = path.replace(/\[\d+\]/g, '[]');
  const taper = TAPER_ROWS.find(([places]) => places.test(pattern));
  if (taper) return taper[1];
  const shared = pattern === 'strategy.taper.value' || pattern === 'strategy.taper.soc';
  return Object.hasOwn(quantities, pattern) && !shared ? (pattern as QuantityPath) : null;
}

/** `a.b[2].c` as keys. */
export function keysOf(path: string): Keys {
  return path.split(/[.[]/).map((key) => (key.endsWith(']') ? Number(key.slice(0, -1)) : key));
}

/** The value at a path, undefined where nothing stands there. */
export function valueAt(study: object, keys: Keys): unknown {
  return keys.reduce<unknown>((value, key) => {
    const inside = typeof value === 'object' && value !== null && Object.hasOwn(value, key);
    return inside ? (value as Record<string | number, unknown>)[key] : undefined;
  }, study);
}

/** A copy of a study with one value set; what lies beside the path is shared. */
export function withValue<T>(study: T, [key, ...rest]: Keys, value: number): T {
  const copy = (Array.isArray(study) ? [...(study as unknown[])] : { ...study }) as Record<string | number, unknown>;
  copy[key] = rest.length === 0 ? value : withValue(copy[key], rest, value);
  return copy as T;
}

/** The input at a path of a study; null where the study has no such place or the path names no numeric input. */
export function inputAt(study: SessionStudy, path: string): StudyInput | null {
  if (isFactor(path)) return factorAt(study, path);
  const quantityPath = quantityPathOf(path);
  if (quantityPath === null) return null;
  const keys = keysOf(path);
  const parent = valueAt(study, keys.slice(0, -1));
  const value = valueAt(study, keys);
  // A single field that may be left out can be set all the same; a row that is not there cannot.
  const settable = typeof value === 'number' || (value === undefined && !/\[|^strategy\.taper\./.test(path));
  if (typeof parent !== 'object' || parent === null || !settable) return null;
  const row: Quantity = quantities[quantityPath];
  return {
    path,
    part: String(keys[0]),
    label: `${nameOf(row.label, keys)}${placeOf(keys)}`,
    unit: quantityPath === 'strategy.taper.value' ? taperUnit(study) : row.unit,
    value: value ?? null,
    quantity: row,
  };
}

function factorAt({ strategy }: SessionStudy, path: FactorPath): StudyInput | null {
  if (path === 'strategy.taper.factor' && strategy.taper.shape === 'none') return null;
  const { label, unit } = factors[path];
  return { path, part: String(keysOf(path)[0]), label, unit, value: 1, quantity: factors[path] };
}

const taperUnit = ({ strategy: { taper } }: SessionStudy): string => (taper.shape === 'none' ? '' : taper.unit);

/** Labels of the table of quantities that several parts share, or that say little away from their part. */
const LEANING = /^(Mass|Capacity|Specific heat|Power|Current|Voltage|Ramp|From minute|Soc)\b/;

function nameOf(label: string, keys: Keys): string {
  if (!LEANING.test(label)) return label;
  const thing = String(keys[1] === 'taper' ? keys[1] : keys[0]);
  return `${thing.charAt(0).toUpperCase()}${thing.slice(1)} ${label.charAt(0).toLowerCase()}${label.slice(1)}`;
}

/** Which row of a table a path means, counted from 1, as it follows the label. */
function placeOf(keys: Keys): string {
  const rows = keys.filter((key) => typeof key === 'number');
  if (rows.length === 0) return '';
  if (keys[1] === 'socWindow') return rows[0] === 0 ? ', from' : ', to';
  return `, row ${rows[0] + 1}${rows.length > 1 ? `, column ${rows[1] + 1}` : ''}`;
}

/**
 * Every numeric input that can be varied in a study, in the order of the table of quantities, rows one by one; the
 * factors come last.
 */
export function studyInputs(study: SessionStudy): StudyInput[] {
  const places = [...numbersIn(study, ''), ...Object.keys(quantities).filter((path) => !path.includes('['))];
  const order = Object.keys(quantities);
  const rank = (path: string) => order.indexOf(quantityPathOf(path) ?? '');
  const paths = [...new Set(places)].filter((path) => quantityPathOf(path) !== null);
  return [...paths.sort((a, b) => rank(a) - rank(b)), ...Object.keys(factors)]
    .map((path) => inputAt(study, path))
    .filter((input) => input !== null);
}

/** Paths of all numbers in a value. */
function numbersIn(value: unknown, path: string): string[] {
  if (typeof value === 'number') return [path];
  if (typeof value !== 'object' || value === null) return [];
  const inside = (key: string) => (Array.isArray(value) ? `${path}[${key}]` : path ? `${path}.${key}` : key);
  return Object.entries(value).flatMap(([key, one]) => numbersIn(one, inside(key)));
}
