import { and, count, eq, isNotNull, isNull, sql } from 'drizzle-orm'
import type { Database, Transaction } from '../database/client'
import { candidates, results, sweeps } from '../database/schema'

/** Rows of a sweep that wait for their numbers. */
export async function waitingRows(db: Database | Transaction, sweepId: string): Promise<number> {
  const [row] = await db.select({ n: count() }).from(candidates)
    .leftJoin(results, eq(results.key, candidates.resultKey))
    .where(and(eq(candidates.sweepId, sweepId), isNull(candidates.deletedAt), isNotNull(candidates.resultKey), isNull(results.key)))
  return row?.n ?? 0
}

/**
 * Marks a sweep as done when all its rows have been made and none of them waits.
 * @returns whether it was running until now: else a row's new result is no news of it
 */
export async function finishSweep(tx: Transaction, id: string): Promise<boolean> {
  const [sweep] = await tx.select({ state: sweeps.state, made: sweeps.made, total: sweeps.total }).from(sweeps).where(eq(sweeps.id, id))
  if (sweep?.state !== 'running') return false
  if (sweep.made < sweep.total || await waitingRows(tx, id) > 0) return true
  await tx.update(sweeps).set({ state: 'done', finishedAt: sql`current_timestamp(3)` })
    .where(and(eq(sweeps.id, id), eq(sweeps.state, 'running')))
  return true
}
