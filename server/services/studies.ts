import { and, eq, sql } from 'drizzle-orm'
import type { z } from 'zod'
import type { StudyRole } from '#shared/schemas/members'
import { defaultRequirements } from '#shared/schemas/requirements'
import type { Account } from '#shared/schemas/session'
import type { Study, StudyChange, studyCreation } from '#shared/schemas/studies'
import { useDatabase } from '../database/client'
import type { Database, Transaction } from '../database/client'
import { members, studies } from '../database/schema'
import type { StudyAccess } from '../utils/caller'
import { newId } from '../utils/ids'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { copyCandidates, rekeyStudy } from './candidate-keys'
import { appendEvent } from './events'
import { archivedSentence, studyStanding } from './study-access'
import { transact } from './transactions'

type Row = typeof studies.$inferSelect

/** A study as the API sends it, with the caller's role. */
export function shownStudy(row: Row, role: StudyRole | null): Study {
  return {
    id: row.id, name: row.name, description: row.description, requirements: row.requirements, version: row.version, role,
    archivedAt: row.archivedAt?.toISOString() ?? null, deletedAt: row.deletedAt?.toISOString() ?? null,
    createdAt: row.createdAt.toISOString(), updatedAt: row.updatedAt.toISOString(), createdBy: row.createdBy,
  }
}

async function rowOf(db: Database | Transaction, id: string): Promise<Row> {
  const [row] = await db.select().from(studies).where(eq(studies.id, id))
  return row ?? problem(404, 'This study does not exist.')
}

/** A study as the caller sees it. */
export const getStudy = async ({ id, role }: StudyAccess): Promise<Study> => shownStudy(await rowOf(useDatabase(), id), role)

/** Takes a study's lock and holds a change's version against it. */
export async function lockedStudy(tx: Transaction, { id, role }: StudyAccess, version: number, sent?: StudyChange): Promise<Row> {
  const [row] = await tx.select().from(studies).where(eq(studies.id, id)).for('update')
  if (!row) problem(404, 'This study does not exist.')
  if (row.version !== version) {
    problem(409, 'Somebody else has changed this study in the meantime.', { current: shownStudy(row, role), sent, headers: { etag: `"${row.version}"` } })
  }
  return row
}

/** What a copy starts from: a study that the account may read. */
async function sourceOf(id: string, account: Account): Promise<Row> {
  const standing = await studyStanding('study', id, account.id)
  if (!standing || standing.deleted || (standing.role === null && account.role !== 'admin')) {
    const message = 'The study to duplicate does not exist, or is not shared with you.'
    problem(422, message, { errors: [{ path: 'copyOf', message }] })
  }
  return rowOf(useDatabase(), id)
}

/** Creates a study, whose creator owns it; a duplicate takes over the requirements and the candidates. */
export async function createStudy({ name, description, copyOf }: z.infer<typeof studyCreation>, by: Account): Promise<Study> {
  const source = copyOf === undefined ? null : await sourceOf(copyOf, by)
  const id = newId()
  return transact(async (tx) => {
    await tx.insert(studies).values({
      id, name, description: description === '' && source ? source.description : description,
      requirements: source?.requirements ?? defaultRequirements, createdBy: by.name,
    })
    await tx.insert(members).values({ studyId: id, userId: by.id, role: 'owner' })
    await recordActivity(tx, {
      study: { id, name }, by, action: source ? 'duplicated study' : 'created study', subject: name, ...(source && { from: { study: source.name } }),
    })
    if (source) await copyCandidates(tx, source.id, id)
    return shownStudy(await rowOf(tx, id), 'owner')
  })
}

/** The parts of a change that differ from what is there, before and after. */
function difference(row: Row, { requirements, archived, name, description }: StudyChange) {
  const before: Record<string, unknown> = { ...row.requirements, name: row.name, description: row.description, archived: row.archivedAt !== null }
  const after: Record<string, unknown> = { ...requirements, name, description, archived }
  const keys = Object.keys(after).filter(key => after[key] !== undefined && JSON.stringify(after[key]) !== JSON.stringify(before[key]))
  const pick = (from: Record<string, unknown>) => Object.fromEntries(keys.map(key => [key, from[key]]))
  return { keys, from: pick(before), to: pick(after) }
}

/**
 * Changes a study; new requirements have all its candidates computed again.
 * @param version that the change is based on
 * @throws 409 with the study as it is now when that is not its version, or when it is archived and stays so
 */
export async function changeStudy(access: StudyAccess, change: StudyChange, version: number, by: Account): Promise<Study> {
  return transact(async (tx) => {
    const row = await lockedStudy(tx, access, version, change)
    const { keys, from, to } = difference(row, change)
    if (keys.length === 0) return shownStudy(row, access.role)
    const { name, description, requirements, archived } = change
    if (row.archivedAt !== null && archived !== false) problem(409, archivedSentence, { current: shownStudy(row, access.role), sent: change })
    await tx.update(studies).set({
      name, description, requirements,
      archivedAt: archived === undefined || archived === (row.archivedAt !== null) ? undefined : archived ? sql`current_timestamp(3)` : null,
      version: version + 1, updatedAt: sql`current_timestamp(3)`,
    }).where(and(eq(studies.id, row.id), eq(studies.version, version)))
    await recordActivity(tx, { study: { id: row.id, name: name ?? row.name }, by, action: 'changed study', subject: name ?? row.name, from, to })
    await appendEvent(tx, row.id, { study: true })
    if (requirements && keys.some(key => key in requirements)) await rekeyStudy(tx, row.id, requirements)
    return shownStudy(await rowOf(tx, row.id), access.role)
  })
}
