import { z } from 'zod';
import { idSchema, momentSchema, pageOf, pageQuerySchema } from './common.ts';
import { defineEndpoint } from './endpoint.ts';
import { orderSchema, personRefSchema } from './reference.ts';
import { studyKindSchema } from './study-words.ts';

/** What the library holds. Each is a part of a study; `route` is the legs of a trip with their stations. */
export const libraryKinds = ['cell', 'pack', 'thermal', 'inlet', 'station', 'strategy', 'vehicle', 'route'] as const;
export const libraryKindSchema = z.enum(libraryKinds).meta({ id: 'LibraryKind' });
export type LibraryKind = z.infer<typeof libraryKindSchema>;

/** Judged by the engine's own schema of the kind; that part of the study file's schema says what is in it. */
export const libraryBodySchema = z
  .record(z.string(), z.unknown())
  .meta({ id: 'LibraryBody', description: 'The part as it stands in a study file; a route is `{ "legs": [ … ] }`' });

const itemNameSchema = z.string().trim().min(1, 'A name is needed').max(200);
const notesSchema = z.string().max(4000);
const sourceSchema = z.string().max(1000).meta({ description: 'Where the values come from' });
const revisionMessageSchema = z.string().trim().max(300);

/** What one revision holds. The name inside the body, where the kind has one, is always the item's. */
const content = { name: itemNameSchema, notes: notesSchema, source: sourceSchema, body: libraryBodySchema };

export const libraryItemSchema = z
  .object({
    id: idSchema,
    kind: libraryKindSchema,
    ...content,
    revision: z.int().min(1).meta({ description: 'The newest; also the ETag, as in `"r3"`' }),
    changedAt: momentSchema,
    changedBy: personRefSchema,
    archivedAt: momentSchema.nullable(),
    studyCount: z.int().min(0).meta({ description: 'Studies outside the archive whose working copy uses it' }),
  })
  .meta({ id: 'LibraryItem', description: 'A part in the library, as its newest revision has it' });
export type LibraryItem = z.infer<typeof libraryItemSchema>;

const revisionHead = { revision: z.int().min(1), message: z.string(), at: momentSchema, by: personRefSchema };

export const libraryRevisionRowSchema = z.object({ ...revisionHead, name: z.string() }).meta({
  id: 'LibraryRevisionRow',
});
export type LibraryRevisionRow = z.infer<typeof libraryRevisionRowSchema>;

export const libraryRevisionSchema = z.object({ ...revisionHead, ...content }).meta({ id: 'LibraryRevision' });
export type LibraryRevision = z.infer<typeof libraryRevisionSchema>;

export const libraryUseSchema = z
  .object({
    studyId: idSchema,
    number: z.int(),
    title: z.string(),
    kind: studyKindSchema,
    revision: z.int().meta({ description: 'Revision of the item that the working copy holds' }),
    isArchived: z.boolean(),
  })
  .meta({ id: 'LibraryUse' });
export type LibraryUse = z.infer<typeof libraryUseSchema>;

export const libraryFileItemSchema = z.object({ kind: libraryKindSchema, ...content }).meta({ id: 'LibraryFileItem' });

export const libraryFileSchema = z
  .object({
    format: z.literal('voltiplano/library'),
    version: z.literal(1),
    items: z.array(libraryFileItemSchema),
  })
  .meta({ id: 'LibraryFile', description: 'Parts without their history, to carry to another workspace' });
export type LibraryFile = z.infer<typeof libraryFileSchema>;

const inWorkspace = z.object({ workspaceId: idSchema });
const ofItem = inWorkspace.extend({ itemId: idSchema });
const ofRevision = ofItem.extend({ revision: z.coerce.number().int().min(1) });

