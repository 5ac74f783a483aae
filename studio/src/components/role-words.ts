import type { Role } from '../../../server/src/contract/roles.ts';

/** What a role may do, in one line. */
export const roleWords: Record<Role, string> = {
  viewer: 'reads the workspace, comments and exports',
  analyst: 'as a viewer, and makes and edits studies, uploads logs and runs',
  engineer: 'as an analyst, and edits the library, releases others’ studies and makes links',
  owner: 'as an engineer, and invites, changes roles and settings',
};
