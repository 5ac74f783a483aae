import type { Me } from '../contract/account.ts';
import type { Core } from '../core.ts';
import { inTransaction } from '../db/database.ts';
import { HttpProblem } from '../http/problem.ts';
import { joinByInvitation } from '../workspaces/invitation-service.ts';
import { insertWorkspace } from '../workspaces/workspace-repository.ts';
import { emailChangedMail, emailChangeMail, resetMail } from './account-mails.ts';
import { issueLink, useLink } from './one-time-links.ts';
import { hashPassword, passwordFits } from './password.ts';
import {
  emailTaken,
  findPersonByEmail,
  getPersonRow,
  insertPerson,
  listMemberships,
  proveEmail,
  readPerson,
  setPassword,
  setProvenEmail,
} from './people-repository.ts';
import { endSessions, type OpenedSession, openSession, rotateSession } from './session-repository.ts';

/** The answer to asking for a reset takes at least so long, whether there is an account or not [ms]. */
const RESET_ANSWER_MS = 200;

type SignUp = { email: string; name: string; password: string; workspaceName: string };
type InvitedSignUp = { token: string; name: string; password: string };

/** Makes an account and the workspace that it owns. @throws {HttpProblem} `EMAIL_TAKEN` */
export async function signUp(core: Core, wanted: SignUp, userAgent: string): Promise<OpenedSession> {
  const passwordHash = await hashPassword(wanted.password);
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { email, name } = wanted;
    const personId = await insertPerson(inner, { email, name, passwordHash, isEmailProven: false });
    await insertWorkspace(inner, personId, wanted.workspaceName);
    return openSession(inner, personId, userAgent);
  });
}

/** Makes an account for the address that an invitation went to, and joins. @throws {HttpProblem} `LINK_INVALID`, `EMAIL_TAKEN` */
export async function signUpInvited(core: Core, wanted: InvitedSignUp, userAgent: string): Promise<OpenedSession> {
  const passwordHash = await hashPassword(wanted.password);
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const personId = await joinByInvitation(inner, wanted.token, (email) =>
      insertPerson(inner, { email, name: wanted.name, passwordHash, isEmailProven: true }),
    );
    return openSession(inner, personId, userAgent);
  });
}

/** @throws {HttpProblem} `WRONG_CREDENTIALS`, the same whether the account or the password is wrong */
export async function signIn(core: Core, email: string, password: string, userAgent: string): Promise<OpenedSession> {
  const person = await findPersonByEmail(core.db, email);
  if (!(await passwordFits(person?.passwordHash ?? null, password)) || !person) {
    throw new HttpProblem('WRONG_CREDENTIALS', 'E-mail and password do not belong together.');
  }
  return inTransaction(core.db, (db) => openSession({ ...core, db }, person.id, userAgent));
}

/** @throws {HttpProblem} `NOT_SIGNED_IN`, `SESSION_ENDED` or `REFRESH_REUSED` */
export async function refresh(core: Core, refreshToken: string | null): Promise<OpenedSession> {
  const rotation = refreshToken ? await rotateSession(core, refreshToken) : 'unknown';
  if (rotation === 'unknown') throw new HttpProblem('NOT_SIGNED_IN', 'Sign in first.');
  if (rotation === 'ended') throw new HttpProblem('SESSION_ENDED', 'This device was signed out. Sign in again.');
  if (rotation === 'reused') {
    core.logger.warn('a spent refresh token came back; its device is signed out');
    throw new HttpProblem('REFRESH_REUSED', 'This device was signed out to be safe. Sign in again.');
  }
  return rotation;
}

export async function readMe({ db }: Core, personId: string): Promise<Me> {
  return { person: await readPerson(db, personId), workspaces: await listMemberships(db, personId) };
}

/** Mails a reset link if there is such an account, and tells nobody whether there is. */
export async function askReset(core: Core, email: string): Promise<void> {
  const patience = new Promise((resolve) => setTimeout(resolve, RESET_ANSWER_MS));
  await inTransaction(core.db, async (db) => {
    const person = await findPersonByEmail(db, email);
    if (!person) return;
    const token = await issueLink({ ...core, db }, person.id, { purpose: 'reset-password' });
    await core.post.send(db, resetMail(person.email, core.publicUrl(), token));
  });
  await patience;
}

/** Sets a password by a mailed link and signs every device out. @throws {HttpProblem} `LINK_INVALID` */
export async function resetPassword(core: Core, token: string, password: string): Promise<void> {
  const passwordHash = await hashPassword(password);
  await inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { personId } = await useLink(inner, token, 'reset-password');
    await setPassword(db, personId, passwordHash);
    await proveEmail(inner, personId);
    await endSessions(inner, personId, {});
  });
}

/** Changes the password and signs every other device out. @throws {HttpProblem} `WRONG_PASSWORD` */
export async function changePassword(
  core: Core,
  { personId, sessionId }: { personId: string; sessionId: string },
  { presentPassword, newPassword }: { presentPassword: string; newPassword: string },
): Promise<void> {
  await requirePassword(core, personId, presentPassword);
  const passwordHash = await hashPassword(newPassword);
  await inTransaction(core.db, async (db) => {
    await setPassword(db, personId, passwordHash);
    await endSessions({ ...core, db }, personId, { except: sessionId });
  });
}

/** Mails a link to the new address. @throws {HttpProblem} `WRONG_PASSWORD`, `EMAIL_TAKEN` */
export async function askEmailChange(core: Core, personId: string, newEmail: string, password: string): Promise<void> {
  await requirePassword(core, personId, password);
  await inTransaction(core.db, async (db) => {
    if (await findPersonByEmail(db, newEmail)) throw emailTaken();
    const token = await issueLink({ ...core, db }, personId, { purpose: 'change-email', newEmail });
    await core.post.send(db, emailChangeMail(newEmail, core.publicUrl(), token));
  });
}

/** Takes the new address by the link mailed to it. @throws {HttpProblem} `LINK_INVALID`, `EMAIL_TAKEN` */
export async function confirmEmail(core: Core, token: string): Promise<void> {
  await inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { personId, newEmail } = await useLink(inner, token, 'change-email');
    const { email: oldEmail } = await getPersonRow(db, personId);
    // The table keeps a new address in every link of this purpose.
    await setProvenEmail(inner, personId, newEmail ?? oldEmail);
    await core.post.send(db, emailChangedMail(oldEmail, newEmail ?? oldEmail));
  });
}

async function requirePassword({ db }: Core, personId: string, password: string): Promise<void> {
  const { passwordHash } = await getPersonRow(db, personId);
  if (!(await passwordFits(passwordHash, password))) {
    throw new HttpProblem('WRONG_PASSWORD', 'The present password is wrong.');
  }
}
