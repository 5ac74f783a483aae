import { z } from 'zod';
import type { Quantity } from './quantity.ts';
import { quantities, type QuantityPath } from './quantities.ts';

/** A number held to its range in the table of quantities, described for the JSON Schema. */
export function quantity(path: QuantityPath) {
  const { label, unit, min, max, above, integer, what }: Quantity = quantities[path];
  let schema = integer ? z.int() : z.number();
  schema = above ? schema.gt(min) : schema.gte(min);
  return schema.lte(max).meta({ title: label, description: unit ? `${what} [${unit}]` : what });
}

type Context = {
  addIssue(issue: { code: 'custom'; path: (string | number)[]; message: string; params: { rule: string } }): void;
};
type PathOf = (row: number) => (string | number)[];

/** Adds an issue at the first row that does not rise above the one before it. */
export function rising(context: Context, values: readonly number[], pathOf: PathOf): void {
  const at = values.findIndex((value, i) => i > 0 && !(value > values[i - 1]));
  if (at < 0) return;
  const message = `must rise from row to row, but is ${values[at]} after ${values[at - 1]}`;
  context.addIssue({ code: 'custom', path: pathOf(at), message, params: { rule: 'must-rise' } });
}

/** Adds an issue unless `high` lies above `low`; both ends are named in the message. */
export function mustLieAbove(
  context: Context,
  path: (string | number)[],
  high: number,
  lowName: string,
  low: number,
): void {
  if (high > low) return;
  context.addIssue({
    code: 'custom',
    path,
    message: `must lie above ${lowName} (${low}), but is ${high}`,
    params: { rule: 'must-lie-above' },
  });
}

/** A table over z: at least two rows, x rising, one y per x. */
export function table(y: z.ZodType<number, number>) {
  return z
    .strictObject({ x: z.array(z.number().gte(-0.5).lte(1.5)).min(2), y: z.array(y).min(2) })
    .superRefine((rows, context) => {
      rising(context, rows.x, (i) => ['x', i]);
      sameLength(context, rows.x, rows.y, 'y', 'x');
    });
}

/** Adds an issue unless two columns have as many rows. */
export function sameLength(
  context: Context,
  a: readonly unknown[],
  b: readonly unknown[],
  bName: string,
  aName: string,
): void {
  if (a.length === b.length) return;
  const message = `must have one value for each row of ${aName} (${a.length}), but has ${b.length}`;
  context.addIssue({ code: 'custom', path: [bName], message, params: { rule: 'shape' } });
}
