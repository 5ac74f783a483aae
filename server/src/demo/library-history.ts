import type { LibraryItem } from '../contract/library.ts';
import { etagOf } from '../http/if-match.ts';
import { archiveItem, createItem, reviseItem } from '../library/library-service.ts';
import type { DemoItem, DemoItemRevision } from './demo-item.ts';
import { type DemoItemKey, demoLibrary } from './demo-library.ts';
import { accessOf, type DemoAct, known } from './demo-scene.ts';

/** How the library was filled. */
export function libraryHistory(): DemoAct[] {
  return Object.entries(demoLibrary).flatMap(([key, item]) => itemHistory(key as DemoItemKey, item));
}

function itemHistory(key: DemoItemKey, item: DemoItem): DemoAct[] {
  const { archived } = item;
  const [first, ...later] = item.revisions;
  const add: DemoAct = {
    when: first.when,
    act: async (scene) => {
      const access = await accessOf(scene, first.by);
      const { id } = await createItem(scene.core, access, { kind: item.kind, ...contentOf(item, first) });
      scene.items.set(key, id);
    },
  };
  const revise = later.map((revision, i): DemoAct => ({
    when: revision.when,
    act: async (scene) => {
      const access = await accessOf(scene, revision.by);
      const target = { itemId: known(scene.items, key), ifMatch: etagOf('r', i + 1) };
      return reviseItem(scene.core, access, target, contentOf(item, revision));
    },
  }));
  if (!archived) return [add, ...revise];
  const putAway = async (scene: Parameters<DemoAct['act']>[0]) =>
    archiveItem(scene.core, await accessOf(scene, archived.by), known(scene.items, key), true);
  return [add, ...revise, { when: archived.when, act: putAway }];
}

function contentOf({ name, notes, asIfFrom }: DemoItem, revision: DemoItemRevision) {
  return {
    name,
    notes: revision.notes ?? notes,
    source: `Invented for the demo, as if from ${asIfFrom}`,
    body: revision.body as LibraryItem['body'],
    message: revision.message,
  };
}
