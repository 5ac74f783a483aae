import { workspaceEndpoints } from '../contract/workspace.ts';
import { listDeeds } from '../activity/activity-repository.ts';
import type { Api } from '../http/api.ts';
import { listInvitations } from './invitation-repository.ts';
import {
  acceptInvitation,
  invite,
  previewInvitation,
  resendInvitation,
  withdrawInvitation,
} from './invitation-service.ts';
import { listMembers } from './member-repository.ts';
import { insertWorkspace, readWorkspace } from './workspace-repository.ts';
import { changeRole, deleteWorkspace, leaveWorkspace, removeMember, renameWorkspace } from './workspace-service.ts';

/** Workspaces, members and the activity log. */
export function workspaceRoutes(api: Api): void {
  api.serve(workspaceEndpoints.createWorkspace, ({ core, actor, body }) =>
    insertWorkspace(core, actor.personId, body.name),
  );
  api.serve(workspaceEndpoints.readWorkspace, ({ core, access }) => readWorkspace(core, access));
  api.serve(workspaceEndpoints.renameWorkspace, ({ core, access, body }) => renameWorkspace(core, access, body.name));
  api.serve(workspaceEndpoints.deleteWorkspace, ({ core, access, body }) => deleteWorkspace(core, access, body.name));
  api.serve(workspaceEndpoints.listMembers, async ({ core, access }) => ({ items: await listMembers(core, access) }));
  api.serve(workspaceEndpoints.changeRole, ({ core, access, params, body }) =>
    changeRole(core, access, params.personId, body.role),
  );
  api.serve(workspaceEndpoints.removeMember, ({ core, access, params }) => removeMember(core, access, params.personId));
  api.serve(workspaceEndpoints.leaveWorkspace, ({ core, access }) => leaveWorkspace(core, access));
  api.serve(workspaceEndpoints.listActivity, ({ core, access, query }) => listDeeds(core, access, query));
}

/** Inviting people and joining. */
export function invitationRoutes(api: Api): void {
  api.serve(workspaceEndpoints.listInvitations, async ({ core, access }) => ({
    items: await listInvitations(core, access),
  }));
  api.serve(workspaceEndpoints.invite, ({ core, access, body }) => invite(core, access, body.email, body.role));
  api.serve(workspaceEndpoints.resendInvitation, ({ core, access, params }) =>
    resendInvitation(core, access, params.invitationId),
  );
  api.serve(workspaceEndpoints.withdrawInvitation, ({ core, access, params }) =>
    withdrawInvitation(core, access, params.invitationId),
  );
  api.serve(workspaceEndpoints.readInvitation, ({ core, body }) => previewInvitation(core, body.token));
  api.serve(workspaceEndpoints.acceptInvitation, ({ core, actor, body }) =>
    acceptInvitation(core, body.token, actor.personId),
  );
}
