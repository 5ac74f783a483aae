import type { ComponentType, Ref } from 'react';
import type { LibraryItem } from '../../../../../server/src/contract/library.ts';

type Body = LibraryItem['body'];

/** A part, and entries that break a rule and wait, by what the editor calls their places. */
export type PartEntry = { body: Body; pending: Record<string, unknown> };

/** What the page does to the part that is being edited. */
export type PartEditorHandle = {
  /** Puts another part in place; the one before stays under undo. */
  replace: (body: Body, label: string) => void;
  /** Gives the part its name, where its kind has one. */
  rename: (name: string) => void;
  /** What changes are marked against from now on. */
  compareWith: (saved: Body) => void;
};

export type PartEditorProps<Kind extends string> = {
  kind: Kind;
  /** What the editor begins with; later changes come through the handle. */
  initial: PartEntry;
  /** What changes are marked against. */
  saved: Body | null;
  readOnly?: boolean;
  onChange?: (entry: PartEntry) => void;
  ref?: Ref<PartEditorHandle>;
};

export type SessionPartKind = 'cell' | 'pack' | 'thermal' | 'inlet' | 'station' | 'strategy';

/** The editor of the parts of a session, which another feature has; the application hands it in. */
export type SessionPartEditor = ComponentType<PartEditorProps<SessionPartKind>>;
