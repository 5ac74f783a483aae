import type { Migration } from '../server/src/db/migration.ts';

/** Workspaces, who belongs to them and in which role, invitations, API tokens and the activity log. */
export const workspaces: Migration = {
  up: [
    `CREATE TABLE workspaces (
      id TEXT PRIMARY KEY,
      name TEXT NOT NULL,
      createdAt INTEGER NOT NULL
    ) STRICT`,
    `CREATE TABLE members (
      workspaceId TEXT NOT NULL REFERENCES workspaces (id) ON DELETE CASCADE,
      personId TEXT NOT NULL REFERENCES people (id) ON DELETE CASCADE,
      role TEXT NOT NULL CHECK (role IN ('viewer', 'analyst', 'engineer', 'owner')),
      joinedAt INTEGER NOT NULL,
      PRIMARY KEY (workspaceId, personId)
    ) STRICT, WITHOUT ROWID`,
    'CREATE INDEX membersByPerson ON members (personId)',
    `CREATE TABLE invitations (
      id TEXT PRIMARY KEY,
      workspaceId TEXT NOT NULL REFERENCES workspaces (id) ON DELETE CASCADE,
      email TEXT NOT NULL COLLATE NOCASE,
      role TEXT NOT NULL CHECK (role IN ('viewer', 'analyst', 'engineer', 'owner')),
      tokenHash TEXT NOT NULL UNIQUE,
      invitedBy TEXT REFERENCES people (id) ON DELETE SET NULL,
      createdAt INTEGER NOT NULL,
      expiresAt INTEGER NOT NULL,
      acceptedAt INTEGER,
      withdrawnAt INTEGER
    ) STRICT`,
    `CREATE UNIQUE INDEX openInvitations ON invitations (workspaceId, email)
      WHERE acceptedAt IS NULL AND withdrawnAt IS NULL`,
    `CREATE TABLE apiTokens (
      id TEXT PRIMARY KEY,
      workspaceId TEXT NOT NULL REFERENCES workspaces (id) ON DELETE CASCADE,
      personId TEXT NOT NULL REFERENCES people (id) ON DELETE CASCADE,
      name TEXT NOT NULL,
      role TEXT NOT NULL CHECK (role IN ('viewer', 'analyst', 'engineer', 'owner')),
      tokenHash TEXT NOT NULL UNIQUE,
      createdAt INTEGER NOT NULL,
      expiresAt INTEGER NOT NULL,
      lastUsedAt INTEGER,
      revokedAt INTEGER
    ) STRICT`,
    'CREATE INDEX apiTokensByWorkspace ON apiTokens (workspaceId, personId)',
    `CREATE TABLE activity (
      seq INTEGER PRIMARY KEY AUTOINCREMENT,
      id TEXT NOT NULL UNIQUE,
      workspaceId TEXT NOT NULL REFERENCES workspaces (id) ON DELETE CASCADE,
      personId TEXT REFERENCES people (id) ON DELETE SET NULL,
      action TEXT NOT NULL,
      subjectId TEXT,
      detail TEXT NOT NULL CHECK (json_valid(detail)),
      createdAt INTEGER NOT NULL
    ) STRICT`,
    'CREATE INDEX activityByWorkspace ON activity (workspaceId, seq)',
  ],
  down: [
    'DROP TABLE activity',
    'DROP TABLE apiTokens',
    'DROP TABLE invitations',
    'DROP TABLE members',
    'DROP TABLE workspaces',
  ],
};
