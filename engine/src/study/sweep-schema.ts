import { z } from 'zod';
import { partSchemas, sessionStudySchema } from './schema.ts';

/** Most runs that one sweep or spread may ask for. */
export const MOST_CELLS = 20_000;

const path = z.string().max(200);
const number = z.number();
const count = z.int().gte(2).lte(MOST_CELLS);

const listAxis = z.strictObject({ path, values: z.array(number).min(1).max(MOST_CELLS) });
const rangeAxis = z.strictObject({
  path,
  from: number,
  to: number,
  count,
  scale: z.enum(['linear', 'log']).default('linear'),
});

/** Parts of a session that can stand on an axis as a whole, from the library or written out. */
export const sweepParts = ['cell', 'pack', 'thermal', 'inlet', 'boost', 'station', 'strategy'] as const;
export type SweepPart = (typeof sweepParts)[number];

/** One axis that takes parts; `optional` parts may be left out by a body of null. */
function partAxis<P extends SweepPart, B extends z.ZodType>(part: P, body: B) {
  const item = z.strictObject({ name: z.string().min(1).max(200), body });
  return z.strictObject({ part: z.literal(part), items: z.array(item).min(1).max(200) });
}

const partAxes = z.discriminatedUnion('part', [
  partAxis('cell', partSchemas.cell),
  partAxis('pack', partSchemas.pack),
  partAxis('thermal', partSchemas.thermal),
  partAxis('inlet', partSchemas.inlet.nullable()),
  partAxis('boost', partSchemas.boost.nullable()),
  partAxis('station', partSchemas.station),
  partAxis('strategy', partSchemas.strategy),
]);

const axis = z.union([listAxis, rangeAxis, partAxes]);

const sensitivity = z.strictObject({
  inputs: z
    .array(
      z.strictObject({
        path,
        minus: number.gte(0),
        plus: number.gte(0),
        as: z.enum(['share', 'absolute']).default('share'),
      }),
    )
    .min(1)
    .max(100),
});

const distributed = z.discriminatedUnion('distribution', [
  z.strictObject({ path, distribution: z.literal('normal'), mean: number.optional(), sd: number.gt(0) }),
  z.strictObject({ path, distribution: z.literal('uniform'), from: number, to: number }),
  z.strictObject({ path, distribution: z.literal('triangular'), from: number, mode: number.optional(), to: number }),
]);

const spread = z.strictObject({
  inputs: z.array(distributed).min(1).max(40),
  runs: z.int().gte(10).lte(MOST_CELLS),
  seed: z.int().gte(0).lte(4294967295).default(1),
});

const KINDS = ['axes', 'sensitivity', 'spread'] as const;

const sweep = z
  .strictObject({
    axes: z.array(axis).min(1).max(3).optional(),
    sensitivity: sensitivity.optional(),
    spread: spread.optional(),
  })
  .superRefine((value, context) => {
    const given = KINDS.filter((kind) => value[kind] !== undefined);
    if (given.length === 1) return;
    const found = given.length === 0 ? 'has none of them' : `has ${given.join(' and ')}`;
    const message = `needs one of axes, sensitivity and spread, but ${found}`;
    context.addIssue({ code: 'custom', path: [], message, params: { rule: 'one-of' } });
  });

/** A sweep file: a session study as `base`, and what is varied in it (engine/MODEL.md, section 16). */
export const sweepStudySchema = z.strictObject({
  format: z.literal('voltiplano/study'),
  version: z.literal(1),
  kind: z.literal('sweep'),
  title: z.string().max(300).optional(),
  base: sessionStudySchema,
  sweep,
});

export type SweepStudyInput = z.input<typeof sweepStudySchema>;
export type SweepStudy = z.output<typeof sweepStudySchema>;
export type AxisRequest = z.output<typeof axis>;
export type PartAxisRequest = z.output<typeof partAxes>;
export type DistributedInput = z.output<typeof distributed>;
export type SensitivityInput = z.output<typeof sensitivity>['inputs'][number];

/** JSON Schema (draft 2020-12) of a sweep file as a person writes it, defaults left out. */
export function sweepJsonSchema(): object {
  const schema = z.toJSONSchema(sweepStudySchema, { io: 'input', target: 'draft-2020-12', unrepresentable: 'any' });
  return { ...schema, $id: 'voltiplano/sweep/1', title: 'Voltiplano sweep, version 1' };
}