/** Calls about the parts that studies are put together from. */
export const libraryEndpoints = {
  listLibrary: defineEndpoint({
    id: 'listLibrary',
    method: 'get',
    path: '/workspaces/:workspaceId/library',
    tag: 'Library',
    summary: 'Parts, by kind, words, archive; sorted; in pages',
    access: 'read',
    params: inWorkspace,
    query: pageQuerySchema.extend({
      kind: libraryKindSchema.optional(),
      q: z.string().max(200).optional().meta({ description: 'Beginnings of words in name, notes and source' }),
      archived: z.enum(['no', 'yes']).default('no'),
      sort: z.enum(['name', 'kind', 'changed', 'studies']).default('name'),
      order: orderSchema.default('asc'),
    }),
    status: 200,
    answer: pageOf(libraryItemSchema).extend({
      total: z.int().meta({ description: 'How many there are on all pages' }),
    }),
    problems: [],
  }),
  createLibraryItem: defineEndpoint({
    id: 'createLibraryItem',
    method: 'post',
    path: '/workspaces/:workspaceId/library',
    tag: 'Library',
    summary: 'Add a part; its first revision',
    access: 'edit-library',
    params: inWorkspace,
    body: z.object({
      kind: libraryKindSchema,
      ...content,
      notes: notesSchema.default(''),
      source: sourceSchema.default(''),
      message: revisionMessageSchema.default('Added'),
    }),
    status: 201,
    answer: libraryItemSchema,
    problems: [],
    creates: true,
  }),
  readLibraryItem: defineEndpoint({
    id: 'readLibraryItem',
    method: 'get',
    path: '/workspaces/:workspaceId/library/:itemId',
    tag: 'Library',
    summary: 'A part as its newest revision has it',
    access: 'read',
    params: ofItem,
    status: 200,
    answer: libraryItemSchema,
    problems: [],
  }),
  reviseLibraryItem: defineEndpoint({
    id: 'reviseLibraryItem',
    method: 'post',
    path: '/workspaces/:workspaceId/library/:itemId/revisions',
    tag: 'Library',
    summary: 'Save a new revision, made from the revision that If-Match names',
    access: 'edit-library',
    params: ofItem,
    body: z.object({ ...content, message: revisionMessageSchema.default('') }),
    status: 201,
    answer: libraryItemSchema,
    problems: ['UNCHANGED', 'ARCHIVED'],
    creates: true,
    ifMatch: true,
  }),
  listLibraryRevisions: defineEndpoint({
    id: 'listLibraryRevisions',
    method: 'get',
    path: '/workspaces/:workspaceId/library/:itemId/revisions',
    tag: 'Library',
    summary: 'Revisions of a part, newest first',
    access: 'read',
    params: ofItem,
    query: pageQuerySchema,
    status: 200,
    answer: pageOf(libraryRevisionRowSchema),
    problems: [],
  }),
  readLibraryRevision: defineEndpoint({
    id: 'readLibraryRevision',
    method: 'get',
    path: '/workspaces/:workspaceId/library/:itemId/revisions/:revision',
    tag: 'Library',
    summary: 'One revision, whole',
    access: 'read',
    params: ofRevision,
    status: 200,
    answer: libraryRevisionSchema,
    problems: [],
  }),
  restoreLibraryRevision: defineEndpoint({
    id: 'restoreLibraryRevision',
    method: 'post',
    path: '/workspaces/:workspaceId/library/:itemId/revisions/:revision/restore',
    tag: 'Library',
    summary: 'Save a new revision that says what an older one said',
    access: 'edit-library',
    params: ofRevision,
    status: 201,
    answer: libraryItemSchema,
    problems: ['UNCHANGED', 'ARCHIVED'],
    creates: true,
    ifMatch: true,
  }),
  archiveLibraryItem: defineEndpoint({
    id: 'archiveLibraryItem',
    method: 'post',
    path: '/workspaces/:workspaceId/library/:itemId/archive',
    tag: 'Library',
    summary: 'Put a part into the archive; studies keep what they took from it',
    access: 'edit-library',
    params: ofItem,
    status: 200,
    answer: libraryItemSchema,
    problems: [],
  }),
  unarchiveLibraryItem: defineEndpoint({
    id: 'unarchiveLibraryItem',
    method: 'post',
    path: '/workspaces/:workspaceId/library/:itemId/unarchive',
    tag: 'Library',
    summary: 'Take a part out of the archive',
    access: 'edit-library',
    params: ofItem,
    status: 200,
    answer: libraryItemSchema,
    problems: [],
  }),
  listLibraryUse: defineEndpoint({
    id: 'listLibraryUse',
    method: 'get',
    path: '/workspaces/:workspaceId/library/:itemId/studies',
    tag: 'Library',
    summary: 'Studies whose working copy uses a part, newest first',
    access: 'read',
    params: ofItem,
    query: pageQuerySchema,
    status: 200,
    answer: pageOf(libraryUseSchema),
    problems: [],
  }),
  exportLibrary: defineEndpoint({
    id: 'exportLibrary',
    method: 'get',
    path: '/workspaces/:workspaceId/library-file',
    tag: 'Library',
    summary: 'Parts as a file: all outside the archive, those of a kind, or one',
    access: 'read',
    params: inWorkspace,
    query: z.object({ kind: libraryKindSchema.optional(), itemId: idSchema.optional() }),
    status: 200,
    answer: libraryFileSchema,
    problems: [],
  }),
  importLibrary: defineEndpoint({
    id: 'importLibrary',
    method: 'post',
    path: '/workspaces/:workspaceId/library-file',
    tag: 'Library',
    summary: 'Take the parts of a file in: all of them or, where one is wrong, none',
    access: 'edit-library',
    params: inWorkspace,
    body: z.object({
      file: libraryFileSchema.extend({ items: z.array(libraryFileItemSchema).min(1).max(2000) }),
      sameName: z.enum(['revise', 'add', 'skip']).default('revise').meta({
        description: 'Where a part of the same kind and name is there: save a revision of it, add another, or leave it',
      }),
    }),
    status: 201,
    answer: z
      .object({
        added: z.array(libraryItemSchema),
        revised: z.array(libraryItemSchema),
        left: z.int().meta({ description: 'Parts that are there already, or that were to be skipped' }),
      })
      .meta({ id: 'LibraryImport' }),
    problems: [],
    creates: true,
    bodyLimit: '10mb',
  }),
} as const;
