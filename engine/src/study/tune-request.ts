import { z } from 'zod';
import { partSchemas, sessionStudySchema } from './schema.ts';
import { show, StudyError, studyError } from './study-error.ts';
import { toIssues } from './study-issues.ts';
import { boundNames, tuneBounds, type BoundName } from './tune-bounds.ts';

const MOST_PARTS = 16;
const MOST_CONDITIONS = 12;
const MOST_POINTS = 40;
/** Widths and edges of tuned tapers stand on this grid [soc]. */
export const SOC_GRID = 0.001;

const soc = z.number().gte(0).lte(1);
const width = z.number().gte(SOC_GRID).lte(1);

const shape = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('ledges'),
    /** Most ledges. */
    count: z.int().gte(1).lte(MOST_PARTS),
    leastWidthSoc: width.default(0.02),
    /** Values may only fall with soc. */
    monotone: z.boolean().default(true),
  }),
  z.strictObject({
    kind: z.literal('slope'),
    /** Most points. */
    points: z.int().gte(2).lte(MOST_PARTS),
    leastWidthSoc: width.default(0.02),
    monotone: z.boolean().default(true),
  }),
]);

function bound(name: BoundName) {
  const { min, max, above, label, what, unit }: (typeof tuneBounds)[BoundName] & { above?: true } = tuneBounds[name];
  const number = above ? z.number().gt(min) : z.number().gte(min);
  return number
    .lte(max)
    .optional()
    .meta({ title: label, description: `${what} [${unit}]` });
}

const bounds = z
  .strictObject({
    hottestCoreMaxC: bound('hottestCoreMaxC'),
    hottestSurfaceMaxC: bound('hottestSurfaceMaxC'),
    lowestAnodeMinMv: bound('lowestAnodeMinMv'),
    highestCellMaxV: bound('highestCellMaxV'),
    inletMaxC: bound('inletMaxC'),
    stationPowerMaxKw: bound('stationPowerMaxKw'),
    stationCurrentMaxA: bound('stationCurrentMaxA'),
  })
  .superRefine((value, context) => {
    if (boundNames.some((name) => value[name] !== undefined)) return;
    const message = `must hold at least one of ${boundNames.join(', ')}`;
    context.addIssue({ code: 'custom', path: [], message, params: { rule: 'no-bound' } });
  });

const goal = z.discriminatedUnion('kind', [
  z
    .strictObject({ kind: z.literal('least-minutes'), fromSoc: soc, toSoc: soc })
    .superRefine(({ fromSoc, toSoc }, context) => {
      if (toSoc > fromSoc) return;
      const message = `must lie above fromSoc (${fromSoc}), but is ${toSoc}`;
      context.addIssue({ code: 'custom', path: ['toSoc'], message, params: { rule: 'must-lie-above' } });
    }),
  z.strictObject({ kind: z.literal('most-energy'), minutes: z.number().gt(0).lte(10_000) }),
]);

const session = partSchemas.session.shape;

const condition = z.strictObject({
  name: z.string().max(200).optional(),
  /** Share in the goal, against the other conditions'. */
  weight: z.number().gt(0).lte(1000).default(1),
  ambientC: session.ambientC.optional(),
  startSoc: session.startSoc.optional(),
  startTempC: session.startTempC.optional(),
  coolantStartC: session.coolantStartC,
  station: partSchemas.station.optional(),
});

const tradeOff = z.strictObject({
  /** Which bound is tightened step by step; by default the one that holds for longest. */
  bound: z.enum(boundNames).optional(),
  /** Points of the curve, the tuned taper itself among them. */
  steps: z.int().gte(6).lte(MOST_POINTS).default(6),
  /** How far it is tightened in all, in its own unit. */
  span: z.number().gt(0).lte(1000).optional(),
});

/** What a tuning is asked for (engine/MODEL.md, "Tuning a taper"). */
export const tuneRequestSchema = z
  .strictObject({
    format: z.literal('voltiplano/tune'),
    version: z.literal(1),
    title: z.string().max(300).optional(),
    study: sessionStudySchema,
    shape,
    unit: z.enum(['A', 'C', 'kW']),
    bounds,
    goal,
    /** The taper must hold in all of them; absent: the study as it stands. */
    conditions: z.array(condition).min(1).max(MOST_CONDITIONS).optional(),
    /** `false` leaves the curve out. */
    tradeOff: z.union([z.literal(false), tradeOff]).optional(),
  })
  .superRefine(acrossFields);

export type TuneRequest = z.output<typeof tuneRequestSchema>;
export type TuneRequestInput = z.input<typeof tuneRequestSchema>;
export type TuneShape = TuneRequest['shape'];
export type TuneBounds = TuneRequest['bounds'];
export type TuneGoal = TuneRequest['goal'];
export type TuneCondition = z.output<typeof condition>;

type Add = (path: (string | number)[], rule: string, message: string) => void;

