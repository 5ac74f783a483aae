import { cells } from './cells.ts';
import { cooling } from './cooling.ts';
import type { DemoItem } from './demo-item.ts';
import { packs } from './packs.ts';
import { stations } from './stations.ts';
import { strategies } from './strategies.ts';
import { vehicles } from './vehicles.ts';

const items = { ...cells, ...packs, ...cooling, ...stations, ...strategies, ...vehicles };

export type DemoItemKey = keyof typeof items;

/** The demo's library by the names that its studies take parts by. */
export const demoLibrary: Record<DemoItemKey, DemoItem> = items;

/** A revision of an item. @param revision  from 1 */
export function itemRevision(key: DemoItemKey, revision: number) {
  const found = demoLibrary[key].revisions[revision - 1];
  if (!found) throw new Error(`The demo's ${key} has no revision ${revision}.`);
  return found;
}
