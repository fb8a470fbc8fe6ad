import { and, desc, eq, lt } from 'drizzle-orm'
import type { ActivityEntry } from '#shared/schemas/activity'
import type { Account } from '#shared/schemas/session'
import { useDatabase } from '../database/client'
import type { Database, Transaction } from '../database/client'
import { activity } from '../database/schema'
import { newId } from '../utils/ids'

export interface Deed {
  /** the study that it happened in, if any */
  study?: { id: string, name: string }
  by: Pick<Account, 'id' | 'name'>
  /** what was done, in the past tense: "changed study" */
  action: string
  /** to what: a name */
  subject: string
  /** values before and after, where there are such */
  from?: unknown
  to?: unknown
}

/**
 * Notes who did what, within the transaction that does it.
 * Names are kept as they are now; entries are never changed.
 */
export async function recordActivity(tx: Database | Transaction, { study, by, action, subject, from, to }: Deed): Promise<void> {
  await tx.insert(activity).values({
    id: newId(),
    studyId: study?.id ?? null, studyName: study?.name ?? null,
    userId: by.id, userName: by.name,
    action, subject: subject.slice(0, 300), change: { from, to },
  })
}

/**
 * A page of a study's activity, the latest first. Ids are made in the order of time, so they are the cursor.
 * @param cursor id of the last entry before the page
 */
export async function listActivity(
  studyId: string, { cursor, limit }: { cursor?: string, limit: number },
): Promise<{ items: ActivityEntry[], next: string | null }> {
  const rows = await useDatabase().select().from(activity)
    .where(and(eq(activity.studyId, studyId), cursor ? lt(activity.id, cursor) : undefined))
    .orderBy(desc(activity.id)).limit(limit + 1)
  const items = rows.slice(0, limit).map(row => ({
    id: row.id, userName: row.userName, action: row.action, subject: row.subject, ...row.change, at: row.at.toISOString(),
  }))
  return { items, next: rows.length > limit ? items.at(-1)!.id : null }
}
