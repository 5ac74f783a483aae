import { sql } from 'kysely';

/** How many studies outside the archive use the `item` of the query. */
export const studyCount = sql<number>`(
  SELECT count(DISTINCT studies.id) FROM studyParts JOIN studies ON studies.id = studyParts.studyId
  WHERE studyParts.itemId = item.id AND studies.archivedAt IS NULL
)`;
