import { asPersonRef } from '../account/person-ref.ts';
import type { Page, PageQuery } from '../contract/common.ts';
import type { Headline, PartReference, StudyFile, StudyRevisionRow } from '../contract/study.ts';
import type { Core } from '../core.ts';
import { cutPage, readCursor } from '../db/paging.ts';
import { HttpProblem } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { asMoment } from './study-repository.ts';

/** What a revision is made of. */
export type NewRevision = {
  studyId: string;
  revision: number;
  message: string;
  inputs: StudyFile;
  parts: readonly PartReference[];
  headline: Headline;
};

/** Adds a revision by the caller to a study of the workspace. */
export async function insertRevision({ db, now }: Core, access: WorkspaceAccess, made: NewRevision): Promise<void> {
  access.require('edit-studies');
  const { inputs, parts, headline, ...head } = made;
  await db
    .insertInto('studyRevisions')
    .columns([
      'studyId',
      'revision',
      'message',
      'authorId',
      'createdAt',
      'title',
      'engineVersion',
      'headline',
      'parts',
      'inputs',
    ])
    .expression((eb) =>
      eb
        .selectFrom('studies')
        .select((of) => [
          'studies.id',
          of.val(head.revision).as('revision'),
          of.val(head.message).as('message'),
          of.val(access.actor.personId).as('authorId'),
          of.val(now()).as('createdAt'),
          of.val(inputs.title ?? '').as('title'),
          of.val(headline.engineVersion).as('engineVersion'),
          of.val(JSON.stringify(headline)).as('headline'),
          of.val(JSON.stringify(parts)).as('parts'),
          of.val(JSON.stringify(inputs)).as('inputs'),
        ])
        .where('studies.workspaceId', '=', access.workspaceId)
        .where('studies.id', '=', head.studyId),
    )
    .executeTakeFirstOrThrow();
}

/** Revisions of a study, newest first. */
export async function listRevisions(
  core: Core,
  access: WorkspaceAccess,
  studyId: string,
  { cursor, limit }: PageQuery,
): Promise<Page<StudyRevisionRow>> {
  access.require('read');
  let query = selectRevisions(core, access, studyId)
    .orderBy('revision', 'desc')
    .limit(limit + 1);
  if (cursor !== undefined) query = query.where('revision', '<', readCursor(cursor));
  const { rows, nextCursor } = cutPage(await query.execute(), limit, ({ revision }) => revision);
  const items = rows.map((row) => ({
    ...asHead(row),
    numbers: (JSON.parse(row.headline) as Headline).numbers,
    engineVersion: row.engineVersion,
  }));
  return { items, nextCursor };
}

/** A revision as it was made. @throws {HttpProblem} `NOT_FOUND` */
export async function getRevision(core: Core, access: WorkspaceAccess, studyId: string, revision: number) {
  access.require('read');
  const row = await selectRevisions(core, access, studyId)
    .select(['inputs', 'parts'])
    .where('revision', '=', revision)
    .executeTakeFirst();
  if (!row) throw new HttpProblem('NOT_FOUND', 'The workspace has no such revision of a study.');
  return {
    ...asHead(row),
    inputs: JSON.parse(row.inputs) as StudyFile,
    parts: JSON.parse(row.parts) as PartReference[],
    headline: JSON.parse(row.headline) as Headline,
  };
}

function selectRevisions({ db }: Core, access: WorkspaceAccess, studyId: string) {
  return db
    .selectFrom('studyRevisions')
    .innerJoin('studies', 'studies.id', 'studyRevisions.studyId')
    .leftJoin('people', 'people.id', 'studyRevisions.authorId')
    .select(['revision', 'message', 'studyRevisions.createdAt', 'authorId', 'people.name as authorName'])
    .select(['studyRevisions.title', 'headline', 'engineVersion'])
    .where('studies.workspaceId', '=', access.workspaceId)
    .where('studyRevisions.studyId', '=', studyId);
}

type SelectedRevision = Awaited<ReturnType<ReturnType<typeof selectRevisions>['executeTakeFirstOrThrow']>>;

function asHead({ revision, message, createdAt, authorId, authorName, title }: SelectedRevision) {
  return { revision, message, at: asMoment(createdAt), by: asPersonRef(authorId, authorName), title };
}
