import type { ColumnType, Generated } from 'kysely';
import type { LibraryKind } from '../contract/library.ts';
import type { Role } from '../contract/roles.ts';
import type { StudyKind, StudyState } from '../contract/study-words.ts';

/** Moment [ms since 1970-01-01T00:00Z]. */
type Moment = number;
/** Set once, never changed. */
type Fixed<T> = ColumnType<T, T, never>;

type PeopleTable = {
  id: Fixed<string>;
  email: string;
  /** When the person followed a link mailed to that address, or a provider vouched for it. */
  emailProvenAt: Moment | null;
  name: string;
  /** Argon2id; null for a person who signs in through a provider only. */
  passwordHash: string | null;
  createdAt: Fixed<Moment>;
};

/** A device on which a person signed in; the family of its refresh tokens. */
type SessionsTable = {
  id: Fixed<string>;
  personId: Fixed<string>;
  userAgent: string;
  createdAt: Fixed<Moment>;
  lastUsedAt: Moment;
  expiresAt: Moment;
  endedAt: Moment | null;
};

type RefreshTokensTable = {
  tokenHash: Fixed<string>;
  sessionId: Fixed<string>;
  createdAt: Fixed<Moment>;
  spentAt: Moment | null;
};

type OneTimeLinksTable = {
  tokenHash: Fixed<string>;
  personId: Fixed<string>;
  purpose: Fixed<'reset-password' | 'change-email'>;
  newEmail: Fixed<string | null>;
  createdAt: Fixed<Moment>;
  expiresAt: Fixed<Moment>;
  usedAt: Moment | null;
};

type IdentitiesTable = {
  issuer: Fixed<string>;
  subject: Fixed<string>;
  personId: Fixed<string>;
  createdAt: Fixed<Moment>;
};

type WorkspacesTable = { id: Fixed<string>; name: string; createdAt: Fixed<Moment> };

type MembersTable = {
  workspaceId: Fixed<string>;
  personId: Fixed<string>;
  role: Role;
  joinedAt: Fixed<Moment>;
};

type InvitationsTable = {
  id: Fixed<string>;
  workspaceId: Fixed<string>;
  email: Fixed<string>;
  role: Role;
  tokenHash: string;
  invitedBy: string | null;
  createdAt: Fixed<Moment>;
  expiresAt: Moment;
  acceptedAt: Moment | null;
  withdrawnAt: Moment | null;
};

type ApiTokensTable = {
  id: Fixed<string>;
  workspaceId: Fixed<string>;
  personId: Fixed<string>;
  name: string;
  role: Fixed<Role>;
  tokenHash: Fixed<string>;
  createdAt: Fixed<Moment>;
  expiresAt: Fixed<Moment>;
  lastUsedAt: Moment | null;
  revokedAt: Moment | null;
};

type ActivityTable = {
  /** Order of happening; pages are cut by it. */
  seq: Generated<number>;
  id: Fixed<string>;
  workspaceId: Fixed<string>;
  personId: Fixed<string | null>;
  action: Fixed<string>;
  subjectId: Fixed<string | null>;
  /** JSON object. */
  detail: Fixed<string>;
  createdAt: Fixed<Moment>;
};

type KeptAnswersTable = {
  keyHash: Fixed<string>;
  requestHash: Fixed<string>;
  status: Fixed<number>;
  sealedBody: Fixed<Buffer>;
  etag: Fixed<string | null>;
  createdAt: Fixed<Moment>;
};

type OutboxTable = {
  id: Fixed<string>;
  recipient: Fixed<string>;
  subject: Fixed<string>;
  sealedText: Fixed<Buffer>;
  createdAt: Fixed<Moment>;
  tries: number;
  nextTryAt: Moment;
};

type LibraryItemsTable = {
  /** The row in `librarySearch`. */
  seq: Generated<number>;
  id: Fixed<string>;
  workspaceId: Fixed<string>;
  kind: Fixed<LibraryKind>;
  name: string;
  /** `sortText` of the name. */
  sortName: string;
  /** The newest. */
  revision: number;
  changedAt: Moment;
  changedBy: string | null;
  archivedAt: Moment | null;
};

/** Kept by triggers: numbered without a gap, never changed. */
type LibraryRevisionsTable = {
  itemId: Fixed<string>;
  revision: Fixed<number>;
  name: Fixed<string>;
  notes: Fixed<string>;
  source: Fixed<string>;
  /** JSON object, as it was sent. */
  body: Fixed<string>;
  message: Fixed<string>;
  createdAt: Fixed<Moment>;
  createdBy: Fixed<string | null>;
};

/** Words of the newest revision of each item, filled by triggers; searched with MATCH, never read. */
type LibrarySearchTable = { rowid: Fixed<number> };

type StudiesTable = {
  /** The row in `studySearch`; rises in the order of creation. */
  seq: Generated<number>;
  id: Fixed<string>;
  workspaceId: Fixed<string>;
  /** Counts the studies of a workspace. */
  number: Fixed<number>;
  kind: Fixed<StudyKind>;
  state: StudyState;
  ownerId: string | null;
  title: string;
  /** `sortText` of the title. */
  sortTitle: string;
  packName: string | null;
  stationName: string | null;
  /** Names of pack, cell, stations and strategy, one a line, for the search. */
  partNames: string;
  createdAt: Fixed<Moment>;
  /** Of the working copy. */
  changedAt: Moment;
  changedBy: string | null;
  archivedAt: Moment | null;
  newestRevision: number;
  /** `contentHash` of the newest revision. */
  revisionHash: string;
  /** Numbers of the newest revision, to sort by. */
  minutes10To80: number | null;
  hottestCoreC: number | null;
  workingVersion: number;
  /** `contentHash` of the working copy. */
  workingHash: string;
  hasPending: 0 | 1;
  /** JSON object. */
  workingPending: string;
  /** Study file. */
  workingInputs: string;
};

/** Triggers refuse to change or delete a row. */
type StudyRevisionsTable = {
  studyId: Fixed<string>;
  revision: Fixed<number>;
  message: Fixed<string>;
  authorId: Fixed<string | null>;
  createdAt: Fixed<Moment>;
  title: Fixed<string>;
  engineVersion: Fixed<string>;
  /** JSON of `Headline`. */
  headline: Fixed<string>;
  /** JSON of `PartReference[]`. */
  parts: Fixed<string>;
  /** Study file. */
  inputs: Fixed<string>;
};

/** Revisions of the library that parts of a working copy were taken from. */
type StudyPartsTable = {
  studyId: Fixed<string>;
  part: Fixed<LibraryKind>;
  itemId: Fixed<string>;
  revision: Fixed<number>;
  keptAgainst: Fixed<number | null>;
};

/** Words of each study, filled by triggers; searched with MATCH. */
type StudySearchTable = { rowid: Fixed<number> };

/** The schema as the migrations leave it. */
export type Tables = {
  people: PeopleTable;
  sessions: SessionsTable;
  refreshTokens: RefreshTokensTable;
  oneTimeLinks: OneTimeLinksTable;
  identities: IdentitiesTable;
  workspaces: WorkspacesTable;
  members: MembersTable;
  invitations: InvitationsTable;
  apiTokens: ApiTokensTable;
  activity: ActivityTable;
  keptAnswers: KeptAnswersTable;
  outbox: OutboxTable;
  libraryItems: LibraryItemsTable;
  libraryRevisions: LibraryRevisionsTable;
  librarySearch: LibrarySearchTable;
  studies: StudiesTable;
  studyRevisions: StudyRevisionsTable;
  studyParts: StudyPartsTable;
  studySearch: StudySearchTable;
};
