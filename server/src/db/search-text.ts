/**
 * What a person typed as an expression for MATCH of FTS5: rows that have, for each word, one that begins with it. Every
 * word is quoted, so nothing in it is syntax; `400-V` finds the two words side by side.
 *
 * @returns null where nothing was typed
 */
export function matchText(typed: string): string | null {
  // SQLite ends an expression at a NUL.
  const words = typed.replaceAll('\0', ' ').split(/\s+/).filter(Boolean);
  return words.length === 0 ? null : words.map((word) => `"${word.replaceAll('"', '""')}"*`).join(' ');
}

/** A name as lists sort it: without accents and capitals, so that É stands beside e and not after z. */
export function sortText(name: string): string {
  return name.normalize('NFD').replaceAll(/\p{M}/gu, '').toLowerCase();
}
