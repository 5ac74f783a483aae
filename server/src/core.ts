import type { Logger } from 'pino';
import type { Db } from './db/database.ts';
import type { Post } from './mail/post.ts';
import type { HeadlineRuns } from './runs/headline-runs.ts';
import type { Secrets } from './secrets/secrets.ts';

/** What every service works with. */
export type Core = {
  /** The database, or the transaction that the call runs in. */
  db: Db;
  secrets: Secrets;
  post: Post;
  /** Runs the engine beside the server. */
  runs: HeadlineRuns;
  logger: Logger;
  /** Clock of dates [ms since 1970-01-01T00:00Z]. */
  now: () => number;
  /** Origin that people open, without a slash at the end. */
  publicUrl: () => string;
};
