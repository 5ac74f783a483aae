import type { Migration } from '../server/src/db/migration.ts';

/** People, the devices they are signed in on, their one-time links and their identities at an OpenID Connect provider. */
export const accounts: Migration = {
  up: [
    `CREATE TABLE people (
      id TEXT PRIMARY KEY,
      email TEXT NOT NULL COLLATE NOCASE UNIQUE,
      emailProvenAt INTEGER,
      name TEXT NOT NULL,
      passwordHash TEXT,
      createdAt INTEGER NOT NULL
    ) STRICT`,
    `CREATE TABLE sessions (
      id TEXT PRIMARY KEY,
      personId TEXT NOT NULL REFERENCES people (id) ON DELETE CASCADE,
      userAgent TEXT NOT NULL,
      createdAt INTEGER NOT NULL,
      lastUsedAt INTEGER NOT NULL,
      expiresAt INTEGER NOT NULL,
      endedAt INTEGER
    ) STRICT`,
    'CREATE INDEX sessionsByPerson ON sessions (personId)',
    `CREATE TABLE refreshTokens (
      tokenHash TEXT PRIMARY KEY,
      sessionId TEXT NOT NULL REFERENCES sessions (id) ON DELETE CASCADE,
      createdAt INTEGER NOT NULL,
      spentAt INTEGER
    ) STRICT, WITHOUT ROWID`,
    'CREATE INDEX refreshTokensBySession ON refreshTokens (sessionId)',
    `CREATE TABLE oneTimeLinks (
      tokenHash TEXT PRIMARY KEY,
      personId TEXT NOT NULL REFERENCES people (id) ON DELETE CASCADE,
      purpose TEXT NOT NULL CHECK (purpose IN ('reset-password', 'change-email')),
      newEmail TEXT CHECK ((purpose = 'change-email') = (newEmail IS NOT NULL)),
      createdAt INTEGER NOT NULL,
      expiresAt INTEGER NOT NULL,
      usedAt INTEGER
    ) STRICT, WITHOUT ROWID`,
    'CREATE INDEX oneTimeLinksByPerson ON oneTimeLinks (personId)',
    `CREATE TABLE identities (
      issuer TEXT NOT NULL,
      subject TEXT NOT NULL,
      personId TEXT NOT NULL REFERENCES people (id) ON DELETE CASCADE,
      createdAt INTEGER NOT NULL,
      PRIMARY KEY (issuer, subject)
    ) STRICT, WITHOUT ROWID`,
    'CREATE INDEX identitiesByPerson ON identities (personId)',
  ],
  down: [
    'DROP TABLE identities',
    'DROP TABLE oneTimeLinks',
    'DROP TABLE refreshTokens',
    'DROP TABLE sessions',
    'DROP TABLE people',
  ],
};
