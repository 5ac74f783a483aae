import { parseStudy, parseStudyText, StudyError, type StudyIssue } from '@voltiplano/engine';
import type { StudyFile } from '../../../../../server/src/contract/study.ts';
import type { StudyKind } from '../../../../../server/src/contract/study-words.ts';

/** What a file turned out to be. */
export type Judged =
  | { is: 'study'; inputs: StudyFile; title: string; kind: StudyKind }
  | { is: 'library'; parts: number }
  | { is: 'wrong'; issues: StudyIssue[] };

/** The server takes no larger body [bytes]. */
const MOST_BYTES = 950_000;

/** Judges a file by the engine's own rules, before anything is made of it. */
export async function judgeFile(file: Pick<File, 'name' | 'size' | 'text'>): Promise<Judged> {
  if (file.size > MOST_BYTES) {
    const message = `A study file has ${MOST_BYTES / 1000} kB at most, but this one has ${Math.ceil(file.size / 1000)} kB`;
    return wrong({ path: '', rule: 'size', value: `${Math.ceil(file.size / 1000)} kB`, message });
  }
  try {
    return judgeText(await file.text(), titleFrom(file.name));
  } catch (error) {
    if (error instanceof StudyError) return { is: 'wrong', issues: error.issues };
    const reason = error instanceof Error ? error.message : String(error);
    return wrong({ path: '', rule: 'unreadable', message: `The browser cannot read this file: ${reason}` });
  }
}

const wrong = (...issues: StudyIssue[]): Judged => ({ is: 'wrong', issues });

/** @throws {StudyError} if it is neither a study nor a library */
function judgeText(text: string, fallbackTitle: string): Judged {
  // A byte order mark, which some programs write, is no part of the JSON.
  const bare = text.replace(/^\uFEFF/, '');
  const library = libraryParts(bare);
  if (library !== null) return { is: 'library', parts: library };
  const { kind } = parseStudyText(bare);
  const inputs = JSON.parse(bare) as StudyFile;
  return {
    is: 'study',
    kind,
    inputs: titled(inputs, inputs.title?.trim() || fallbackTitle),
    title: inputs.title?.trim() || fallbackTitle,
  };
}

/** How many parts a library file holds; null where it is none. */
function libraryParts(text: string): number | null {
  try {
    const json = JSON.parse(text) as { format?: unknown; items?: unknown } | null;
    if (json?.format !== 'voltiplano/library') return null;
    return Array.isArray(json.items) ? json.items.length : 0;
  } catch {
    return null;
  }
}

/** A study under a title. */
export function titled<S extends StudyFile>(inputs: S, title: string): S {
  return inputs.title === title ? inputs : { ...inputs, title };
}

/** "vicuna-warm.json" without its ending. */
function titleFrom(name: string): string {
  return name.replace(/\.json$/i, '').trim() || 'Untitled';
}

/** What the engine has against a study; nothing where it can be made. */
export function issuesOf(inputs: unknown): StudyIssue[] {
  try {
    parseStudy(inputs);
    return [];
  } catch (error) {
    if (error instanceof StudyError) return error.issues;
    throw error;
  }
}
