import { and, asc, eq, gt, gte, inArray, isNull, or } from 'drizzle-orm'
import type { Candidate } from '#shared/schemas/candidates'
import type { CandidateParts } from '#shared/schemas/parts'
import type { Database, Transaction } from '../database/client'
import { candidates, results } from '../database/schema'
import { partsOfKeys } from './stored-parts'

/** Columns of a row with its result's values; the curves stay unread. */
const columns = {
  row: candidates,
  values: results.values,
  resultErrors: results.errors,
}

/** A row as the joined select gives it. */
type JoinedRow = {
  row: typeof candidates.$inferSelect
  values: Candidate['values']
  resultErrors: Candidate['errors'] | null
}

/**
 * State of a row: no key means that its inputs contradict each other, no result under the key that it is being
 * computed, and a result with errors that it cannot be computed.
 */
function outcome({ row, values, resultErrors }: JoinedRow): Pick<Candidate, 'state' | 'errors' | 'values'> {
  if (row.resultKey === null) return { state: 'failed', errors: row.errors, values: null }
  if (resultErrors === null) return { state: 'computing', errors: [], values: null }
  return resultErrors.length > 0
    ? { state: 'failed', errors: resultErrors, values: null }
    : { state: 'computed', errors: [], values }
}

/** One row of the grid as the API sends it. */
function toCandidate(joined: JoinedRow, parts: CandidateParts): Candidate {
  const { row } = joined
  return {
    id: row.id, studyId: row.studyId, version: row.version, position: row.position, pin: row.pin, sweepId: row.sweepId,
    createdAt: row.createdAt.toISOString(), updatedAt: row.updatedAt.toISOString(),
    inputs: row.inputs, ...outcome(joined), parts,
  }
}

/** Rows with the parts that have been asked for. */
async function withParts(db: Database | Transaction, rows: readonly JoinedRow[]): Promise<Candidate[]> {
  const parts = await partsOfKeys(db, rows.flatMap(({ row }) => row.resultKey ?? []))
  return rows.map(joined => toCandidate(joined, parts.get(joined.row.resultKey ?? '') ?? {}))
}

/** Rows of the given ids that are not deleted, in the order of the grid. */
export async function rowsOf(db: Database | Transaction, ids: readonly string[]): Promise<Candidate[]> {
  if (ids.length === 0) return []
  const rows = await db.select(columns).from(candidates)
    .leftJoin(results, eq(results.key, candidates.resultKey))
    .where(and(inArray(candidates.id, [...ids]), isNull(candidates.deletedAt)))
    .orderBy(asc(candidates.position), asc(candidates.id))
  return withParts(db, rows)
}

/**
 * A page of a study's rows in the order of the grid.
 * @param after position and id of the last row before the page
 */
export async function rowsAfter(
  db: Database, studyId: string, after: { position: number, id: string } | null, limit: number,
): Promise<Candidate[]> {
  const rows = await db.select(columns).from(candidates)
    .leftJoin(results, eq(results.key, candidates.resultKey))
    .where(and(
      eq(candidates.studyId, studyId), isNull(candidates.deletedAt),
      // Compared as one tuple the same takes MariaDB half as long again.
      after ? and(gte(candidates.position, after.position), or(gt(candidates.position, after.position), gt(candidates.id, after.id))) : undefined,
    ))
    .orderBy(asc(candidates.position), asc(candidates.id))
    .limit(limit)
  return withParts(db, rows)
}
