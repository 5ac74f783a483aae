import { accountEndpoints } from './account.ts';
import { apiTokenEndpoints } from './api-token.ts';
import type { Endpoint } from './endpoint.ts';
import { libraryEndpoints } from './library.ts';
import { mailboxEndpoints } from './mailbox.ts';
import { studyEndpoints } from './study.ts';
import { workspaceEndpoints } from './workspace.ts';

/** Every call below `/api/v1`. */
export const endpoints: readonly Endpoint[] = [
  accountEndpoints,
  workspaceEndpoints,
  apiTokenEndpoints,
  libraryEndpoints,
  studyEndpoints,
  mailboxEndpoints,
].flatMap((group) => Object.values<Endpoint>(group));
