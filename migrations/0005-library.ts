import type { Migration } from '../server/src/db/migration.ts';

/**
 * The library: items with the head of their newest revision, their revisions, and the words that find them. Revisions
 * follow each other and never change; they go only with their workspace, and a person's name only with the account.
 */
export const library: Migration = {
  up: [
    `CREATE TABLE libraryItems (
      seq INTEGER PRIMARY KEY,
      id TEXT NOT NULL UNIQUE,
      workspaceId TEXT NOT NULL REFERENCES workspaces (id) ON DELETE CASCADE,
      kind TEXT NOT NULL
        CHECK (kind IN ('cell', 'pack', 'thermal', 'inlet', 'station', 'strategy', 'vehicle', 'route')),
      name TEXT NOT NULL,
      sortName TEXT NOT NULL,
      revision INTEGER NOT NULL CHECK (revision >= 1),
      changedAt INTEGER NOT NULL,
      changedBy TEXT REFERENCES people (id) ON DELETE SET NULL,
      archivedAt INTEGER
    ) STRICT`,
    'CREATE INDEX libraryItemsByName ON libraryItems (workspaceId, sortName, id)',
    'CREATE INDEX libraryItemsByKind ON libraryItems (workspaceId, kind, sortName, id)',
    'CREATE INDEX libraryItemsByChange ON libraryItems (workspaceId, changedAt, id)',
    'CREATE INDEX libraryItemsByPerson ON libraryItems (changedBy)',
    `CREATE TABLE libraryRevisions (
      itemId TEXT NOT NULL REFERENCES libraryItems (id) ON DELETE CASCADE,
      revision INTEGER NOT NULL,
      name TEXT NOT NULL,
      notes TEXT NOT NULL,
      source TEXT NOT NULL,
      body TEXT NOT NULL CHECK (json_valid(body)),
      message TEXT NOT NULL,
      createdAt INTEGER NOT NULL,
      createdBy TEXT REFERENCES people (id) ON DELETE SET NULL,
      PRIMARY KEY (itemId, revision)
    ) STRICT`,
    'CREATE INDEX libraryRevisionsByPerson ON libraryRevisions (createdBy)',
    `CREATE VIRTUAL TABLE librarySearch USING fts5 (
      name, notes, source,
      content='', contentless_delete=1, prefix='2 3', tokenize='unicode61 remove_diacritics 2'
    )`,
    `CREATE TRIGGER libraryRevisionsFollow BEFORE INSERT ON libraryRevisions
      WHEN NEW.revision <> (SELECT coalesce(max(revision), 0) + 1 FROM libraryRevisions WHERE itemId = NEW.itemId)
      BEGIN SELECT RAISE(ABORT, 'revisions of the library follow each other'); END`,
    `CREATE TRIGGER libraryRevisionsStay
      BEFORE UPDATE OF itemId, revision, name, notes, source, body, message, createdAt ON libraryRevisions
      BEGIN SELECT RAISE(ABORT, 'revisions of the library never change'); END`,
    `CREATE TRIGGER libraryRevisionsKeepTheirAuthor BEFORE UPDATE OF createdBy ON libraryRevisions
      WHEN NEW.createdBy IS NOT NULL
      BEGIN SELECT RAISE(ABORT, 'revisions of the library never change'); END`,
    `CREATE TRIGGER libraryRevisionsGoWithTheirItem BEFORE DELETE ON libraryRevisions
      WHEN EXISTS (SELECT 1 FROM libraryItems WHERE id = OLD.itemId)
      BEGIN SELECT RAISE(ABORT, 'revisions of the library are never deleted'); END`,
    `CREATE TRIGGER libraryItemsGoWithTheirWorkspace BEFORE DELETE ON libraryItems
      WHEN EXISTS (SELECT 1 FROM workspaces WHERE id = OLD.workspaceId)
      BEGIN SELECT RAISE(ABORT, 'items of the library are archived, never deleted'); END`,
    `CREATE TRIGGER libraryRevisionsAreFound AFTER INSERT ON libraryRevisions
      BEGIN
        INSERT OR REPLACE INTO librarySearch (rowid, name, notes, source)
          SELECT seq, NEW.name, NEW.notes, NEW.source FROM libraryItems WHERE id = NEW.itemId;
      END`,
    `CREATE TRIGGER libraryItemsAreForgotten AFTER DELETE ON libraryItems
      BEGIN DELETE FROM librarySearch WHERE rowid = OLD.seq; END`,
    'CREATE INDEX activityBySubject ON activity (workspaceId, subjectId, seq)',
    'ALTER TABLE keptAnswers ADD COLUMN etag TEXT',
  ],
  down: [
    'ALTER TABLE keptAnswers DROP COLUMN etag',
    'DROP INDEX activityBySubject',
    'DROP TABLE librarySearch',
    'DROP TRIGGER libraryItemsAreForgotten',
    'DROP TRIGGER libraryItemsGoWithTheirWorkspace',
    'DROP TRIGGER libraryRevisionsGoWithTheirItem',
    'DROP TABLE libraryRevisions',
    'DROP TABLE libraryItems',
  ],
};
