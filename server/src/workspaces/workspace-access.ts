import { type Capability, lesserRole, type Role, roleMay } from '../contract/roles.ts';
import type { Db } from '../db/database.ts';
import type { Actor } from '../http/actor.ts';
import { HttpProblem } from '../http/problem.ts';

/**
 * Proof that somebody belongs to a workspace, and in which role. Repositories of what lies in a workspace take it in
 * place of an id, and there is no other way to make one: nothing is read or written there without membership.
 */
export class WorkspaceAccess {
  readonly workspaceId: string;
  readonly role: Role;
  readonly actor: Actor;

  private constructor(workspaceId: string, role: Role, actor: Actor) {
    this.workspaceId = workspaceId;
    this.role = role;
    this.actor = actor;
  }

  /**
   * Opens a workspace for a member.
   *
   * @throws {HttpProblem} `NOT_FOUND` where there is none, or the actor does not belong to it
   */
  static async open(db: Db, actor: Actor, workspaceId: string): Promise<WorkspaceAccess> {
    const member = await db
      .selectFrom('members')
      .select('role')
      .where('workspaceId', '=', workspaceId)
      .where('personId', '=', actor.personId)
      .executeTakeFirst();
    const isOtherToken = actor.kind === 'api-token' && actor.workspaceId !== workspaceId;
    if (!member || isOtherToken) throw new HttpProblem('NOT_FOUND', 'There is no such workspace, or not for you.');
    const role = actor.kind === 'api-token' ? lesserRole(member.role, actor.role) : member.role;
    return new WorkspaceAccess(workspaceId, role, actor);
  }

  /** @throws {HttpProblem} `FORBIDDEN` if the role lacks the capability */
  require(capability: Capability): void {
    if (!roleMay(this.role, capability)) {
      throw new HttpProblem('FORBIDDEN', `The role ${this.role} does not permit this.`);
    }
  }

  /** The person behind the call. @throws {HttpProblem} `SESSION_REQUIRED` for an API token */
  requirePerson(): string {
    if (this.actor.kind === 'session') return this.actor.personId;
    throw new HttpProblem('SESSION_REQUIRED', 'Only a signed-in person may do this, an API token may not.');
  }
}
