import type { Request } from 'express';
import { HttpProblem, invalidField } from './problem.ts';

/** entity-tag of RFC 9110, section 8.8.3, without bytes above ASCII: strong as `"r3"`, weak as `W/"r3"`. */
const ENTITY_TAG = /^(?:W\/)?"[\x21\x23-\x7e]*"$/;

/** The entity tag of a numbered thing: `etagOf('r', 3)` is `"r3"`, quotes included. */
export function etagOf(letter: 'r' | 'w', number: number): string {
  return `"${letter}${number}"`;
}

/**
 * Reads the one entity tag of If-Match. `*` would overwrite whatever is there, and a list would not say which version
 * the change was made from: both are refused.
 *
 * @throws {HttpProblem} `IF_MATCH_MISSING`; `INVALID_INPUT` if it is not one entity tag
 */
export function readIfMatch(req: Request): string {
  const header = req.get('if-match')?.trim();
  if (!header) throw new HttpProblem('IF_MATCH_MISSING', 'Say in If-Match which version the change was made from.');
  if (ENTITY_TAG.test(header)) return header;
  throw invalidField('header.If-Match', 'Must be the one ETag that the change was made from, such as "r3"');
}

/**
 * Strong comparison (RFC 9110, section 8.8.3.2): a weak tag matches nothing.
 *
 * @param now  entity tag of what is there now
 * @throws {HttpProblem} `EDIT_CONFLICT` if the change was made from something else
 */
export function requireMatch(ifMatch: string, now: string): void {
  if (ifMatch === now) return;
  throw new HttpProblem('EDIT_CONFLICT', `It is ${now} by now, not ${ifMatch}. Read it again before changing it.`);
}
