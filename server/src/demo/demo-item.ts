import type { LibraryKind } from '../contract/library.ts';
import type { DemoMoment } from './moment.ts';
import type { DemoPerson } from './people.ts';

export type DemoDeed = { when: DemoMoment; by: DemoPerson };

export type DemoItemRevision = DemoDeed & {
  message: string;
  /** The part as it stands in a study file; its name is the item's. */
  body: object;
  /** Only where they differ from the item's. */
  notes?: string;
};

/** A part of the demo's library, with its history from the oldest revision on. */
export type DemoItem = {
  kind: LibraryKind;
  name: string;
  notes: string;
  /** What the values would come from; that they are invented is said before it. */
  asIfFrom: string;
  revisions: readonly [DemoItemRevision, ...DemoItemRevision[]];
  archived?: DemoDeed;
};
