/**
 * One step of the schema: statements of SQLite that take it forward, and those that take it back.
 *
 * Plain SQL, so that a step never changes its meaning when the program around it does.
 */
export type Migration = { up: readonly string[]; down: readonly string[] };
