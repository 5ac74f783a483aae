import type { Membership, Person } from '../contract/account.ts';
import type { Core } from '../core.ts';
import type { Db } from '../db/database.ts';
import { newId } from '../db/secret-tokens.ts';
import { HttpProblem } from '../http/problem.ts';

export type NewPerson = { email: string; name: string; passwordHash: string | null; isEmailProven: boolean };

/** @throws {HttpProblem} `EMAIL_TAKEN` */
export async function insertPerson({ db, now }: Core, person: NewPerson): Promise<string> {
  const id = newId();
  const { email, name, passwordHash, isEmailProven } = person;
  const inserted = await db
    .insertInto('people')
    .values({ id, email, name, passwordHash, emailProvenAt: isEmailProven ? now() : null, createdAt: now() })
    .onConflict((conflict) => conflict.column('email').doNothing())
    .executeTakeFirst();
  if (inserted.numInsertedOrUpdatedRows === 0n) throw emailTaken();
  return id;
}

export function findPersonByEmail(db: Db, email: string) {
  return db.selectFrom('people').selectAll().where('email', '=', email).executeTakeFirst();
}

export function getPersonRow(db: Db, personId: string) {
  return db.selectFrom('people').selectAll().where('id', '=', personId).executeTakeFirstOrThrow();
}

export async function readPerson(db: Db, personId: string): Promise<Person> {
  const { id, email, name, passwordHash } = await getPersonRow(db, personId);
  return { id, email, name, hasPassword: passwordHash !== null };
}

/** Workspaces of a person, the one they joined first on top. */
export function listMemberships(db: Db, personId: string): Promise<Membership[]> {
  return db
    .selectFrom('members')
    .innerJoin('workspaces', 'workspaces.id', 'members.workspaceId')
    .select(['workspaces.id as workspaceId', 'workspaces.name as workspaceName', 'members.role'])
    .where('members.personId', '=', personId)
    .orderBy('members.joinedAt')
    .orderBy('workspaces.id')
    .execute();
}

export async function setName(db: Db, personId: string, name: string): Promise<void> {
  await db.updateTable('people').set({ name }).where('id', '=', personId).execute();
}

export async function setPassword(db: Db, personId: string, passwordHash: string): Promise<void> {
  await db.updateTable('people').set({ passwordHash }).where('id', '=', personId).execute();
}

/** A link that was mailed came back: the address is the person's. */
export async function proveEmail({ db, now }: Core, personId: string): Promise<void> {
  const proven = db.updateTable('people').set({ emailProvenAt: now() }).where('id', '=', personId);
  await proven.where('emailProvenAt', 'is', null).execute();
}

/** @throws {HttpProblem} `EMAIL_TAKEN` */
export async function setProvenEmail({ db, now }: Core, personId: string, email: string): Promise<void> {
  const other = await findPersonByEmail(db, email);
  if (other && other.id !== personId) throw emailTaken();
  await db.updateTable('people').set({ email, emailProvenAt: now() }).where('id', '=', personId).execute();
}

export function emailTaken(): HttpProblem {
  return new HttpProblem('EMAIL_TAKEN', 'An account has this e-mail. Sign in, or reset its password.');
}
