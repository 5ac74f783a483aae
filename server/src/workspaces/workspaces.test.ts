import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accountEndpoints as account } from '../contract/account.ts';
import type { Activity, Member } from '../contract/workspace.ts';
import { workspaceEndpoints as workspaces } from '../contract/workspace.ts';
import type { TestBrowser } from '../testing/test-browser.ts';
import { startTestServer, type TestServer, tokenIn } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';

const DAY_MS = 24 * 3_600_000;
const PASSWORD = 'a windy plateau';

let server: TestServer;
let serial = 0;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

async function worldOfOwner(): Promise<{ world: TestWorld; owner: TestBrowser; params: { workspaceId: string } }> {
  const world = await makeWorld(server);
  return { world, owner: await server.browserOf(world.people.owner), params: { workspaceId: world.workspaceId } };
}

function newEmail(): string {
  serial += 1;
  return `guest-${serial}@puna.example`;
}

async function signUp(email: string): Promise<TestBrowser> {
  const browser = server.browser();
  await browser.call(account.signUp, { body: { email, name: 'Guest', password: PASSWORD, workspaceName: 'Own' } });
  return browser;
}

async function actionsIn(browser: TestBrowser, params: { workspaceId: string }): Promise<string[]> {
  const { items } = (await browser.call(workspaces.listActivity, { params })).body as { items: Activity[] };
  return items.map(({ action }) => action);
}

