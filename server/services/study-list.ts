import { and, count, desc, eq, inArray, isNotNull, isNull, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import type { z } from 'zod'
import type { Account } from '#shared/schemas/session'
import type { StudyState, StudySummary, studiesQuery } from '#shared/schemas/studies'
import { useDatabase } from '../database/client'
import { candidates, members, results, studies, users } from '../database/schema'
import { groupBy } from '../utils/group-by'
import { problem } from '../utils/problem'

/** Conditions of each state, and who sees it: deleted studies exist for their owners only, who can restore them. */
const conditions: Record<StudyState, (account: Account) => SQL | undefined> = {
  draft: account => and(isNull(studies.deletedAt), isNull(studies.archivedAt), seen(account)),
  archived: account => and(isNull(studies.deletedAt), isNotNull(studies.archivedAt), seen(account)),
  deleted: () => and(isNotNull(studies.deletedAt), eq(members.role, 'owner')),
}

const seen = (account: Account) => account.role === 'admin' ? undefined : isNotNull(members.role)

interface Place { updatedAt: Date, id: string }
const cursorOf = ({ updatedAt, id }: Place) => Buffer.from(`${updatedAt.getTime()} ${id}`).toString('base64url')

function placeOf(cursor: string): Place {
  const [, ms, id] = /^(\d{1,14}) ([0-9a-f-]{36})$/.exec(Buffer.from(cursor, 'base64url').toString()) ?? []
  if (!ms || !id) problem(422, 'This cursor does not come from this list.', { errors: [{ path: 'cursor', message: 'Send the cursor that the page before has answered as next.' }] })
  return { updatedAt: new Date(Number(ms)), id }
}

/** Sorts a page's studies behind those that changed later. */
const behind = ({ updatedAt, id }: Place) =>
  sql`(${studies.updatedAt}, ${studies.id}) < (${sql.param(updatedAt, studies.updatedAt)}, ${id})`

/** A page of the studies that an account has a part in (administrators: of all), what changed last first. */
export async function listStudies(
  account: Account, { state, cursor, limit }: z.infer<typeof studiesQuery>,
): Promise<{ items: StudySummary[], next: string | null }> {
  const rows = await useDatabase().select({
    id: studies.id, name: studies.name, description: studies.description, version: studies.version,
    updatedAt: studies.updatedAt, deletedAt: studies.deletedAt, role: members.role,
  }).from(studies)
    .leftJoin(members, and(eq(members.studyId, studies.id), eq(members.userId, account.id)))
    .where(and(conditions[state](account), cursor ? behind(placeOf(cursor)) : undefined))
    .orderBy(desc(studies.updatedAt), desc(studies.id)).limit(limit + 1)
  const page = rows.slice(0, limit)
  const [people, counts, leaders] = await aboutStudies(page.map(row => row.id))
  const items = page.map(row => ({
    ...row, state,
    members: (people.get(row.id) ?? []).map(({ name, role }) => ({ name, role })),
    ...(counts.get(row.id) ?? { candidates: 0, computing: 0, passing: 0 }),
    leading: leaders.get(row.id) ?? null,
    updatedAt: row.updatedAt.toISOString(), deletedAt: row.deletedAt?.toISOString() ?? null,
  }))
  const last = page.at(-1)
  return { items, next: rows.length > limit && last ? cursorOf(last) : null }
}

async function aboutStudies(ids: string[]) {
  return ids.length === 0
    ? [new Map<string, never[]>(), new Map<string, never>(), new Map<string, never>()] as const
    : Promise.all([peopleOf(ids), countsOf(ids), leadersOf(ids)])
}

async function peopleOf(ids: string[]) {
  const rows = await useDatabase().select({ studyId: members.studyId, name: users.name, role: members.role }).from(members)
    .innerJoin(users, eq(users.id, members.userId))
    .where(inArray(members.studyId, ids)).orderBy(members.role, users.name)
  return groupBy(rows, row => row.studyId)
}

const live = (ids: string[]) => and(inArray(candidates.studyId, ids), isNull(candidates.deletedAt))

async function countsOf(ids: string[]) {
  const rows = await useDatabase().select({
    studyId: candidates.studyId,
    candidates: count(),
    computing: sql`coalesce(sum(${candidates.resultKey} is not null and ${results.key} is null), 0)`.mapWith(Number),
    passing: sql`coalesce(sum(${results.passes}), 0)`.mapWith(Number),
  }).from(candidates).leftJoin(results, eq(results.key, candidates.resultKey)).where(live(ids)).groupBy(candidates.studyId)
  return new Map(rows.map(({ studyId, ...counts }) => [studyId, counts]))
}

/** Each study's leading candidate: one that passes before one that does not, then the larger surplus in the case that decides. */
async function leadersOf(ids: string[]) {
  const db = useDatabase()
  const ranked = db.select({
    id: candidates.id, surplusDb: results.surplusDb,
    place: sql<number>`row_number() over (partition by ${candidates.studyId} order by ${results.passes} desc, ${results.surplusDb} desc, ${candidates.position})`.as('place'),
  }).from(candidates).innerJoin(results, eq(results.key, candidates.resultKey))
    .where(and(live(ids), isNotNull(results.surplusDb))).as('ranked')
  const rows = await db.select({ studyId: candidates.studyId, inputs: candidates.inputs, surplusDb: ranked.surplusDb }).from(ranked)
    .innerJoin(candidates, eq(candidates.id, ranked.id)).where(eq(ranked.place, 1))
  return new Map(rows.map(row => [row.studyId, { name: row.inputs.name, surplusDb: row.surplusDb! }]))
}
