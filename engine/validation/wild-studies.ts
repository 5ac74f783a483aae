import fc from 'fast-check';
import { quantities, type QuantityPath, type SessionStudyInput } from '../src/index.ts';
import type { Quantity } from '../src/study/quantity.ts';
import { anyStudy } from './random-studies.ts';

type Holder = Record<string, unknown>;
/** One number of a study: the object it stands in, its key there, and what the table of quantities says of it. */
export type NumericField = { holder: Holder; key: string; path: string; quantity: Quantity };

/** Quantities that stand at several places under one name. */
const SHARED: [RegExp, QuantityPath][] = [
  [/^strategy\.taper\..*\bvalues?(\[\])*$/, 'strategy.taper.value'],
  [/^strategy\.taper\..*\b(soc|fromSoc)(\[\])*$/, 'strategy.taper.soc'],
];

/** Every number of a study that the table of quantities knows, with the path a person would write. */
export function numericFields(study: object): NumericField[] {
  const found: NumericField[] = [];
  const visit = (holder: Holder, path: string) => {
    for (const [key, value] of Object.entries(holder)) {
      const here = Array.isArray(holder) ? `${path}[${key}]` : path ? `${path}.${key}` : key;
      if (typeof value === 'object' && value !== null) visit(value as Holder, here);
      if (typeof value !== 'number') continue;
      const general = here.replace(/\[\d+\]/g, '[]');
      const name = SHARED.find(([pattern]) => pattern.test(general))?.[1] ?? general;
      if (name in quantities) found.push({ holder, key, path: here, quantity: quantities[name as QuantityPath] });
    }
  };
  visit(study as Holder, '');
  return found;
}

/** A value the schema takes for a quantity: its ends, or anywhere between by order of magnitude. */
const allowed = ({ min, max, above, integer }: Quantity, where: number): number => {
  const least = above ? Math.max(min, 0) + 1e-9 * Math.max(1, Math.abs(min)) : min;
  const value =
    where < 0.15
      ? least
      : where > 0.9
        ? max
        : least + (max - least) * 10 ** (-9 * (1 - (where - 0.15) / 0.75)) * (where > 0.5 ? 1 : 0.3);
  return integer ? Math.round(value) : value;
};

/** A usual study with some of its numbers anywhere in what the schema takes; it may still break a rule between fields. */
export const wildStudy: fc.Arbitrary<SessionStudyInput> = fc
  .tuple(
    anyStudy,
    fc.array(fc.tuple(fc.integer({ min: 0, max: 1_000_000 }), fc.integer({ min: 0, max: 1000 })), {
      minLength: 1,
      maxLength: 5,
    }),
  )
  .map(([study, changes]) => {
    const copy = structuredClone(study);
    const fields = numericFields(copy);
    for (const [which, where] of changes) {
      const { holder, key, quantity } = fields[which % fields.length];
      holder[key] = allowed(quantity, where / 1000);
    }
    return copy;
  });
