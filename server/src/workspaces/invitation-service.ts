import type { Membership } from '../contract/account.ts';
import type { Role } from '../contract/roles.ts';
import type { Invitation, InvitationPreview } from '../contract/workspace.ts';
import type { Core } from '../core.ts';
import { linkInvalid } from '../account/one-time-links.ts';
import { findPersonByEmail, getPersonRow, proveEmail } from '../account/people-repository.ts';
import { type Deed, recordDeed } from '../activity/activity-repository.ts';
import { inTransaction } from '../db/database.ts';
import { newSecret } from '../db/secret-tokens.ts';
import { HttpProblem } from '../http/problem.ts';
import {
  findByToken,
  getInvitation,
  insertInvitation,
  insertMemberByInvitation,
  renewInvitation,
  setWithdrawn,
} from './invitation-repository.ts';
import { listMembers } from './member-repository.ts';
import type { WorkspaceAccess } from './workspace-access.ts';
import { readWorkspace } from './workspace-repository.ts';

/** @throws {HttpProblem} `ALREADY_MEMBER`, `ALREADY_INVITED` */
export function invite(core: Core, access: WorkspaceAccess, email: string, role: Role): Promise<Invitation> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const members = await listMembers(inner, access);
    if (members.some((member) => member.email.toLowerCase() === email)) {
      throw new HttpProblem('ALREADY_MEMBER', 'The person belongs to the workspace already.');
    }
    const token = newSecret();
    const invitation = await insertInvitation(inner, access, { email, role, token });
    await mailInvitation(inner, access, invitation, token);
    await record(inner, access, 'invitation.sent', invitation);
    return invitation;
  });
}

/** @throws {HttpProblem} `NOT_FOUND` */
export function resendInvitation(core: Core, access: WorkspaceAccess, id: string): Promise<Invitation> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    await getInvitation(inner, access, id);
    const token = newSecret();
    await renewInvitation(inner, access, id, token);
    const invitation = await getInvitation(inner, access, id);
    await mailInvitation(inner, access, invitation, token);
    await record(inner, access, 'invitation.resent', invitation);
    return invitation;
  });
}

/** @throws {HttpProblem} `NOT_FOUND` */
export function withdrawInvitation(core: Core, access: WorkspaceAccess, id: string): Promise<void> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const invitation = await getInvitation(inner, access, id);
    await setWithdrawn(inner, access, id);
    await record(inner, access, 'invitation.withdrawn', invitation);
  });
}

/** @throws {HttpProblem} `LINK_INVALID` */
export async function previewInvitation(core: Core, token: string): Promise<InvitationPreview> {
  const found = await findByToken(core, token);
  if (!found) throw linkInvalid();
  const { workspaceName, role, email, invitedByName } = found;
  const hasAccount = (await findPersonByEmail(core.db, email)) !== undefined;
  return { workspaceName, role, email, invitedByName, hasAccount };
}

/** @throws {HttpProblem} `LINK_INVALID`, `INVITATION_FOR_OTHER`, `ALREADY_MEMBER` */
export function acceptInvitation(core: Core, token: string, personId: string): Promise<Membership> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { email } = await getPersonRow(db, personId);
    const found = await findByToken(inner, token);
    if (!found) throw linkInvalid();
    await joinByInvitation(inner, token, (invited) => {
      if (invited.toLowerCase() === email.toLowerCase()) return Promise.resolve(personId);
      throw new HttpProblem('INVITATION_FOR_OTHER', `The invitation was sent to ${invited}. Sign in with that e-mail.`);
    });
    // The link came by mail to the address that the account has.
    await proveEmail(inner, personId);
    return { workspaceId: found.workspaceId, workspaceName: found.workspaceName, role: found.role };
  });
}

/**
 * Uses an invitation up. Needs the caller's transaction.
 *
 * @param personFor  finds or makes the person with the address that the invitation went to
 * @returns          id of the person
 * @throws {HttpProblem} `LINK_INVALID`, `ALREADY_MEMBER`
 */
export async function joinByInvitation(
  core: Core,
  token: string,
  personFor: (email: string) => Promise<string>,
): Promise<string> {
  const invitation = await findByToken(core, token);
  if (!invitation) throw linkInvalid();
  const personId = await personFor(invitation.email);
  await insertMemberByInvitation(core, invitation, personId);
  const { workspaceId, role } = invitation;
  await recordDeed(core, { workspaceId, personId, action: 'member.joined', subjectId: personId, detail: { role } });
  return personId;
}

async function mailInvitation(core: Core, access: WorkspaceAccess, invitation: Invitation, token: string) {
  const { name } = await readWorkspace(core, access);
  const { email, role, invitedByName, expiresAt } = invitation;
  await core.post.send(core.db, {
    to: email,
    subject: `Join ${name} on Voltiplano`,
    text: `${invitedByName ?? 'An owner'} invites you to the workspace ${name} on Voltiplano, as ${role}.

${core.publicUrl()}/join#${token}

The link works once, until ${expiresAt.slice(0, 10)}.
`,
  });
}

function record(core: Core, access: WorkspaceAccess, action: Deed['action'], { id, email, role }: Invitation) {
  const { workspaceId, actor } = access;
  return recordDeed(core, { workspaceId, personId: actor.personId, action, subjectId: id, detail: { email, role } });
}
