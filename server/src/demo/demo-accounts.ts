import { passwordFits } from '../account/password.ts';
import { findPersonByEmail, listMemberships } from '../account/people-repository.ts';
import type { Role } from '../contract/roles.ts';
import type { Db } from '../db/database.ts';
import { DEMO_PASSWORD, demoEmails } from './people.ts';

export type DemoAccount = { email: string; name: string; role: Role; workspaceName: string };

/** Accounts of the demo that still open with its password and belong to a workspace. */
export async function listDemoAccounts(db: Db): Promise<DemoAccount[]> {
  const found = await Promise.all(demoEmails.map((email) => findDemoAccount(db, email)));
  return found.filter((account) => account !== null);
}

async function findDemoAccount(db: Db, email: string): Promise<DemoAccount | null> {
  const person = await findPersonByEmail(db, email);
  if (!person?.passwordHash || !(await passwordFits(person.passwordHash, DEMO_PASSWORD))) return null;
  const [membership] = await listMemberships(db, person.id);
  if (!membership) return null;
  return { email: person.email, name: person.name, role: membership.role, workspaceName: membership.workspaceName };
}

/** The accounts as a table, with the password that all of them share; empty where there are none. */
export function demoAccountsText(accounts: readonly DemoAccount[]): string {
  const [first] = accounts;
  if (!first) return '';
  const widthOf = (key: 'email' | 'name') => Math.max(...accounts.map((account) => account[key].length));
  const rows = accounts.map(
    ({ email, name, role }) => `  ${email.padEnd(widthOf('email'))}  ${name.padEnd(widthOf('name'))}  ${role}\n`,
  );
  return `Demo team ${first.workspaceName}, invented. Each signs in with the password ${DEMO_PASSWORD}\n${rows.join('')}`;
}
