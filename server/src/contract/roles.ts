import { z } from 'zod';

/** What a member may be in a workspace, from the least to the most. */
export const roles = ['viewer', 'analyst', 'engineer', 'owner'] as const;

export const roleSchema = z.enum(roles).meta({ id: 'Role', description: 'What a member may do in a workspace' });
export type Role = z.infer<typeof roleSchema>;

/** What can be permitted, and the least role that has it. */
const leastRole = {
  /** Read the workspace, comment, export. */
  read: 'viewer',
  /** Create and edit studies, upload logs, run. */
  'edit-studies': 'analyst',
  /** Edit the library, release others' studies, make links. */
  'edit-library': 'engineer',
  /** Invite, change roles, settings, delete the workspace. */
  manage: 'owner',
} as const satisfies Record<string, Role>;

export type Capability = keyof typeof leastRole;

/** Whether a role is permitted something. The studio asks the same question to decide what it offers. */
export function roleMay(role: Role, capability: Capability): boolean {
  return rankOf(role) >= rankOf(leastRole[capability]);
}

/** The lesser of two roles: an API token never does more than the member who made it. */
export function lesserRole(one: Role, other: Role): Role {
  return rankOf(one) <= rankOf(other) ? one : other;
}

function rankOf(role: Role): number {
  return roles.indexOf(role);
}
