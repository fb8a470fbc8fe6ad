import { eq, sql } from 'drizzle-orm'
import type { Transaction } from '../database/client'
import { events, studies } from '../database/schema'
import type { EventPayload } from '../database/schema'
import { announce } from './event-hub'

/**
 * Takes the study's row lock for the rest of the transaction. Every transaction that writes rows of a study begins
 * with it: writers then wait for one another in one order and cannot deadlock.
 */
export async function lockStudy(tx: Transaction, studyId: string): Promise<void> {
  await tx.select({ id: studies.id }).from(studies).where(eq(studies.id, studyId)).for('update')
}

/**
 * Numbers an event under the study's row lock and stores it; open pages get it when the transaction has committed.
 * @param tx the transaction of the change itself
 * @param payload ids only: readers fetch the rows as they are when they read
 * @returns the event's number in the study; 0 when the study has been deleted for good
 */
export async function appendEvent(tx: Transaction, studyId: string, payload: EventPayload): Promise<number> {
  const [{ insertId: number, affectedRows }] = await tx.update(studies)
    .set({ eventNumber: sql`last_insert_id(${studies.eventNumber} + 1)` })
    .where(eq(studies.id, studyId))
  if (affectedRows === 0) return 0
  await tx.insert(events).values({ studyId, number, payload })
  announce(studyId)
  return number
}
