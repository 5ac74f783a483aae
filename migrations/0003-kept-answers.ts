import type { Migration } from '../server/src/db/migration.ts';

/** Answers to creating calls that carried an idempotency key, so that a repeated call gets the same answer. */
export const keptAnswers: Migration = {
  up: [
    `CREATE TABLE keptAnswers (
      keyHash TEXT PRIMARY KEY,
      requestHash TEXT NOT NULL,
      status INTEGER NOT NULL,
      sealedBody BLOB NOT NULL,
      createdAt INTEGER NOT NULL
    ) STRICT, WITHOUT ROWID`,
    'CREATE INDEX keptAnswersByAge ON keptAnswers (createdAt)',
  ],
  down: ['DROP TABLE keptAnswers'],
};
