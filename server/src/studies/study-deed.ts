import { type Deed, recordDeed } from '../activity/activity-repository.ts';
import type { Core } from '../core.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';

/** Writes down what the caller did to a study, in the transaction that does it. */
export async function recordStudyDeed(
  core: Core,
  access: WorkspaceAccess,
  action: Extract<Deed['action'], `study.${string}`>,
  subjectId: string,
  detail: Record<string, string | number>,
): Promise<void> {
  const texts = Object.fromEntries(Object.entries(detail).map(([name, value]) => [name, String(value)]));
  const { workspaceId, actor } = access;
  await recordDeed(core, { workspaceId, personId: actor.personId, action, subjectId, detail: texts });
}
