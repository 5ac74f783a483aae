import { z } from 'zod';
import { limitCodes, type SessionStudyInput, type TripStudyInput } from '@voltiplano/engine';
import { idSchema, momentSchema, pageOf, pageQuerySchema } from './common.ts';
import { defineEndpoint } from './endpoint.ts';
import { libraryKindSchema } from './library.ts';
import { orderSchema, personRefSchema } from './reference.ts';
import { studyKindSchema, studyStateSchema } from './study-words.ts';

/** A study file, as it is written by hand or by the desk, before defaults. */
export type StudyFile = SessionStudyInput | TripStudyInput;

/** Judged by the engine's own check, whose issues come back as `errors` below `body.inputs`. */
export const studyFileSchema = z.record(z.string(), z.unknown()).meta({
  id: 'StudyFile',
  description: 'A whole study file; its title is the title of the study',
}) as unknown as z.ZodType<StudyFile>;

/** Which revision of the library a part of the inputs was taken from. */
export const partReferenceSchema = z
  .object({
    part: libraryKindSchema,
    itemId: idSchema,
    revision: z.int().min(1),
    keptAgainst: z
      .int()
      .nullable()
      .default(null)
      .meta({ description: 'Newest revision that somebody looked at and chose not to take' }),
  })
  .meta({ id: 'PartReference' });
export type PartReference = z.infer<typeof partReferenceSchema>;

const partReferencesSchema = z
  .array(partReferenceSchema)
  .max(8)
  .refine((all) => new Set(all.map(({ part }) => part)).size === all.length, 'A part has one reference at most');

export const partStandingSchema = partReferenceSchema
  .extend({
    keptAgainst: z.int().nullable(),
    itemName: z.string(),
    newestRevision: z.int().min(1),
    isArchived: z.boolean(),
    isChanged: z.boolean().meta({ description: 'Whether the study says otherwise than the revision it refers to' }),
  })
  .meta({ id: 'PartStanding', description: 'A reference, and how the library stands to it now' });
export type PartStanding = z.infer<typeof partStandingSchema>;

const minutes = z.number().nullable();

export const headlineSchema = z
  .object({
    engineVersion: z.string(),
    failure: z.string().nullable().meta({ description: 'Why there are no numbers, in words; null where there are' }),
    numbers: z
      .object({
        endMin: z.number(),
        endSoc: z.number(),
        minutes0To50: minutes,
        minutes10To80: minutes,
        minutes0To100: minutes,
        peakStationPowerKw: z.number().nullable(),
        meanStationPower10To80Kw: z.number().nullable(),
        kmIn10Min: z.number().nullable(),
        kmIn20Min: z.number().nullable(),
        hottestCoreC: z.number().nullable(),
        lowestAnodeMv: z.number().nullable(),
        stationKwh: z.number().nullable(),
        storedKwh: z.number().nullable(),
      })
      .nullable(),
    section: z
      .object({
        endMin: z.number(),
        points: z.array(z.tuple([z.number(), z.number()])).meta({ description: 'Minute and station power [kW]' }),
        limits: z.array(z.object({ limit: z.enum(limitCodes), fromMin: z.number(), toMin: z.number() })),
      })
      .nullable()
      .meta({ description: 'The power curve with what held it, thinned to be drawn small' }),
  })
  .meta({ id: 'Headline', description: 'What the engine made of a revision; null where the run did not cover it' });
export type Headline = z.infer<typeof headlineSchema>;

const revisionHead = {
  revision: z.int().min(1),
  message: z.string(),
  at: momentSchema,
  by: personRefSchema,
  title: z.string(),
};

export const studyRevisionRowSchema = z
  .object({ ...revisionHead, numbers: headlineSchema.shape.numbers, engineVersion: z.string() })
  .meta({ id: 'StudyRevisionRow' });
export type StudyRevisionRow = z.infer<typeof studyRevisionRowSchema>;

export const studyRevisionSchema = z
  .object({ ...revisionHead, inputs: studyFileSchema, parts: z.array(partStandingSchema), headline: headlineSchema })
  .meta({ id: 'StudyRevision', description: 'One revision; it never changes, but the library may move on' });
