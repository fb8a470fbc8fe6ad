import { and, desc, eq, inArray, isNotNull, isNull, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import type { z } from 'zod'
import type { Account } from '#shared/schemas/session'
import type { StudyState, StudySummary, studiesQuery } from '#shared/schemas/studies'
import { useDatabase } from '../database/client'
import { members, studies, users } from '../database/schema'
import { groupBy } from '../utils/group-by'
import { problem } from '../utils/problem'
import { rowSummaries } from './row-summaries'

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
    updatedAt: studies.updatedAt, deletedAt: studies.deletedAt, role: members.role, eventNumber: studies.eventNumber,
  }).from(studies)
    .leftJoin(members, and(eq(members.studyId, studies.id), eq(members.userId, account.id)))
    .where(and(conditions[state](account), cursor ? behind(placeOf(cursor)) : undefined))
    .orderBy(desc(studies.updatedAt), desc(studies.id)).limit(limit + 1)
  const page = rows.slice(0, limit)
  const [people, summaries] = await Promise.all([peopleOf(page.map(row => row.id)), rowSummaries(page)])
  const items = page.map(({ eventNumber: _, ...row }) => ({
    ...row, state,
    members: (people.get(row.id) ?? []).map(({ name, role }) => ({ name, role })),
    ...summaries.get(row.id)!,
    updatedAt: row.updatedAt.toISOString(), deletedAt: row.deletedAt?.toISOString() ?? null,
  }))
  const last = page.at(-1)
  return { items, next: rows.length > limit && last ? cursorOf(last) : null }
}

async function peopleOf(ids: string[]) {
  if (ids.length === 0) return new Map<string, never[]>()
  const rows = await useDatabase().select({ studyId: members.studyId, name: users.name, role: members.role }).from(members)
    .innerJoin(users, eq(users.id, members.userId))
    .where(inArray(members.studyId, ids)).orderBy(members.role, users.name)
  return groupBy(rows, row => row.studyId)
}
