import type { PersonRef } from '../contract/reference.ts';

/** Who did something, from a column and the name that a left join found; null where the account is gone. */
export function asPersonRef(id: string | null, name: string | null): PersonRef {
  return id === null || name === null ? null : { id, name };
}
