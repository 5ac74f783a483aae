import { readFileSync } from 'node:fs';
import type { LibraryKind } from '../contract/library.ts';

type Json = Record<string, unknown>;

function readExample(name: string): Json {
  return JSON.parse(readFileSync(new URL(`../../../examples/${name}.json`, import.meta.url), 'utf8')) as Json;
}

const session = readExample('vicuna-shared-station');
const trip = readExample('vicuna-one-leg');
const parts: Json = { ...session, ...trip, inlet: session.inlet, route: { legs: (trip.trip as Json).legs } };

/** A part of the examples that the engine takes, fresh to be changed. */
export function examplePart(kind: LibraryKind): Json {
  return structuredClone(parts[kind]) as Json;
}