export type StudyRevision = z.infer<typeof studyRevisionSchema>;

const studyHead = {
  id: idSchema,
  number: z.int().min(1).meta({ description: 'Counts the studies of a workspace' }),
  kind: studyKindSchema,
  title: z.string(),
  state: studyStateSchema,
  owner: personRefSchema,
  createdAt: momentSchema,
  changedAt: momentSchema.meta({ description: 'Of the working copy' }),
  changedBy: personRefSchema,
  archivedAt: momentSchema.nullable(),
  revision: z.int().min(1).meta({ description: 'The newest' }),
  isChanged: z.boolean().meta({ description: 'Whether the working copy differs from the newest revision' }),
};

export const studyRowSchema = z
  .object({
    ...studyHead,
    packName: z.string().nullable(),
    stationName: z.string().nullable(),
    headline: headlineSchema.meta({ description: 'Of the newest revision' }),
  })
  .meta({ id: 'StudyRow', description: 'A study, as lists show it' });
export type StudyRow = z.infer<typeof studyRowSchema>;

/** Entries that break a rule and wait, by the path of their field or table; nobody else reads them. */
export const pendingEntriesSchema = z.record(z.string().max(200), z.unknown()).meta({ id: 'PendingEntries' });

export const workingCopySchema = z
  .object({
    version: z.int().min(1).meta({ description: 'Counts what was written; also the ETag, as in `"w12"`' }),
    inputs: studyFileSchema,
    pending: pendingEntriesSchema,
    parts: z.array(partStandingSchema),
    changedAt: momentSchema,
    changedBy: personRefSchema,
    isChanged: z.boolean(),
  })
  .meta({ id: 'WorkingCopy', description: 'What is being worked on, saved as it is typed' });
export type WorkingCopy = z.infer<typeof workingCopySchema>;

export const studySchema = z
  .object({ ...studyHead, headline: headlineSchema, working: workingCopySchema })
  .meta({ id: 'Study' });
export type Study = z.infer<typeof studySchema>;

const inWorkspace = z.object({ workspaceId: idSchema });
const ofStudy = inWorkspace.extend({ studyId: idSchema });
const ofRevision = ofStudy.extend({ revision: z.coerce.number().int().min(1) });
const messageSchema = z.string().trim().min(1, 'Say in a few words what this revision is').max(300);

