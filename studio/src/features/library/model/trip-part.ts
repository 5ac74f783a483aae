import { partIssues, type StudyIssue } from '@voltiplano/engine';
import { valueAt, withValueAt } from '../../../lib/study-path.ts';
import type { PartEntry } from './part-editor.ts';

export type TripPartKind = 'vehicle' | 'route';
type Body = PartEntry['body'];

/** A vehicle or a route being worked on: the last one that can stand, and the one as typed where that cannot. */
export type TripPart = { body: Body; typed: Body | null };

/** What an editor's fields are found by: paths of a study file, in which a route is the trip's. */
export const rootOf = (kind: TripPartKind) => (kind === 'route' ? 'trip' : kind);

/** Under this name the part as typed waits. */
const WHOLE = 'whole';

export function tripPartOf({ body, pending }: PartEntry): TripPart {
  return { body, typed: (pending[WHOLE] as Body | undefined) ?? null };
}

export function entryOf({ body, typed }: TripPart): PartEntry {
  return { body, pending: typed ? { [WHOLE]: typed } : {} };
}

/** The part as it is shown: as typed. */
export const shownPart = ({ body, typed }: TripPart): Body => typed ?? body;

/** The value at a path of a study file. */
export function partValue(kind: TripPartKind, body: Body, path: string): unknown {
  return valueAt({ [rootOf(kind)]: body }, path);
}

/** A part with a value put at a path of a study file; it stands at once where it breaks no rule. */
export function withPartValue(kind: TripPartKind, part: TripPart, path: string, value: unknown): TripPart {
  const root = rootOf(kind);
  const next = withValueAt({ [root]: shownPart(part) }, path, value)[root]!;
  return partIssues(kind, next).length === 0 ? { body: next, typed: null } : { ...part, typed: next };
}

/** What is wrong with the part as typed, by paths of a study file; text where a number belongs is named as such. */
export function tripPartIssues(kind: TripPartKind, { typed }: TripPart): StudyIssue[] {
  if (!typed) return [];
  const root = rootOf(kind);
  return partIssues(kind, typed).map((issue) => {
    const path = issue.path ? `${root}.${issue.path}` : root;
    const found = partValue(kind, typed, path);
    const message = `${path}${issue.message.slice(issue.path.length)}`;
    const isText = issue.rule === 'type' && typeof found === 'string';
    return isText ? { path, rule: 'not-a-number', value: found, message } : { ...issue, path, message };
  });
}
