/** Two revisions of a part, to be compared. */
export type Compared = { from: number; to: number };

/** Reads "2..5" out of an address; null where it names no two revisions that are there. */
export function comparedOf(text: string | null, newest: number): Compared | null {
  const match = /^(\d{1,9})\.\.(\d{1,9})$/.exec(text ?? '');
  if (!match) return null;
  const [from, to] = [Number(match[1]), Number(match[2])];
  const isThere = (revision: number) => revision >= 1 && revision <= newest;
  return from !== to && isThere(from) && isThere(to) ? { from, to } : null;
}
