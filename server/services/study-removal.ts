import { and, eq, isNotNull, lt, sql } from 'drizzle-orm'
import type { Account } from '#shared/schemas/session'
import type { Study } from '#shared/schemas/studies'
import { useDatabase } from '../database/client'
import { members, studies } from '../database/schema'
import type { StudyAccess } from '../utils/caller'
import { closeStreams } from '../utils/event-stream'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { appendEvent } from './events'
import { lockedStudy, shownStudy } from './studies'
import { transact } from './transactions'

/** How long a deleted study can be restored, in milliseconds: 30 days. */
const keptFor = 30 * 24 * 60 * 60 * 1000

/**
 * Deletes a study: it is gone for everybody at once, and an owner can restore it for 30 days.
 * @param version that the deletion is based on
 * @throws 409 with the study as it is now when that is not its version
 */
export async function deleteStudy(access: StudyAccess, version: number, by: Account): Promise<void> {
  const people = await transact(async (tx) => {
    const { id, name } = await lockedStudy(tx, access, version)
    await tx.update(studies).set({ deletedAt: sql`current_timestamp(3)`, version: version + 1, updatedAt: sql`current_timestamp(3)` }).where(eq(studies.id, id))
    await recordActivity(tx, { study: { id, name }, by, action: 'deleted study', subject: name })
    await appendEvent(tx, id, { study: true })
    return tx.select({ id: members.userId }).from(members).where(eq(members.studyId, id))
  })
  for (const person of people) closeStreams(person.id)
}

/** Brings a deleted study back; one that is not deleted stays as it is. */
export async function restoreStudy({ id, role }: StudyAccess, by: Account): Promise<Study> {
  return transact(async (tx) => {
    const [row] = await tx.select().from(studies).where(eq(studies.id, id)).for('update')
    if (!row) problem(404, 'This study does not exist.')
    if (row.deletedAt === null) return shownStudy(row, role)
    const restored = { deletedAt: null, version: row.version + 1, updatedAt: new Date() }
    await tx.update(studies).set(restored).where(eq(studies.id, id))
    await recordActivity(tx, { study: { id, name: row.name }, by, action: 'restored study', subject: row.name })
    await appendEvent(tx, id, { study: true })
    return shownStudy({ ...row, ...restored }, role)
  })
}

/** Removes for good what was deleted more than 30 days ago; activity stays. */
export async function purgeStudies(): Promise<void> {
  await useDatabase().delete(studies).where(and(isNotNull(studies.deletedAt), lt(studies.deletedAt, new Date(Date.now() - keptFor))))
}
