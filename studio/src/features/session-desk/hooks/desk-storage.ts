const DESK_KEY = 'voltiplano.desk';
/** Where a kept desk goes that this version cannot read, so that nothing is overwritten. */
const UNREADABLE_DESK_KEY = 'voltiplano.desk.unreadable';

/** The desk kept in this browser; null where there is none, or where the browser lets nothing be kept. */
export function storedDesk(): string | null {
  try {
    return localStorage.getItem(DESK_KEY);
  } catch {
    return null;
  }
}

/** Keeps the desk; false where the browser refuses or has no room, which the page then says. */
export function storeDesk(text: string): boolean {
  return stored(DESK_KEY, text);
}

/** Puts a desk aside that cannot be read. */
export function setDeskAside(text: string): void {
  stored(UNREADABLE_DESK_KEY, text);
}

function stored(key: string, text: string): boolean {
  try {
    localStorage.setItem(key, text);
    return true;
  } catch {
    return false;
  }
}
