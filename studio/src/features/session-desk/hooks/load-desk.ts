import { freshDesk } from '../model/desk-state.ts';
import { createDeskStore, type DeskStore } from '../model/desk-store.ts';
import { examples } from '../../../lib/examples.ts';
import { readKeptDesk } from '../model/kept-desk.ts';
import { openLinkedStudy, type OpenReport } from './open-linked-study.ts';
import { setDeskAside, storedDesk } from './desk-storage.ts';

export type LoadedDesk = { store: DeskStore; report: OpenReport | null };

/** The desk as it was left in this browser, else the first example; with the study of the link on it, if there is one. */
export async function loadDesk(): Promise<LoadedDesk> {
  const { store, report } = await keptDesk();
  const linkReport = await openLinkedStudy(store);
  return { store, report: linkReport ?? report };
}

async function keptDesk(): Promise<LoadedDesk> {
  const text = storedDesk();
  const first = async () => createDeskStore(freshDesk(await examples[0]!.load()));
  if (text === null) return { store: await first(), report: null };
  const read = readKeptDesk(text);
  if ('desk' in read) return { store: createDeskStore(read.desk), report: null };
  setDeskAside(text);
  return { store: await first(), report: { what: 'the study kept in this browser', issues: read.issues } };
}
