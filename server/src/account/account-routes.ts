import { accountEndpoints } from '../contract/account.ts';
import type { Api } from '../http/api.ts';
import { clearSessionCookies } from '../http/cookies.ts';
import { HttpProblem } from '../http/problem.ts';
import { askEmailChange, changePassword, readMe } from './account-service.ts';
import { readPerson, setName } from './people-repository.ts';
import { endSessions, listLiveSessions } from './session-repository.ts';

/** The own account and the devices that it is signed in on. */
export function accountRoutes(api: Api): void {
  api.serve(accountEndpoints.readMe, ({ core, actor }) => readMe(core, actor.personId));
  api.serve(accountEndpoints.renameMe, async ({ core, actor, body }) => {
    await setName(core.db, actor.personId, body.name);
    return readPerson(core.db, actor.personId);
  });
  api.serve(accountEndpoints.changePassword, ({ core, actor, body }) => changePassword(core, actor, body));
  api.serve(accountEndpoints.askEmailChange, ({ core, actor, body }) =>
    askEmailChange(core, actor.personId, body.newEmail, body.password),
  );
  api.serve(accountEndpoints.listDevices, async ({ core, actor }) => {
    const sessions = await listLiveSessions(core, actor.personId);
    const items = sessions.map(({ id, userAgent, createdAt, lastUsedAt }) => ({
      id,
      userAgent,
      signedInAt: new Date(createdAt).toISOString(),
      lastUsedAt: new Date(lastUsedAt).toISOString(),
      isThisOne: id === actor.sessionId,
    }));
    return { items };
  });
  api.serve(accountEndpoints.signOutDevice, async ({ core, actor, params }) => {
    const ended = await endSessions(core, actor.personId, { only: params.deviceId });
    if (ended === 0) throw new HttpProblem('NOT_FOUND', 'You have no such device signed in.');
  });
  api.serve(accountEndpoints.signOutEverywhere, async ({ core, actor, res }) => {
    await endSessions(core, actor.personId, {});
    clearSessionCookies(res);
  });
}
