import { partIssues } from '@voltiplano/engine';
import {
  libraryFileSchema,
  type LibraryFile,
  type LibraryItem,
  type LibraryKind,
} from '../../../../../server/src/contract/library.ts';
import { hasOwnName, kindWords } from './kinds.ts';
import { saysTheSame } from './item-content.ts';

export type SameName = 'revise' | 'add' | 'skip';

/** What is wrong with one item of a file, or, without a place, with the file. */
export type FileIssue = { item: string; path: string; message: string };

export type ReadFile = { file: LibraryFile } | { issues: FileIssue[] };

/** Reads a library file, or says where it is none. */
export function readLibraryText(text: string): ReadFile {
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    return { issues: [{ item: '', path: '', message: `This is no JSON: ${(error as Error).message}` }] };
  }
  const format = (json as { format?: unknown } | null)?.format;
  if (format !== 'voltiplano/library') {
    const found = format === undefined ? 'has none' : `says ${JSON.stringify(format)}`;
    const message = `This is no library file: its format must be “voltiplano/library”, but it ${found}.`;
    return { issues: [{ item: '', path: 'format', message }] };
  }
  const read = libraryFileSchema.safeParse(json);
  if (read.success) return { file: read.data };
  return {
    issues: read.error.issues.map(({ path, message }) => ({
      ...placeOf(json, path.map(String).join('.')),
      message,
    })),
  };
}

/** What the engine does not take of a file's items. */
export function fileIssues({ items }: LibraryFile): FileIssue[] {
  return items.flatMap(({ kind, name, body }) =>
    partIssues(kind, hasOwnName(kind) ? { ...body, name } : body).map(({ path, message }) => ({
      item: itemText(kind, name),
      path,
      message,
    })),
  );
}

/** What the server refused, by the item it is about. */
export function refusedIssues(file: LibraryFile, errors: readonly { path: string; message: string }[]): FileIssue[] {
  return errors.map(({ path, message }) => ({ ...placeOf(file, path.replace(/^body\.file\./, '')), message }));
}

function placeOf(json: unknown, path: string): Pick<FileIssue, 'item' | 'path'> {
  const match = /^items[.[](\d+)\]?\.?(.*)$/.exec(path);
  if (!match) return { item: '', path };
  const items = (json as { items?: unknown[] }).items;
  const item = items?.[Number(match[1])] as { kind?: LibraryKind; name?: string } | null | undefined;
  const known =
    item?.kind && item.kind in kindWords ? itemText(item.kind, item.name ?? '') : `Item ${Number(match[1]) + 1}`;
  return { item: known, path: (match[2] ?? '').replace(/^body\.?/, '') };
}

const itemText = (kind: LibraryKind, name: string) => `${kindWords[kind].one} “${name}”`;

export type Planned = { kind: LibraryKind; name: string; fate: 'added' | 'revised' | 'left' };

/** What is there already, as far as that decides. */
type Present = Pick<LibraryItem, 'kind' | 'name' | 'notes' | 'source' | 'body' | 'archivedAt'>;

/** What will become of each item of a file, as the server decides it. */
export function importPlan({ items }: LibraryFile, present: readonly Present[], sameName: SameName): Planned[] {
  const free = new Set(present.filter(({ archivedAt }) => archivedAt === null));
  const take = (isIt: (there: Present) => boolean) => {
    const found = [...free].find(isIt);
    if (found) free.delete(found);
    return found;
  };
  const named = items.map((item) => {
    const content = { ...item, body: hasOwnName(item.kind) ? { ...item.body, name: item.name } : item.body };
    const isNamed = (there: Present) => there.kind === item.kind && there.name === item.name;
    return { ...content, isNamed, equal: take((there) => isNamed(there) && saysTheSame(there, content)) };
  });
  return named.map(({ kind, name, isNamed, equal }) => {
    if (equal) return { kind, name, fate: 'left' };
    if (sameName === 'add' || !take(isNamed)) return { kind, name, fate: 'added' };
    return { kind, name, fate: sameName === 'skip' ? 'left' : 'revised' };
  });
}
