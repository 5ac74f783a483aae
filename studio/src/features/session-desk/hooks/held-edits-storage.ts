import { heldDesk, heldEditsText, readHeldEdits, type HeldDesk, type HeldEdits } from '../model/held-edits.ts';

/** Whose edits of which study: another person at the same browser neither sees nor sends them. */
export type StudyKey = { personId: string; studyId: string };

const PREFIX = 'voltiplano.study/';
/** Desks kept for their undo alone, whose edits the server has; older ones make room. */
const SENT_DESKS_KEPT = 12;

type Kind = 'edits' | 'desk';

const keyOf = ({ personId, studyId }: StudyKey, tabId: string, kind: Kind) =>
  `${PREFIX}${personId}/${studyId}/${tabId}/${kind}`;

/** Holds what is edited; false where the browser refuses or has no room even after old desks made some. */
export function holdEdits(study: StudyKey, tabId: string, edits: HeldEdits): boolean {
  return put(keyOf(study, tabId, 'edits'), heldEditsText(edits));
}

/** Keeps the desk with its undo and view beside the held edits. */
export function holdDesk(study: StudyKey, tabId: string, text: string): boolean {
  return put(keyOf(study, tabId, 'desk'), text);
}

/** What every tab of this browser holds of a study, newest first. */
export function heldDesks(study: StudyKey): HeldDesk[] {
  const start = `${PREFIX}${study.personId}/${study.studyId}/`;
  const tabs = keys().flatMap((key) => (key.startsWith(start) && key.endsWith('/edits') ? [key.split('/')[3]!] : []));
  const held = tabs.flatMap((tabId) => {
    const edits = readHeldEdits(get(keyOf(study, tabId, 'edits')) ?? '');
    return edits ? [heldDesk(tabId, edits, get(keyOf(study, tabId, 'desk')))] : [];
  });
  return held.sort((a, b) => b.edits.at - a.edits.at);
}

/** Lets go of what a tab held, once another has taken it over. */
export function letGo(study: StudyKey, tabId: string): void {
  remove(keyOf(study, tabId, 'edits'));
  remove(keyOf(study, tabId, 'desk'));
}

function put(key: string, text: string): boolean {
  if (tryToPut(key, text)) return true;
  makeRoom(0, key);
  return tryToPut(key, text);
}

function tryToPut(key: string, text: string): boolean {
  try {
    localStorage.setItem(key, text);
    return true;
  } catch {
    return false;
  }
}

/** Takes away desks whose edits the server has, oldest first; edits that it has not are never touched. */
export function makeRoom(kept = SENT_DESKS_KEPT, besides = ''): void {
  const sent = keys().flatMap((key) => {
    if (!key.startsWith(PREFIX) || !key.endsWith('/edits')) return [];
    const edits = readHeldEdits(get(key) ?? '');
    return edits?.isSent ? [{ stem: key.slice(0, -'edits'.length), at: edits.at }] : [];
  });
  const old = sent.sort((a, b) => b.at - a.at).slice(kept);
  for (const { stem } of old) {
    if (besides.startsWith(stem)) continue;
    remove(`${stem}edits`);
    remove(`${stem}desk`);
  }
}

function keys(): string[] {
  try {
    return Object.keys(localStorage);
  } catch {
    return [];
  }
}

function get(key: string): string | null {
  try {
    return localStorage.getItem(key);
  } catch {
    return null;
  }
}

function remove(key: string): void {
  try {
    localStorage.removeItem(key);
  } catch {
    // Where storage is refused there is nothing to remove.
  }
}
