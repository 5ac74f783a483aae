import { z } from 'zod';
import { quantity, rising } from './rules.ts';

const unit = z.enum(['A', 'C', 'kW']);
const value = quantity('strategy.taper.value');
const soc = quantity('strategy.taper.soc');

const slope = z.strictObject({
  shape: z.literal('slope'),
  unit,
  points: z.array(z.strictObject({ soc, value })).min(1),
});
const ledges = z.strictObject({
  shape: z.literal('ledges'),
  unit,
  steps: z.array(z.strictObject({ fromSoc: soc, value })).min(1),
});
const voltageLedges = z.strictObject({
  shape: z.literal('voltage-ledges'),
  unit,
  steps: z
    .array(z.strictObject({ untilCellV: quantity('strategy.taper.steps[].untilCellV').optional(), value }))
    .min(1),
});
const map = z.strictObject({
  shape: z.literal('map'),
  unit,
  soc: z.array(soc).min(2),
  tempC: z.array(quantity('strategy.taper.tempC[]')).min(2),
  values: z.array(z.array(value)),
});

/** The strategy's own table, in one of five shapes (engine/MODEL.md, section 2). */
export const taperSchema = z
  .discriminatedUnion('shape', [z.strictObject({ shape: z.literal('none') }), slope, ledges, voltageLedges, map])
  .superRefine((taper, context) => {
    if (taper.shape === 'slope')
      rising(
        context,
        taper.points.map((point) => point.soc),
        (i) => ['points', i, 'soc'],
      );
    if (taper.shape === 'ledges')
      rising(
        context,
        taper.steps.map((step) => step.fromSoc),
        (i) => ['steps', i, 'fromSoc'],
      );
    if (taper.shape === 'voltage-ledges') checkVoltageLedges(taper.steps, context);
    if (taper.shape === 'map') checkMap(taper, context);
  });

type Refinement = Parameters<typeof rising>[0];

function checkVoltageLedges(steps: { untilCellV?: number | undefined }[], context: Refinement): void {
  const last = steps.length - 1;
  steps.forEach((step, i) => {
    const stray = i === last && step.untilCellV !== undefined;
    const missing = i < last && step.untilCellV === undefined;
    if (!stray && !missing) return;
    const message = stray
      ? `must be absent: the last step holds to the end, but untilCellV is ${step.untilCellV}`
      : 'is missing: every step but the last needs the cell voltage at which it ends';
    context.addIssue({ code: 'custom', path: ['steps', i, 'untilCellV'], message, params: { rule: 'last-step-open' } });
  });
}

function checkMap(taper: { soc: number[]; tempC: number[]; values: number[][] }, context: Refinement): void {
  rising(context, taper.soc, (i) => ['soc', i]);
  rising(context, taper.tempC, (i) => ['tempC', i]);
  const shapeFits =
    taper.values.length === taper.soc.length && taper.values.every((row) => row.length === taper.tempC.length);
  if (shapeFits) return;
  context.addIssue({
    code: 'custom',
    path: ['values'],
    message: `must have one row per soc (${taper.soc.length}) and one value per temperature (${taper.tempC.length}) in each row`,
    params: { rule: 'shape' },
  });
}