describe('an invitation', () => {
  it('makes a new person a member in its role, with their address proven, and works once', async () => {
    const { owner, params } = await worldOfOwner();
    const email = newEmail();
    const sent = await owner.call(workspaces.invite, { params, body: { email, role: 'engineer' } });
    expect(sent.body).toMatchObject({ email, role: 'engineer', invitedByName: 'owner', isExpired: false });
    const mail = await server.mailTo(email);
    expect(mail.text).toContain(`${server.address}/join#`);
    const token = tokenIn(mail);

    const guest = server.browser();
    const preview = await guest.call(workspaces.readInvitation, { body: { token } });
    expect(preview.body).toMatchObject({ workspaceName: 'Puna Mobility', role: 'engineer', email, hasAccount: false });
    const joined = await guest.call(account.signUpInvited, { body: { token, name: 'Ines', password: PASSWORD } });
    expect(joined.body.workspaces).toEqual([
      { workspaceId: params.workspaceId, workspaceName: 'Puna Mobility', role: 'engineer' },
    ]);
    const again = await server.browser().call(workspaces.readInvitation, { body: { token } });
    expect(again.body).toMatchObject({ status: 410, code: 'LINK_INVALID' });
    const row = await server.core.db
      .selectFrom('people')
      .selectAll()
      .where('email', '=', email)
      .executeTakeFirstOrThrow();
    expect(row.emailProvenAt).toBe(server.clock.now);
    expect(await actionsIn(guest, params)).toEqual([
      'member.joined',
      'invitation.sent',
      'study.created',
      'workspace.created',
    ]);
  });

  it('is accepted by who has an account, who then belongs to two workspaces', async () => {
    const { owner, params } = await worldOfOwner();
    const email = newEmail();
    const guest = await signUp(email);
    await owner.call(workspaces.invite, { params, body: { email, role: 'analyst' } });
    const token = tokenIn(await server.mailTo(email));
    expect((await guest.call(workspaces.acceptInvitation, { body: { token } })).body.role).toBe('analyst');
    expect((await guest.call(account.readMe)).body.workspaces).toHaveLength(2);
  });

  it('is not for another person', async () => {
    const { world } = await worldOfOwner();
    const other = await signUp(newEmail());
    const answer = await other.call(workspaces.acceptInvitation, { body: { token: world.invitation.token } });
    expect(answer.body).toMatchObject({ status: 403, code: 'INVITATION_FOR_OTHER' });
  });

  it('ends after a week, and then gives way to a new one', async () => {
    const { world, owner, params } = await worldOfOwner();
    const body = { email: world.invitation.email, role: 'viewer' } as const;
    expect((await owner.call(workspaces.invite, { params, body })).body).toMatchObject({ code: 'ALREADY_INVITED' });
    server.clock.now += 7 * DAY_MS;
    const late = await server.browser().call(workspaces.readInvitation, { body: { token: world.invitation.token } });
    expect(late.body).toMatchObject({ status: 410, code: 'LINK_INVALID' });
    const later = await server.browserOf(world.people.owner);
    expect((await later.call(workspaces.invite, { params, body })).status).toBe(201);
  });

  it('sent again has a new link, and the old one ends', async () => {
    const { world, owner, params } = await worldOfOwner();
    const { id, token, email } = world.invitation;
    await owner.call(workspaces.resendInvitation, { params: { ...params, invitationId: id } });
    expect((await server.browser().call(workspaces.readInvitation, { body: { token } })).status).toBe(410);
    const renewed = tokenIn(await server.mailTo(email));
    expect((await server.browser().call(workspaces.readInvitation, { body: { token: renewed } })).status).toBe(200);
  });

  it('withdrawn leads nowhere', async () => {
    const { world, owner, params } = await worldOfOwner();
    const { id, token } = world.invitation;
    await owner.call(workspaces.withdrawInvitation, { params: { ...params, invitationId: id } });
    const answer = await server
      .browser()
      .call(account.signUpInvited, { body: { token, name: 'X', password: PASSWORD } });
    expect(answer.body).toMatchObject({ status: 410, code: 'LINK_INVALID' });
    expect((await owner.call(workspaces.listInvitations, { params })).body.items).toEqual([]);
  });

  it('is not sent to a member', async () => {
    const { owner, params } = await worldOfOwner();
    const { items } = (await owner.call(workspaces.listMembers, { params })).body as { items: Member[] };
    const email = items.find(({ role }) => role === 'analyst')?.email.toUpperCase() ?? '';
    const answer = await owner.call(workspaces.invite, { params, body: { email, role: 'viewer' } });
    expect(answer.body).toMatchObject({ status: 409, code: 'ALREADY_MEMBER' });
  });

  it('of another workspace cannot be touched through the own one', async () => {
    const [one, two] = [await worldOfOwner(), await worldOfOwner()];
    const params = { ...one.params, invitationId: two.world.invitation.id };
    expect((await one.owner.call(workspaces.withdrawInvitation, { params })).status).toBe(404);
    expect((await one.owner.call(workspaces.resendInvitation, { params })).status).toBe(404);
  });
});

