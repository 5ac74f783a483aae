import { hashPassword } from '../account/password.ts';
import type { Core } from '../core.ts';
import { inTransaction } from '../db/database.ts';
import type { DemoAct, DemoScene } from './demo-scene.ts';
import { libraryHistory } from './library-history.ts';
import { momentBefore } from './moment.ts';
import { DEMO_PASSWORD } from './people.ts';
import { studyHistory } from './study-history.ts';
import { teamHistory } from './team-history.ts';

/**
 * Lets the weeks of the demo team pass up to now: every deed in its order, by the services that calls use, with the
 * clock at its moment. All of it is one transaction.
 */
export async function liveDemoHistory(core: Core): Promise<void> {
  const passwordHashes = await hashPasswords();
  const now = core.now();
  const acts = [...teamHistory(), ...libraryHistory(), ...studyHistory()]
    .map(({ when, act }) => ({ at: momentBefore(now, when), act }))
    .sort((a, b) => a.at - b.at);
  await inTransaction(core.db, (db) => liveThrough(acts, { ...core, db }, passwordHashes));
}

async function liveThrough(
  acts: readonly { at: number; act: DemoAct['act'] }[],
  core: Core,
  passwordHashes: DemoScene['passwordHashes'],
): Promise<void> {
  const scene: DemoScene = { core, passwordHashes, workspaceId: '', people: new Map(), items: new Map() };
  for (const { at, act } of acts) {
    scene.core = { ...core, now: () => at };
    await act(scene);
  }
}

/** The same password, each time with a salt of its own. */
async function hashPasswords(): Promise<DemoScene['passwordHashes']> {
  const [ines, rosa, mateo, tomas] = await Promise.all([
    hashPassword(DEMO_PASSWORD),
    hashPassword(DEMO_PASSWORD),
    hashPassword(DEMO_PASSWORD),
    hashPassword(DEMO_PASSWORD),
  ]);
  return { ines, rosa, mateo, tomas };
}
