/**
 * What must be known again after the way over another site: the page that was asked for, or an invitation. Neither may
 * stand in an address that a server logs.
 */
export type Kept = 'to' | 'invitation';

const keyOf = (what: Kept) => `voltiplano.return.${what}`;

export function keepForReturn(what: Kept, value: string | null): void {
  try {
    if (value === null) sessionStorage.removeItem(keyOf(what));
    else sessionStorage.setItem(keyOf(what), value);
  } catch {
    // Storage may be refused: the person then opens the link once more.
  }
}

export function keptForReturn(what: Kept): string | null {
  try {
    return sessionStorage.getItem(keyOf(what));
  } catch {
    return null;
  }
}
