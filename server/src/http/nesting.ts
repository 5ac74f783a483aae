import { invalidField } from './problem.ts';

/** A study file has ten. */
const MOST_LEVELS = 64;

/**
 * Refuses values that are nested so deep that a function which follows them would run out of stack.
 *
 * @param part   part of the request that held it, such as `body`
 * @param value  as parsed from JSON
 * @throws {HttpProblem} `INVALID_INPUT`
 */
export function requireShallow(part: string, value: unknown): void {
  let level: unknown[] = [value];
  for (let depth = 0; level.length > 0; depth += 1) {
    if (depth > MOST_LEVELS) throw invalidField(part, `Must not be nested deeper than ${MOST_LEVELS} levels`);
    level = level.flatMap((one) =>
      typeof one === 'object' && one !== null ? Object.values(one as Record<string, unknown>) : [],
    );
  }
}