function acrossFields(
  request: {
    study: z.output<typeof sessionStudySchema>;
    shape: z.output<typeof shape>;
    bounds: z.output<typeof bounds>;
    goal: z.output<typeof goal>;
    conditions?: z.output<typeof condition>[] | undefined;
    tradeOff?: false | z.output<typeof tradeOff> | undefined;
  },
  context: { addIssue(issue: { code: 'custom'; path: (string | number)[]; message: string; params: object }): void },
): void {
  const add: Add = (path, rule, message) => context.addIssue({ code: 'custom', path, message, params: { rule } });
  const { study, bounds, goal, conditions, tradeOff } = request;
  if (bounds.lowestAnodeMinMv !== undefined && !study.cell.anode)
    add(['bounds', 'lowestAnodeMinMv'], 'needs-anode', 'needs study.cell.anode: without it no potential is known');
  if (tradeOff && tradeOff.bound !== undefined && bounds[tradeOff.bound] === undefined)
    add(['tradeOff', 'bound'], 'not-a-bound', `must name one of the bounds given, but is ${show(tradeOff.bound)}`);
  const { targetSoc, maxMin } = study.session;
  if (goal.kind === 'least-minutes' && goal.toSoc > targetSoc)
    add(
      ['goal', 'toSoc'],
      'above-target',
      `must not pass study.session.targetSoc (${targetSoc}), but is ${goal.toSoc}`,
    );
  if (goal.kind === 'most-energy' && goal.minutes > maxMin)
    add(['goal', 'minutes'], 'above-max', `must not pass study.session.maxMin (${maxMin}), but is ${goal.minutes}`);
  checkStarts(request, add);
  checkRoom(request.shape, lowestStart(study.session.startSoc, conditions), targetSoc, add);
}

function checkStarts({ study, goal, conditions }: Parameters<typeof acrossFields>[0], add: Add): void {
  const starts: { startSoc?: number | undefined }[] = conditions ?? [{}];
  starts.forEach(({ startSoc = study.session.startSoc }, i) => {
    const path =
      conditions?.[i]?.startSoc === undefined ? ['study', 'session', 'startSoc'] : ['conditions', i, 'startSoc'];
    if (startSoc >= study.session.targetSoc)
      add(
        path,
        'target-below-start',
        `must lie below study.session.targetSoc (${study.session.targetSoc}), but is ${startSoc}`,
      );
    else if (goal.kind === 'least-minutes' && startSoc > goal.fromSoc)
      add(path, 'start-above-goal', `must not pass goal.fromSoc (${goal.fromSoc}), but is ${startSoc}`);
  });
}

function checkRoom(shape: TuneShape, lo: number, hi: number, add: Add): void {
  const parts = shape.kind === 'ledges' ? shape.count : shape.points - 1;
  if (parts * shape.leastWidthSoc <= hi - lo + 1e-9) return;
  const what = shape.kind === 'ledges' ? 'ledges' : 'pieces';
  const message = `must let ${parts} ${what} fit between soc ${lo} and ${hi}, but is ${shape.leastWidthSoc}`;
  add(['shape', 'leastWidthSoc'], 'no-room', message);
}

/** Lowest soc at which any of the conditions plugs in: where a tuned taper begins. */
export function lowestStart(
  startSoc: number,
  conditions: readonly { startSoc?: number | undefined }[] | undefined,
): number {
  return Math.min(...(conditions ?? [{}]).map((one) => one.startSoc ?? startSoc));
}

/**
 * Checks a request and fills defaults in.
 *
 * @param json  a value as parsed from a request file; not changed
 * @throws {StudyError} `NOT_A_STUDY` or `INVALID_STUDY`, one issue per field at fault, each path below `tune`
 */
export function parseTuneRequest(json: unknown): TuneRequest {
  const head = json as { format?: unknown } | null;
  if (typeof json !== 'object' || json === null || Array.isArray(json) || head?.format !== 'voltiplano/tune') {
    const message = `Not a tuning: format must be "voltiplano/tune", but is ${show(head?.format)}`;
    throw studyError('NOT_A_STUDY', 'tune.format', 'format', message, head?.format);
  }
  const result = tuneRequestSchema.safeParse(json);
  if (result.success) return result.data;
  const found = result.error.issues.flatMap((issue) => toIssues(issue, json, 'tuning'));
  const issues = found.map((issue) => {
    const under = issue.path ? `tune.${issue.path}` : 'tune';
    return { ...issue, path: under, message: issue.path ? `tune.${issue.message}` : issue.message };
  });
  throw new StudyError('INVALID_STUDY', issues);
}

/** The request's JSON Schema, defaults left out. */
export function tuneJsonSchema(): object {
  const schema = z.toJSONSchema(tuneRequestSchema, { io: 'input', target: 'draft-2020-12', unrepresentable: 'any' });
  return { ...schema, $id: 'voltiplano/tune/1', title: 'Voltiplano tuning, version 1' };
}
