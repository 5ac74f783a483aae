import type { Migration } from '../server/src/db/migration.ts';

/**
 * Revisions of a study follow each other, which also keeps `INSERT OR REPLACE` from writing over one; a study goes only
 * with its workspace, because its revisions would go with it.
 */
export const studyRevisionsFollow: Migration = {
  up: [
    `CREATE TRIGGER studyRevisionsFollow BEFORE INSERT ON studyRevisions
      WHEN NEW.revision <> (SELECT coalesce(max(revision), 0) + 1 FROM studyRevisions WHERE studyId = NEW.studyId)
      BEGIN SELECT RAISE(ABORT, 'revisions of a study follow each other'); END`,
    `CREATE TRIGGER studiesGoWithTheirWorkspace BEFORE DELETE ON studies
      WHEN EXISTS (SELECT 1 FROM workspaces WHERE id = OLD.workspaceId)
      BEGIN SELECT RAISE(ABORT, 'a study is archived, never deleted'); END`,
  ],
  down: ['DROP TRIGGER studiesGoWithTheirWorkspace', 'DROP TRIGGER studyRevisionsFollow'],
};