describe('members', () => {
  it('keep at least one owner, whatever is tried', async () => {
    const { world, owner, params } = await worldOfOwner();
    const self = { ...params, personId: world.people.owner };
    const refused = { status: 409, code: 'LAST_OWNER' };
    expect((await owner.call(workspaces.changeRole, { params: self, body: { role: 'engineer' } })).body).toMatchObject(
      refused,
    );
    expect((await owner.call(workspaces.removeMember, { params: self })).body).toMatchObject(refused);
    expect((await owner.call(workspaces.leaveWorkspace, { params })).body).toMatchObject(refused);
    const second = { ...params, personId: world.people.engineer };
    await owner.call(workspaces.changeRole, { params: second, body: { role: 'owner' } });
    expect((await owner.call(workspaces.leaveWorkspace, { params })).status).toBe(204);
    expect((await owner.call(workspaces.readWorkspace, { params })).status).toBe(404);
  });

  it('two owners who step down at the same moment leave one', async () => {
    const { world, owner, params } = await worldOfOwner();
    const second = { ...params, personId: world.people.engineer };
    await owner.call(workspaces.changeRole, { params: second, body: { role: 'owner' } });
    const other = await server.browserOf(world.people.engineer);
    const answers = await Promise.all([
      owner.call(workspaces.leaveWorkspace, { params }),
      other.call(workspaces.leaveWorkspace, { params }),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([204, 409]);
  });

  it('have the new role at the next call', async () => {
    const { world, owner, params } = await worldOfOwner();
    const viewer = await server.browserOf(world.people.viewer);
    const target = { ...params, personId: world.people.viewer };
    await owner.call(workspaces.changeRole, { params: target, body: { role: 'owner' } });
    expect((await viewer.call(workspaces.renameWorkspace, { params, body: { name: 'Mine' } })).status).toBe(200);
    await owner.call(workspaces.changeRole, { params: target, body: { role: 'viewer' } });
    expect((await viewer.call(workspaces.renameWorkspace, { params, body: { name: 'Ours' } })).status).toBe(403);
  });

  it('of another workspace cannot be touched through the own one', async () => {
    const { world, owner, params } = await worldOfOwner();
    const stranger = { ...params, personId: world.people.outsider };
    expect((await owner.call(workspaces.removeMember, { params: stranger })).status).toBe(404);
    expect((await owner.call(workspaces.changeRole, { params: stranger, body: { role: 'viewer' } })).status).toBe(404);
  });
});

describe('a workspace', () => {
  it('is deleted with all that is in it, once its name is repeated', async () => {
    const { world, owner, params } = await worldOfOwner();
    const wrong = await owner.call(workspaces.deleteWorkspace, { params, body: { name: 'Puna' } });
    expect(wrong.body).toMatchObject({ status: 422, errors: [{ path: 'body.name' }] });
    expect((await owner.call(workspaces.deleteWorkspace, { params, body: { name: world.name } })).status).toBe(204);
    for (const table of ['members', 'invitations', 'apiTokens', 'activity'] as const) {
      const left = await server.core.db
        .selectFrom(table)
        .select('workspaceId')
        .where('workspaceId', '=', params.workspaceId)
        .execute();
      expect(left).toEqual([]);
    }
  });
});

describe('the activity log', () => {
  it('tells who changed which role from what to what', async () => {
    const { world, owner, params } = await worldOfOwner();
    const target = { ...params, personId: world.people.viewer };
    await owner.call(workspaces.changeRole, { params: target, body: { role: 'analyst' } });
    const { items } = (await owner.call(workspaces.listActivity, { params })).body as { items: Activity[] };
    expect(items[0]).toMatchObject({
      action: 'member.roleChanged',
      personName: 'owner',
      subjectId: world.people.viewer,
      detail: { name: 'viewer', from: 'viewer', to: 'analyst' },
    });
  });

  it('comes in pages that neither repeat nor miss a line while new ones come in', async () => {
    const { owner, params } = await worldOfOwner();
    for (const name of ['A', 'B', 'C', 'D']) await owner.call(workspaces.renameWorkspace, { params, body: { name } });
    const seen: string[] = [];
    let cursor: string | null = null;
    do {
      const query: Record<string, string> = { limit: '2', ...(cursor && { cursor }) };
      const page = (await owner.call(workspaces.listActivity, { params, query })).body as {
        items: Activity[];
        nextCursor: string | null;
      };
      seen.push(...page.items.map(({ action, detail }) => detail.to ?? action));
      cursor = page.nextCursor;
      await owner.call(workspaces.renameWorkspace, { params, body: { name: 'Z' } });
    } while (cursor);
    expect(seen).toEqual(['D', 'C', 'B', 'A', 'study.created', 'workspace.created']);
  });

  it.each([{ cursor: 'made-up' }, { limit: '0' }, { limit: '201' }])('refuses %j', async (query) => {
    const { owner, params } = await worldOfOwner();
    const answer = await owner.call(workspaces.listActivity, {
      params,
      query: JSON.parse(JSON.stringify(query)) as Record<string, string>,
    });
    expect(answer.body).toMatchObject({ status: 422, code: 'INVALID_INPUT' });
  });
});
