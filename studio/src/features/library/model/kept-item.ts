import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import type { ItemContent } from './item-content.ts';

/** An item being edited: what it would say, and entries that break a rule and wait, as its editor keeps them. */
export type ItemDraft = ItemContent & { pending: Record<string, unknown> };

/** A draft with the revision it was made from, as this browser keeps it until it is saved or discarded. */
export type KeptItem = { base: LibraryItem; draft: ItemDraft };

const VERSION = 1;
const keyOf = (workspaceId: string, itemId: string) => `voltiplano.library.${workspaceId}.${itemId}`;

/** The draft kept in this browser; null where there is none, or none that can be read. */
export function readKeptItem(workspaceId: string, itemId: string): KeptItem | null {
  try {
    const kept = JSON.parse(localStorage.getItem(keyOf(workspaceId, itemId)) ?? 'null') as unknown;
    return isKept(kept) ? { base: kept.base, draft: kept.draft } : null;
  } catch {
    return null;
  }
}

/** Keeps a draft, or forgets it; false where the browser refuses or has no room. */
export function keepItem(workspaceId: string, itemId: string, kept: KeptItem | null): boolean {
  try {
    if (kept) localStorage.setItem(keyOf(workspaceId, itemId), JSON.stringify({ version: VERSION, ...kept }));
    else localStorage.removeItem(keyOf(workspaceId, itemId));
    return true;
  } catch {
    return false;
  }
}

function isKept(value: unknown): value is KeptItem & { version: number } {
  const kept = value as Partial<KeptItem & { version: number }> | null;
  const { base, draft } = kept ?? {};
  return (
    kept?.version === VERSION &&
    typeof base?.revision === 'number' &&
    isMembers(base.body) &&
    typeof draft?.name === 'string' &&
    typeof draft.notes === 'string' &&
    typeof draft.source === 'string' &&
    isMembers(draft.body) &&
    isMembers(draft.pending)
  );
}

function isMembers(value: unknown): boolean {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
