import type { Migration } from '../server/src/db/migration.ts';

/** Names of everybody who owns the study or made a revision of it, as SQL. @param studyId  expression for its id */
const peopleOf = (studyId: string) =>
  `(SELECT coalesce(group_concat(name, char(10)), '') FROM people WHERE id IN
    (SELECT ownerId FROM studies WHERE id = ${studyId} UNION SELECT authorId FROM studyRevisions WHERE studyId = ${studyId}))`;

/** Studies with their working copies, their revisions, the parts of the library that they use, and the search in them. */
export const studies: Migration = {
  up: [
    // The working copy stands last: lists read rows without following a study file of up to a megabyte.
    `CREATE TABLE studies (
      seq INTEGER PRIMARY KEY AUTOINCREMENT,
      id TEXT NOT NULL UNIQUE,
      workspaceId TEXT NOT NULL REFERENCES workspaces (id) ON DELETE CASCADE,
      number INTEGER NOT NULL CHECK (number >= 1),
      kind TEXT NOT NULL CHECK (kind IN ('session', 'trip', 'sweep', 'fit')),
      state TEXT NOT NULL CHECK (state IN ('draft', 'in-review', 'released')),
      ownerId TEXT REFERENCES people (id) ON DELETE SET NULL,
      title TEXT NOT NULL,
      sortTitle TEXT NOT NULL,
      packName TEXT,
      stationName TEXT,
      partNames TEXT NOT NULL,
      createdAt INTEGER NOT NULL,
      changedAt INTEGER NOT NULL,
      changedBy TEXT REFERENCES people (id) ON DELETE SET NULL,
      archivedAt INTEGER,
      newestRevision INTEGER NOT NULL CHECK (newestRevision >= 1),
      revisionHash TEXT NOT NULL,
      minutes10To80 REAL,
      hottestCoreC REAL,
      workingVersion INTEGER NOT NULL CHECK (workingVersion >= 1),
      workingHash TEXT NOT NULL,
      hasPending INTEGER NOT NULL CHECK (hasPending IN (0, 1)),
      workingPending TEXT NOT NULL CHECK (json_valid(workingPending)),
      workingInputs TEXT NOT NULL CHECK (json_valid(workingInputs)),
      UNIQUE (workspaceId, number)
    ) STRICT`,
    'CREATE INDEX studiesByOwner ON studies (ownerId)',
    'CREATE INDEX studiesByChanger ON studies (changedBy)',
    'CREATE INDEX studiesByChange ON studies (workspaceId, changedAt) WHERE archivedAt IS NULL',
    'CREATE INDEX studiesByNumber ON studies (workspaceId, number) WHERE archivedAt IS NULL',
    'CREATE INDEX studiesByTitle ON studies (workspaceId, sortTitle) WHERE archivedAt IS NULL',
    `CREATE INDEX studiesByMinutes ON studies (workspaceId, minutes10To80 IS NULL, coalesce(minutes10To80, 0))
      WHERE archivedAt IS NULL`,
    `CREATE INDEX studiesByCore ON studies (workspaceId, hottestCoreC IS NULL, coalesce(hottestCoreC, 0))
      WHERE archivedAt IS NULL`,
    'CREATE INDEX studiesByState ON studies (workspaceId, state) WHERE archivedAt IS NULL',
    'CREATE INDEX archivedStudies ON studies (workspaceId, changedAt) WHERE archivedAt IS NOT NULL',
    `CREATE TABLE studyRevisions (
      studyId TEXT NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
      revision INTEGER NOT NULL CHECK (revision >= 1),
      message TEXT NOT NULL,
      authorId TEXT REFERENCES people (id) ON DELETE SET NULL,
      createdAt INTEGER NOT NULL,
      title TEXT NOT NULL,
      engineVersion TEXT NOT NULL,
      headline TEXT NOT NULL CHECK (json_valid(headline)),
      parts TEXT NOT NULL CHECK (json_valid(parts)),
      inputs TEXT NOT NULL CHECK (json_valid(inputs)),
      PRIMARY KEY (studyId, revision)
    ) STRICT`,
    'CREATE INDEX studyRevisionsByAuthor ON studyRevisions (authorId)',
    `CREATE TRIGGER studyRevisionsStay BEFORE UPDATE OF
      studyId, revision, message, createdAt, title, engineVersion, headline, parts, inputs ON studyRevisions
      BEGIN SELECT RAISE(ABORT, 'a revision of a study never changes'); END`,
    // Only an account that is gone leaves its revisions without an author.
    `CREATE TRIGGER studyRevisionsKeepAuthor BEFORE UPDATE OF authorId ON studyRevisions
      WHEN NEW.authorId IS NOT NULL OR EXISTS (SELECT 1 FROM people WHERE id = OLD.authorId)
      BEGIN SELECT RAISE(ABORT, 'a revision of a study never changes'); END`,
    // With the study itself they go: where a workspace is deleted, its row is gone when this is asked.
    `CREATE TRIGGER studyRevisionsRemain BEFORE DELETE ON studyRevisions
      WHEN EXISTS (SELECT 1 FROM studies WHERE id = OLD.studyId)
      BEGIN SELECT RAISE(ABORT, 'a revision of a study is never deleted'); END`,
    `CREATE TABLE studyParts (
      studyId TEXT NOT NULL REFERENCES studies (id) ON DELETE CASCADE,
      part TEXT NOT NULL
        CHECK (part IN ('cell', 'pack', 'thermal', 'inlet', 'station', 'strategy', 'vehicle', 'route')),
      itemId TEXT NOT NULL REFERENCES libraryItems (id),
      revision INTEGER NOT NULL CHECK (revision >= 1),
      keptAgainst INTEGER,
      PRIMARY KEY (studyId, part)
    ) STRICT, WITHOUT ROWID`,
    'CREATE INDEX studyPartsByItem ON studyParts (itemId, studyId)',
    `CREATE VIRTUAL TABLE studySearch USING fts5 (
      workspaceId, title, partNames, messages, people, tokenize = 'unicode61 remove_diacritics 2', prefix = '2 3'
    )`,
    `CREATE TRIGGER studySearchAdd AFTER INSERT ON studies BEGIN
      INSERT INTO studySearch (rowid, workspaceId, title, partNames, messages, people)
      VALUES (NEW.seq, NEW.workspaceId, NEW.title, NEW.partNames, '', ${peopleOf('NEW.id')});
    END`,
    `CREATE TRIGGER studySearchRename AFTER UPDATE OF title, partNames ON studies
      WHEN NEW.title IS NOT OLD.title OR NEW.partNames IS NOT OLD.partNames
      BEGIN UPDATE studySearch SET title = NEW.title, partNames = NEW.partNames WHERE rowid = NEW.seq; END`,
    `CREATE TRIGGER studySearchOwner AFTER UPDATE OF ownerId ON studies WHEN NEW.ownerId IS NOT OLD.ownerId
      BEGIN UPDATE studySearch SET people = ${peopleOf('NEW.id')} WHERE rowid = NEW.seq; END`,
    'CREATE TRIGGER studySearchRemove AFTER DELETE ON studies BEGIN DELETE FROM studySearch WHERE rowid = OLD.seq; END',
    `CREATE TRIGGER studySearchRevise AFTER INSERT ON studyRevisions BEGIN
      UPDATE studySearch SET messages = messages || NEW.message || char(10), people = ${peopleOf('NEW.studyId')}
      WHERE rowid = (SELECT seq FROM studies WHERE id = NEW.studyId);
    END`,
    `CREATE TRIGGER studySearchAuthor AFTER UPDATE OF authorId ON studyRevisions BEGIN
      UPDATE studySearch SET people = ${peopleOf('NEW.studyId')}
      WHERE rowid = (SELECT seq FROM studies WHERE id = NEW.studyId);
    END`,
    `CREATE TRIGGER studySearchPerson AFTER UPDATE OF name ON people WHEN NEW.name IS NOT OLD.name BEGIN
      UPDATE studySearch SET people =
        (SELECT ${peopleOf('studies.id')} FROM studies WHERE studies.seq = studySearch.rowid)
      WHERE rowid IN (
        SELECT seq FROM studies WHERE ownerId = NEW.id
        UNION SELECT seq FROM studyRevisions JOIN studies ON studies.id = studyId WHERE authorId = NEW.id
      );
    END`,
  ],
  down: [
    'DROP TRIGGER studySearchPerson',
    'DROP TABLE studySearch',
    'DROP TABLE studyParts',
    'DROP TABLE studyRevisions',
    'DROP TABLE studies',
  ],
};
