/** Steps into a JSON value: a name for a member, a number for a row. */
export type PathStep = string | number;

/** Every field reads its path at every change of the desk. */
const parsed = new Map<string, readonly PathStep[]>();

/**
 * Reads a path as the engine writes it: `strategy.taper.points[3].soc`.
 *
 * @throws {Error} on text that is no path; paths come from code, so that is a mistake in the program
 */
export function parsePath(path: string): readonly PathStep[] {
  const known = parsed.get(path);
  if (known) return known;
  const steps: PathStep[] = [];
  for (const part of path.split('.')) {
    const match = /^([A-Za-z0-9]+)((?:\[\d+\])*)$/.exec(part);
    if (!match) throw new Error(`Not a path into a study: ${path}`);
    steps.push(match[1]!, ...[...match[2]!.matchAll(/\d+/g)].map((index) => Number(index[0])));
  }
  parsed.set(path, steps);
  return steps;
}

/** The value at a path; undefined where nothing stands. */
export function valueAt(json: unknown, path: string): unknown {
  return parsePath(path).reduce<unknown>(
    (value, step) =>
      typeof value === 'object' && value !== null ? (value as Record<PathStep, unknown>)[step] : undefined,
    json,
  );
}

/** A copy with the value at a path; members on the way are made where missing. `undefined` takes the member away. */
export function withValueAt<T>(json: T, path: string, value: unknown): T {
  return placed(json, parsePath(path), value) as T;
}

function placed(json: unknown, steps: readonly PathStep[], value: unknown): unknown {
  if (steps.length === 0) return value;
  const [step, ...rest] = steps as readonly [PathStep, ...PathStep[]];
  if (typeof step === 'number') return placedInRow(json, step, rest, value);
  const members =
    typeof json === 'object' && json !== null && !Array.isArray(json) ? (json as Record<string, unknown>) : {};
  const inner = placed(members[step], rest, value);
  if (inner !== undefined) return { ...members, [step]: inner };
  const { [step]: _gone, ...others } = members;
  // Taking a field away from a section that is not there must not make an empty section.
  return json === undefined ? undefined : others;
}

function placedInRow(json: unknown, row: number, rest: readonly PathStep[], value: unknown): unknown {
  const rows: unknown[] = Array.isArray(json) ? [...(json as unknown[])] : [];
  rows[row] = placed(rows[row], rest, value);
  return rows;
}

/** Whether a path is `ancestor` itself or stands under it. */
export function isWithin(path: string, ancestor: string): boolean {
  return path === ancestor || path.startsWith(`${ancestor}.`) || path.startsWith(`${ancestor}[`);
}