/** Calls about studies, their working copies and their revisions. */
export const studyEndpoints = {
  listStudies: defineEndpoint({
    id: 'listStudies',
    method: 'get',
    path: '/workspaces/:workspaceId/studies',
    tag: 'Studies',
    summary: 'Studies, found by words, filtered and sorted; in pages',
    access: 'read',
    params: inWorkspace,
    query: pageQuerySchema.extend({
      q: z.string().max(200).optional().meta({
        description: 'Beginnings of words in title, names of pack, cell, station and strategy, messages, and people',
      }),
      kind: studyKindSchema.optional(),
      state: studyStateSchema.optional(),
      ownerId: idSchema.optional(),
      itemId: idSchema.optional().meta({ description: 'Only those that use this part of the library' }),
      archived: z.enum(['no', 'yes']).default('no'),
      sort: z.enum(['changed', 'number', 'title', 'minutes10To80', 'hottestCoreC', 'owner']).default('changed'),
      order: orderSchema.default('desc'),
    }),
    status: 200,
    answer: pageOf(studyRowSchema).extend({
      total: z.int().meta({ description: 'How many there are on all pages' }),
      archivedTotal: z.int().meta({ description: 'How many of the workspace are in the archive' }),
      inReviewTotal: z.int().meta({ description: 'How many of the workspace wait for a review' }),
    }),
    problems: [],
  }),
  createStudy: defineEndpoint({
    id: 'createStudy',
    method: 'post',
    path: '/workspaces/:workspaceId/studies',
    tag: 'Studies',
    summary: 'Make a study from a study file; this is its first revision',
    access: 'edit-studies',
    params: inWorkspace,
    body: z.object({
      inputs: studyFileSchema,
      parts: partReferencesSchema.default([]),
      message: messageSchema.default('Created'),
    }),
    status: 201,
    answer: studySchema,
    problems: [],
    creates: true,
  }),
  readStudy: defineEndpoint({
    id: 'readStudy',
    method: 'get',
    path: '/workspaces/:workspaceId/studies/:studyId',
    tag: 'Studies',
    summary: 'A study with its working copy, whose version is the ETag',
    access: 'read',
    params: ofStudy,
    status: 200,
    answer: studySchema,
    problems: [],
  }),
  writeWorkingCopy: defineEndpoint({
    id: 'writeWorkingCopy',
    method: 'put',
    path: '/workspaces/:workspaceId/studies/:studyId/working',
    tag: 'Studies',
    summary: 'Write the working copy over the version that If-Match names',
    access: 'edit-studies',
    params: ofStudy,
    body: z.object({
      inputs: studyFileSchema,
      pending: pendingEntriesSchema.default({}),
      parts: partReferencesSchema.default([]),
    }),
    status: 200,
    answer: workingCopySchema,
    problems: ['ARCHIVED'],
    ifMatch: true,
  }),
  saveRevision: defineEndpoint({
    id: 'saveRevision',
    method: 'post',
    path: '/workspaces/:workspaceId/studies/:studyId/revisions',
    tag: 'Studies',
    summary: 'Make the working copy, at the version that If-Match names, a revision',
    access: 'edit-studies',
    params: ofStudy,
    body: z.object({ message: messageSchema }),
    status: 201,
    answer: studySchema,
    problems: ['UNCHANGED', 'ENTRIES_PENDING', 'ARCHIVED'],
    creates: true,
    ifMatch: true,
  }),
  listStudyRevisions: defineEndpoint({
    id: 'listStudyRevisions',
    method: 'get',
    path: '/workspaces/:workspaceId/studies/:studyId/revisions',
    tag: 'Studies',
    summary: 'Revisions of a study with their headline numbers, newest first',
    access: 'read',
    params: ofStudy,
    query: pageQuerySchema,
    status: 200,
    answer: pageOf(studyRevisionRowSchema),
    problems: [],
  }),
  readStudyRevision: defineEndpoint({
    id: 'readStudyRevision',
    method: 'get',
    path: '/workspaces/:workspaceId/studies/:studyId/revisions/:revision',
    tag: 'Studies',
    summary: 'One revision, whole',
    access: 'read',
    params: ofRevision,
    status: 200,
    answer: studyRevisionSchema,
    problems: [],
  }),
  copyStudy: defineEndpoint({
    id: 'copyStudy',
    method: 'post',
    path: '/workspaces/:workspaceId/studies/:studyId/copy',
    tag: 'Studies',
    summary: 'Make a study of the caller’s own from a revision, by default the newest',
    access: 'edit-studies',
    params: ofStudy,
    body: z.object({
      title: z
        .string()
        .trim()
        .max(300)
        .optional()
        .meta({ description: 'By default the old one with “copy” behind it' }),
      revision: z.int().min(1).optional(),
    }),
    status: 201,
    answer: studySchema,
    problems: [],
    creates: true,
  }),
  archiveStudy: defineEndpoint({
    id: 'archiveStudy',
    method: 'post',
    path: '/workspaces/:workspaceId/studies/:studyId/archive',
    tag: 'Studies',
    summary: 'Put a study into the archive, where it cannot be changed',
    access: 'edit-studies',
    params: ofStudy,
    status: 200,
    answer: studySchema,
    problems: [],
  }),
  unarchiveStudy: defineEndpoint({
    id: 'unarchiveStudy',
    method: 'post',
    path: '/workspaces/:workspaceId/studies/:studyId/unarchive',
    tag: 'Studies',
    summary: 'Take a study out of the archive',
    access: 'edit-studies',
    params: ofStudy,
    status: 200,
    answer: studySchema,
    problems: [],
  }),
} as const;
