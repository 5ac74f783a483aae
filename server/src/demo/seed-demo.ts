import type { Core } from '../core.ts';

/**
 * Puts the demo team into a database that holds nobody yet: all of it or, where the process ends in between, nothing.
 *
 * @returns whether it did
 */
export async function seedDemo(core: Core): Promise<boolean> {
  const anybody = await core.db.selectFrom('people').select('id').limit(1).executeTakeFirst();
  if (anybody) return false;
  const begun = performance.now();
  core.logger.info('seeding the demo team');
  // Loaded only here: later starts need none of it.
  const { liveDemoHistory } = await import('./demo-history.ts');
  await liveDemoHistory(core);
  core.logger.info({ tookMs: Math.round(performance.now() - begun) }, 'demo team seeded');
  return true;
}
