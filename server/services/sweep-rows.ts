import { and, count, eq, isNotNull, isNull, or, sql } from 'drizzle-orm'
import type { Sweep } from '#shared/schemas/sweeps'
import type { Database, Transaction } from '../database/client'
import { candidates, results, sweeps } from '../database/schema'

/** Rows of a sweep that have their numbers or have failed. */
export async function computedRows(db: Database | Transaction, sweepId: string): Promise<number> {
  const [row] = await db.select({ n: count() }).from(candidates)
    .leftJoin(results, eq(results.key, candidates.resultKey))
    .where(and(eq(candidates.sweepId, sweepId), or(isNull(candidates.resultKey), isNotNull(results.key))))
  return row?.n ?? 0
}

/** A sweep as the API sends it. */
export async function toSweep(db: Database | Transaction, row: typeof sweeps.$inferSelect): Promise<Sweep> {
  return {
    id: row.id, studyId: row.studyId, state: row.state, total: row.total, made: row.made,
    // A sweep is done when all that it made is computed: its thousands of rows need no counting then.
    computed: row.state === 'done' ? row.made : await computedRows(db, row.id),
    createdAt: row.createdAt.toISOString(), createdBy: row.createdBy, finishedAt: row.finishedAt?.toISOString() ?? null,
  }
}

/** A sweep by its id, or null. */
export async function sweepOf(db: Database | Transaction, id: string): Promise<Sweep | null> {
  const [row] = await db.select().from(sweeps).where(eq(sweeps.id, id))
  return row ? toSweep(db, row) : null
}

/** Sweeps of a study, the newest first. */
export async function sweepsOf(db: Database, studyId: string): Promise<Sweep[]> {
  const rows = await db.select().from(sweeps).where(eq(sweeps.studyId, studyId)).orderBy(sql`${sweeps.id} desc`)
  return Promise.all(rows.map(row => toSweep(db, row)))
}
