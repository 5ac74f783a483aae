import { useEffect, useMemo, useState, useSyncExternalStore, type RefObject } from 'react';
import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { contentOf, type ItemContent } from '../model/item-content.ts';
import { createItemStore, untouched, type ItemState, type ItemStore } from '../model/item-store.ts';
import type { ItemDraft, KeptItem } from '../model/kept-item.ts';
import { hasOwnName } from '../model/kinds.ts';
import { mineOnTheirs } from '../model/mine-on-theirs.ts';
import type { PartEditorHandle, PartEntry } from '../model/part-editor.ts';

type Editor = RefObject<PartEditorHandle | null>;

export type ItemDesk = ItemState & {
  /** What somebody saved while this was being changed; null where nobody did. */
  theirs: LibraryItem | null;
  setName: (name: string) => void;
  setWords: (words: Partial<Pick<ItemContent, 'notes' | 'source'>>) => void;
  setPart: (entry: PartEntry) => void;
  /** Takes a revision's content in place of the draft; gives the way back. */
  takeOver: (item: LibraryItem, label: string) => () => void;
  /** Makes one's own changes again on what somebody saved meanwhile. */
  keepMine: (theirs: LibraryItem) => void;
  /** After a revision was saved from a draft. */
  saved: (item: LibraryItem, sent: ItemDraft) => void;
};

/** An item being edited; what is changed stays in this browser until it is saved or discarded. */
export function useItemDraft(workspaceId: string, item: LibraryItem, editor: Editor): ItemDesk {
  const [store] = useState(() => createItemStore(workspaceId, item));
  const state = useSyncExternalStore(store.subscribe, store.get);
  const acts = useMemo(() => actsOf(store, item.kind, editor), [store, item.kind, editor]);
  const isBehind = item.revision > state.base.revision;
  // Speaks to the editor: where nothing is changed here, what somebody else saved is shown at once.
  useEffect(() => {
    if (isBehind && !state.isChanged) acts.takeOver(item, `revision ${item.revision}`);
  }, [isBehind, state.isChanged, item, acts]);
  return { ...state, theirs: isBehind && state.isChanged ? item : null, ...acts };
}

function actsOf(store: ItemStore, kind: LibraryItem['kind'], editor: Editor) {
  const change = (next: Partial<ItemDraft>) =>
    store.update(({ base, draft }) => ({ base, draft: { ...draft, ...next } }));
  const put = (next: KeptItem, label: string) => {
    store.update(() => next);
    editor.current?.compareWith(next.base.body);
    editor.current?.replace(next.draft.body, label);
  };
  return {
    setName: (name: string) => {
      change({ name });
      if (hasOwnName(kind)) editor.current?.rename(name);
    },
    setWords: change,
    setPart: ({ body, pending }: PartEntry) =>
      change({ body, pending, ...(hasOwnName(kind) ? { name: body.name as string } : {}) }),
    takeOver: (next: LibraryItem, label: string) => {
      const { draft } = store.get();
      put(untouched(next), label);
      return () => put({ base: next, draft: { ...draft, pending: {} } }, 'your changes again');
    },
    keepMine: (theirs: LibraryItem) => {
      const { base, draft } = store.get();
      if (Object.keys(draft.pending).length === 0) {
        const merged = mineOnTheirs(kind, base, contentOf(draft), theirs);
        return put({ base: theirs, draft: { ...merged, pending: {} } }, 'yours on top of theirs');
      }
      // Entries that wait belong to one's own part as it stands.
      store.update(() => ({ base: theirs, draft }));
      editor.current?.compareWith(theirs.body);
    },
    saved: (next: LibraryItem, sent: ItemDraft) => {
      store.update(({ draft }) => (draft === sent ? untouched(next) : { base: next, draft }));
      editor.current?.compareWith(next.body);
      if (hasOwnName(kind) && next.name !== sent.name) editor.current?.rename(next.name);
    },
  };
}
