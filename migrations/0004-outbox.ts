import type { Migration } from '../server/src/db/migration.ts';

/** Mails that are written but not yet handed to the mail server. */
export const outbox: Migration = {
  up: [
    `CREATE TABLE outbox (
      id TEXT PRIMARY KEY,
      recipient TEXT NOT NULL,
      subject TEXT NOT NULL,
      sealedText BLOB NOT NULL,
      createdAt INTEGER NOT NULL,
      tries INTEGER NOT NULL,
      nextTryAt INTEGER NOT NULL
    ) STRICT`,
    'CREATE INDEX outboxByNextTry ON outbox (nextTryAt)',
  ],
  down: ['DROP TABLE outbox'],
};
