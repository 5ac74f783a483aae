const TAB_KEY = 'voltiplano.tab';
const LOCK = 'voltiplano-tab-';
/** A page that is loaded again may have to wait until the one before it has let go of the tab's lock [ms]. */
const HANDOVER_MS = 400;

let identity: Promise<string> | undefined;

/**
 * The name of this tab: the same after a reload, another in a copy of the tab. A lock that lasts as long as the page
 * tells other tabs that this one is there.
 */
export function tabIdentity(): Promise<string> {
  identity ??= claimed(rememberedId());
  return identity;
}

/** Names of the tabs that are open now, this one among them. */
export async function openTabs(): Promise<ReadonlySet<string>> {
  const { held = [] } = await navigator.locks.query();
  return new Set(held.flatMap(({ name }) => (name?.startsWith(LOCK) ? [name.slice(LOCK.length)] : [])));
}

async function claimed(id: string | null): Promise<string> {
  if (id !== null && (await claim(id, AbortSignal.timeout(HANDOVER_MS)))) return id;
  // A new tab, or a copy of one that is still open.
  const fresh = newId();
  await claim(fresh);
  remember(fresh);
  return fresh;
}

/** Takes the lock of a tab for as long as the page lives; false where another page has it. */
function claim(id: string, signal?: AbortSignal): Promise<boolean> {
  return new Promise((resolve) => {
    const forever = () => {
      resolve(true);
      return new Promise<never>(() => undefined);
    };
    navigator.locks.request(LOCK + id, signal ? { signal } : {}, forever).catch(() => resolve(false));
  });
}

function newId(): string {
  return Array.from(crypto.getRandomValues(new Uint8Array(8)), (byte) => byte.toString(16).padStart(2, '0')).join('');
}

function rememberedId(): string | null {
  try {
    return sessionStorage.getItem(TAB_KEY);
  } catch {
    return null;
  }
}

function remember(id: string): void {
  try {
    sessionStorage.setItem(TAB_KEY, id);
  } catch {
    // Without storage a reload is a new tab; nothing can be held then anyway, and the desk says so.
  }
}
