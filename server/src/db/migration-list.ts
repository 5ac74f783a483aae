import { accounts } from '../../../migrations/0001-accounts.ts';
import { workspaces } from '../../../migrations/0002-workspaces.ts';
import { keptAnswers } from '../../../migrations/0003-kept-answers.ts';
import { outbox } from '../../../migrations/0004-outbox.ts';
import { library } from '../../../migrations/0005-library.ts';
import { studies } from '../../../migrations/0006-studies.ts';
import { studyRevisionsFollow } from '../../../migrations/0007-study-revisions-follow.ts';
import type { Migration } from './migration.ts';

/** Every migration by its name. Names sort in the order in which they are applied; one that has landed never changes. */
export const migrations: Record<string, Migration> = {
  '0001-accounts': accounts,
  '0002-workspaces': workspaces,
  '0003-kept-answers': keptAnswers,
  '0004-outbox': outbox,
  '0005-library': library,
  '0006-studies': studies,
  '0007-study-revisions-follow': studyRevisionsFollow,
};
