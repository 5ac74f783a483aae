import type { Me, Membership } from '../../../../server/src/contract/account.ts';
import { storedValue } from '../stored-value.ts';

/** Id of the workspace that was last open in this browser. */
export const lastWorkspace = storedValue<string | null>(
  'voltiplano.workspace',
  null,
  (value): value is string | null => value === null || typeof value === 'string',
);

/** The workspace to open where the address names none: the last used, else the oldest; null where there is none. */
export function workspaceToOpen({ workspaces }: Me, lastId: string | null): Membership | null {
  return workspaces.find(({ workspaceId }) => workspaceId === lastId) ?? workspaces[0] ?? null;
}
