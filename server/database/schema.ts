import { sql } from 'drizzle-orm'
import { bigint, double, foreignKey, index, int, json, mysqlEnum, mysqlTable, primaryKey, text, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import type { BitErrorCurves, CandidateCurves, CandidateValues, InformationCurves } from '#shared/schemas/values'
import type { Issue } from '#shared/schemas/common'
import type { PartValues, StoredPart } from '#shared/schemas/parts'
import type { SweepCreation } from '#shared/schemas/sweeps'
// By their paths: drizzle-kit reads this file and knows no aliases.
import { completeInputs } from '../../shared/schemas/candidates'
import type { CandidateInputs } from '../../shared/schemas/candidates'
import { studyRoles } from '../../shared/schemas/members'
import { partStates } from '../../shared/schemas/parts'
import { completeRequirements } from '../../shared/schemas/requirements'
import { searchKinds, searchStates } from '../../shared/schemas/searches'
import type { SearchCreation } from '../../shared/schemas/searches'
import { accountRoles } from '../../shared/schemas/session'
import type { SearchState } from '../compute/search'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { completedJson, instant, now, uuid } from './columns'

export const users = mysqlTable('users', {
  id: uuid('id').primaryKey(),
  email: varchar('email', { length: 254 }).notNull(),
  name: varchar('name', { length: 120 }).notNull(),
  passwordHash: varchar('password_hash', { length: 255 }).notNull(),
  role: mysqlEnum('role', accountRoles).notNull(),
  disabledAt: instant('disabled_at'),
  createdAt: instant('created_at').notNull().default(now),
}, t => [uniqueIndex('users_email').on(t.email)])

/** A signed-in browser. The cookie names the row; without the row the cookie is worth nothing. */
export const sessions = mysqlTable('sessions', {
  id: uuid('id').primaryKey(),
  userId: uuid('user_id').notNull().references(() => users.id, { onDelete: 'cascade' }),
  createdAt: instant('created_at').notNull().default(now),
  lastSeenAt: instant('last_seen_at').notNull().default(now),
  expiresAt: instant('expires_at').notNull(),
  userAgent: varchar('user_agent', { length: 300 }).notNull(),
}, t => [index('sessions_user').on(t.userId), index('sessions_expiry').on(t.expiresAt)])

/** API tokens; only a hash is kept, so that a token is seen once. */
export const tokens = mysqlTable('tokens', {
  id: uuid('id').primaryKey(),
  userId: uuid('user_id').notNull().references(() => users.id, { onDelete: 'cascade' }),
  name: varchar('name', { length: 80 }).notNull(),
  scope: mysqlEnum('scope', ['read', 'write']).notNull(),
  hash: varchar('hash', { length: 64 }).notNull(),
  createdAt: instant('created_at').notNull().default(now),
  expiresAt: instant('expires_at').notNull(),
  lastUsedAt: instant('last_used_at'),
}, t => [uniqueIndex('tokens_hash').on(t.hash), index('tokens_user').on(t.userId)])

/** Failed sign-ins, counted for each account and each address. */
export const signInFailures = mysqlTable('sign_in_failures', {
  id: uuid('id').primaryKey(),
  subject: varchar('subject', { length: 300 }).notNull(),
  at: instant('at').notNull().default(now),
}, t => [index('sign_in_failures_subject').on(t.subject, t.at)])

export const studies = mysqlTable('studies', {
  id: uuid('id').primaryKey(),
  name: varchar('name', { length: 120 }).notNull(),
  description: text('description').notNull(),
  requirements: completedJson('requirements', completeRequirements).notNull(),
  version: int('version').notNull().default(1),
  /** number of the last event; raised under this row's lock */
  eventNumber: bigint('event_number', { mode: 'number' }).notNull().default(0),
  createdBy: varchar('created_by', { length: 120 }).notNull(),
  createdAt: instant('created_at').notNull().default(now),
  updatedAt: instant('updated_at').notNull().default(now),
  archivedAt: instant('archived_at'),
  deletedAt: instant('deleted_at'),
}, t => [index('studies_deleted').on(t.deletedAt)])

export const members = mysqlTable('members', {
  studyId: uuid('study_id').notNull().references(() => studies.id, { onDelete: 'cascade' }),
  userId: uuid('user_id').notNull().references(() => users.id, { onDelete: 'restrict' }),
  role: mysqlEnum('role', studyRoles).notNull(),
  createdAt: instant('created_at').notNull().default(now),
}, t => [primaryKey({ columns: [t.studyId, t.userId] }), index('members_user').on(t.userId)])

/** A computed result, stored once for its canonical inputs and the core's version. */
export const results = mysqlTable('results', {
  /** SHA-256 in hexadecimal of the core's version and the canonical inputs */
  key: varchar('key', { length: 64 }).primaryKey(),
  coreVersion: varchar('core_version', { length: 20 }).notNull(),
  values: json('values').$type<CandidateValues>(),
  curves: json('curves').$type<CandidateCurves>(),
  errors: json('errors').$type<Issue[]>().notNull(),
  /** taken out of `values`, so that lists of studies need not parse thousands of them; of an interval its unfavourable end */
  passes: int('passes').generatedAlwaysAs(sql`json_value(\`values\`, '$.passes')`, { mode: 'stored' }),
  surplusDb: double('surplus_db').generatedAlwaysAs(sql`coalesce(json_value(\`values\`, '$.surplusDb.low'), json_value(\`values\`, '$.surplusDb'))`, { mode: 'stored' }),
  computedAt: instant('computed_at').notNull().default(now),
}, t => [
  // Holds all that the list of studies needs, so that it never reads the wide rows themselves.
  index('results_summary').on(t.key, t.passes, t.surplusDb),
])

/**
 * Columns and curves of a result that need heavy work: made when they are asked for. A part that is being computed stands here without
 * values, so that a restart takes it up again.
 */
export const resultParts = mysqlTable('result_parts', {
  key: varchar('key', { length: 64 }).notNull(),
  part: varchar('part', { length: 20 }).$type<StoredPart>().notNull(),
  state: mysqlEnum('state', partStates).notNull().default('computing'),
  values: json('values').$type<PartValues | BitErrorCurves | InformationCurves>(),
  errors: json('errors').$type<Issue[]>().notNull(),
  askedAt: instant('asked_at').notNull().default(now),
}, t => [primaryKey({ columns: [t.key, t.part] }), index('result_parts_state').on(t.state, t.askedAt)])

export const sweeps = mysqlTable('sweeps', {
  id: uuid('id').primaryKey(),
  studyId: uuid('study_id').notNull().references(() => studies.id, { onDelete: 'cascade' }),
  definition: json('definition').$type<SweepCreation>().notNull(),
  total: int('total').notNull(),
  made: int('made').notNull().default(0),
  state: mysqlEnum('state', ['running', 'done', 'cancelled', 'failed']).notNull().default('running'),
  createdBy: varchar('created_by', { length: 120 }).notNull(),
  createdAt: instant('created_at').notNull().default(now),
  finishedAt: instant('finished_at'),
}, t => [index('sweeps_study').on(t.studyId, t.state)])

/** One row of the grid. A row without a result under its key is being computed. */
export const candidates = mysqlTable('candidates', {
  id: uuid('id').primaryKey(),
  studyId: uuid('study_id').notNull().references(() => studies.id, { onDelete: 'cascade' }),
  sweepId: uuid('sweep_id'),
  position: double('position').notNull(),
  inputs: completedJson('inputs', completeInputs).notNull(),
  version: int('version').notNull().default(1),
  pin: int('pin'),
  /** null when the inputs contradict each other: then `errors` says how */
  resultKey: varchar('result_key', { length: 64 }),
  errors: json('errors').$type<Issue[]>().notNull(),
  createdAt: instant('created_at').notNull().default(now),
  updatedAt: instant('updated_at').notNull().default(now),
  deletedAt: instant('deleted_at'),
}, t => [
  index('candidates_study').on(t.studyId, t.deletedAt, t.position),
  index('candidates_result').on(t.resultKey),
  index('candidates_summary').on(t.studyId, t.deletedAt, t.resultKey, t.position),
  foreignKey({ name: 'candidates_sweep', columns: [t.sweepId], foreignColumns: [sweeps.id] }).onDelete('set null'),
])

/** Searches for labels or parameters. */
export const jobs = mysqlTable('jobs', {
  id: uuid('id').primaryKey(),
  studyId: uuid('study_id').notNull().references(() => studies.id, { onDelete: 'cascade' }),
  candidateId: uuid('candidate_id').notNull().references(() => candidates.id, { onDelete: 'cascade' }),
  kind: mysqlEnum('kind', searchKinds).notNull(),
  definition: json('definition').$type<StoredSearch>().notNull(),
  state: mysqlEnum('state', searchStates).notNull().default('queued'),
  /** what the search goes on from, its best so far included; null before its first step */
  progress: json('progress').$type<SearchState>(),
  error: varchar('error', { length: 1000 }),
  /** the row that it has made */
  resultId: uuid('result_id'),
  createdBy: varchar('created_by', { length: 120 }).notNull(),
  createdById: uuid('created_by_id').notNull(),
  createdAt: instant('created_at').notNull().default(now),
  updatedAt: instant('updated_at').notNull().default(now),
}, t => [index('jobs_study').on(t.studyId, t.createdAt), index('jobs_state').on(t.state, t.updatedAt)])

/** A search as it was asked for, and the row as it was then. */
export interface StoredSearch { asked: SearchCreation, inputs: CandidateInputs, row: CanonicalInputs }

/** What changed in a study, numbered without gaps, for open pages and for those that come back. */
export const events = mysqlTable('events', {
  studyId: uuid('study_id').notNull().references(() => studies.id, { onDelete: 'cascade' }),
  number: bigint('number', { mode: 'number' }).notNull(),
  payload: json('payload').$type<EventPayload>().notNull(),
  at: instant('at').notNull().default(now),
}, t => [primaryKey({ columns: [t.studyId, t.number] }), index('events_at').on(t.at)])

/** Stored form of an event: ids only; the stream sends the rows as they are when it is read. */
export interface EventPayload {
  candidates?: string[]
  removed?: string[]
  study?: true
  sweep?: string
  job?: string
}

/** Who did what, when. Rows are only ever added; names are kept as they were. */
export const activity = mysqlTable('activity', {
  id: uuid('id').primaryKey(),
  studyId: uuid('study_id'),
  studyName: varchar('study_name', { length: 120 }),
  userId: uuid('user_id'),
  userName: varchar('user_name', { length: 120 }).notNull(),
  action: varchar('action', { length: 60 }).notNull(),
  subject: varchar('subject', { length: 300 }).notNull(),
  change: json('change').$type<{ from?: unknown, to?: unknown }>().notNull(),
  at: instant('at').notNull().default(now),
}, t => [index('activity_study').on(t.studyId, t.at), index('activity_at').on(t.at)])
