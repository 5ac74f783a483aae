import { sql } from 'kysely';
import { asPersonRef } from '../account/person-ref.ts';
import type { Headline, StudyFile, StudyRow } from '../contract/study.ts';
import type { Core } from '../core.ts';
import { newId } from '../db/secret-tokens.ts';
import { HttpProblem } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import type { StudyWords } from './study-content.ts';

/** What lists and pages show of a study, with its owner, its last writer and the headline of its newest revision. */
export function selectStudies({ db }: Core, access: WorkspaceAccess) {
  return db
    .selectFrom('studies')
    .innerJoin('studyRevisions as newest', (join) =>
      join.onRef('newest.studyId', '=', 'studies.id').onRef('newest.revision', '=', 'studies.newestRevision'),
    )
    .leftJoin('people as owner', 'owner.id', 'studies.ownerId')
    .leftJoin('people as changer', 'changer.id', 'studies.changedBy')
    .select([
      'studies.seq',
      'studies.id',
      'number',
      'kind',
      'state',
      'ownerId',
      'owner.name as ownerName',
      'studies.title',
      'packName',
      'stationName',
      'studies.createdAt',
      'changedAt',
      'changedBy',
      'changer.name as changerName',
      'archivedAt',
      'newestRevision',
      'headline',
      'workingVersion',
      'hasPending',
    ])
    .select(sql<0 | 1>`workingHash <> revisionHash OR hasPending`.as('isChanged'))
    .where('studies.workspaceId', '=', access.workspaceId);
}

type SelectedStudy = Awaited<ReturnType<ReturnType<typeof selectStudies>['executeTakeFirstOrThrow']>>;

/** As lists have it. */
export function asStudyRow(row: SelectedStudy): StudyRow {
  return {
    id: row.id,
    number: row.number,
    kind: row.kind,
    title: row.title,
    state: row.state,
    owner: asPersonRef(row.ownerId, row.ownerName),
    createdAt: asMoment(row.createdAt),
    changedAt: asMoment(row.changedAt),
    changedBy: asPersonRef(row.changedBy, row.changerName),
    archivedAt: row.archivedAt === null ? null : asMoment(row.archivedAt),
    revision: row.newestRevision,
    isChanged: row.isChanged === 1,
    packName: row.packName,
    stationName: row.stationName,
    headline: JSON.parse(row.headline) as Headline,
  };
}

export function asMoment(at: number): string {
  return new Date(at).toISOString();
}

/** A study with its working copy as it is stored. @throws {HttpProblem} `NOT_FOUND` */
export async function getStudy(core: Core, access: WorkspaceAccess, studyId: string) {
  access.require('read');
  const row = await selectStudies(core, access)
    .select(['revisionHash', 'workingHash', 'workingPending', 'workingInputs'])
    .where('studies.id', '=', studyId)
    .executeTakeFirst();
  if (!row) throw new HttpProblem('NOT_FOUND', 'The workspace has no such study.');
  return row;
}

export type StoredStudy = Awaited<ReturnType<typeof getStudy>>;

/** @throws {HttpProblem} `ARCHIVED` */
export function requireInUse({ archivedAt }: StoredStudy): void {
  if (archivedAt === null) return;
  throw new HttpProblem('ARCHIVED', 'The study lies in the archive. Take it out before changing it.');
}

/** The first content of a study. */
export type NewStudy = { inputs: StudyFile; words: StudyWords; hash: string; headline: Headline };

/** Makes a study of the caller's, whose number follows the highest of the workspace. Its first revision must follow. */
export async function insertStudy(core: Core, access: WorkspaceAccess, study: NewStudy) {
  access.require('edit-studies');
  const { db, now } = core;
  const { inputs, words, hash, headline } = study;
  const { workspaceId, actor } = access;
  const at = now();
  const { highest } = await db
    .selectFrom('studies')
    .select(({ fn }) => fn.max('number').as('highest'))
    .where('workspaceId', '=', workspaceId)
    .executeTakeFirstOrThrow();
  const [id, number] = [newId(), (highest ?? 0) + 1];
  await db
    .insertInto('studies')
    .values({
      ...words,
      ...sortedBy(headline),
      id,
      workspaceId,
      number,
      kind: inputs.kind,
      state: 'draft',
      ownerId: actor.personId,
      createdAt: at,
      changedAt: at,
      changedBy: actor.personId,
      archivedAt: null,
      newestRevision: 1,
      revisionHash: hash,
      workingVersion: 1,
      workingHash: hash,
      hasPending: 0,
      workingPending: '{}',
      workingInputs: JSON.stringify(inputs),
    })
    .execute();
  return { id, number };
}

/** What the working copy becomes. */
export type Written = { inputs: StudyFile; pending: Record<string, unknown>; words: StudyWords; hash: string };

/** Writes a working copy and counts its version up. */
export async function updateWorkingCopy(core: Core, access: WorkspaceAccess, studyId: string, written: Written) {
  access.require('edit-studies');
  const { inputs, pending, words, hash } = written;
  await core.db
    .updateTable('studies')
    .set(({ eb }) => ({
      ...words,
      changedAt: core.now(),
      changedBy: access.actor.personId,
      workingVersion: eb('workingVersion', '+', 1),
      workingHash: hash,
      hasPending: Object.keys(pending).length > 0 ? 1 : 0,
      workingPending: JSON.stringify(pending),
      workingInputs: JSON.stringify(inputs),
    }))
    .where('workspaceId', '=', access.workspaceId)
    .where('id', '=', studyId)
    .execute();
}

/** Makes a revision the newest of its study. */
export async function setNewestRevision(
  core: Core,
  access: WorkspaceAccess,
  studyId: string,
  { revision, hash, headline }: { revision: number; hash: string; headline: Headline },
): Promise<void> {
  access.require('edit-studies');
  await core.db
    .updateTable('studies')
    .set({ newestRevision: revision, revisionHash: hash, ...sortedBy(headline) })
    .where('workspaceId', '=', access.workspaceId)
    .where('id', '=', studyId)
    .execute();
}

/** Puts a study into the archive, or takes it out. */
export async function setArchived(core: Core, access: WorkspaceAccess, studyId: string, archivedAt: number | null) {
  access.require('edit-studies');
  await core.db
    .updateTable('studies')
    .set({ archivedAt })
    .where('workspaceId', '=', access.workspaceId)
    .where('id', '=', studyId)
    .execute();
}

/** Numbers of a headline that lists are sorted by. */
function sortedBy({ numbers }: Headline) {
  return { minutes10To80: numbers?.minutes10To80 ?? null, hottestCoreC: numbers?.hottestCoreC ?? null };
}
