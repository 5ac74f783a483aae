import { sql } from 'kysely';

/** How many studies outside the archive use the `item` of the query. */
export const studyCount = sql<number>`0`;
