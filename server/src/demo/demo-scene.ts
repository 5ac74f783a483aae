import type { Core } from '../core.ts';
import { newId } from '../db/secret-tokens.ts';
import { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import type { DemoItemKey } from './demo-library.ts';
import type { DemoMoment } from './moment.ts';
import type { DemoPerson } from './people.ts';

/** What the history has made so far, for what comes later to act on. */
export type DemoScene = {
  /** In the transaction of the history, its clock at the moment of the deed. */
  core: Core;
  passwordHashes: Record<DemoPerson, string>;
  workspaceId: string;
  people: Map<DemoPerson, string>;
  items: Map<DemoItemKey, string>;
};

/** Something that somebody of the demo did, by the services that a call would use. */
export type DemoAct = { when: DemoMoment; act: (scene: DemoScene) => Promise<unknown> };

/** The workspace as a member opens it. */
export function accessOf({ core, people, workspaceId }: DemoScene, person: DemoPerson): Promise<WorkspaceAccess> {
  const actor = { kind: 'session', personId: known(people, person), sessionId: newId() } as const;
  return WorkspaceAccess.open(core.db, actor, workspaceId);
}

/** The id of somebody or something that is there by then. */
export function known<Key extends string>(ids: ReadonlyMap<Key, string>, key: Key): string {
  const id = ids.get(key);
  if (id === undefined) throw new Error(`The demo's history speaks of ${key} before its time.`);
  return id;
}
