import { and, count, eq, inArray, isNull, ne, sql } from 'drizzle-orm'
import type { CandidateInputs } from '#shared/schemas/candidates'
import type { Requirements } from '#shared/schemas/requirements'
import type { Transaction } from '../database/client'
import { candidates, studies, sweeps } from '../database/schema'
import { newId } from '../utils/ids'
import { problem } from '../utils/problem'
import { enqueue } from './queue'
import type { WaitingRow } from './queue'
import { rowKey } from './row-key'
import type { RowKey } from './row-key'

/** Most rows of a study. */
export const mostRows = 20_000
/** Rows of one INSERT. */
const rowsAnInsert = 500

/** A study whose row lock this transaction holds: what its rows depend on, and its name for the activity. */
export interface LockedStudy { id: string, name: string, requirements: Requirements }

/** Takes a study's row lock; every transaction that writes rows begins with it, so that none waits in a circle. */
export async function lockedStudy(tx: Transaction, id: string): Promise<LockedStudy> {
  const [study] = await tx.select({ id: studies.id, name: studies.name, requirements: studies.requirements }).from(studies)
    .where(eq(studies.id, id)).for('update')
  return study ?? problem(404, 'This study does not exist.')
}

/** Refuses more rows than a study may have; those that its running sweeps are about to make count as made. */
export async function requireRoom(tx: Transaction, studyId: string, more: number): Promise<void> {
  const [row] = await tx.select({ n: count() }).from(candidates).where(and(eq(candidates.studyId, studyId), isNull(candidates.deletedAt)))
  const [sweeping] = await tx.select({ n: sql<number>`coalesce(sum(${sweeps.total} - ${sweeps.made}), 0)`.mapWith(Number) }).from(sweeps)
    .where(and(eq(sweeps.studyId, studyId), eq(sweeps.state, 'running')))
  const there = (row?.n ?? 0) + (sweeping?.n ?? 0)
  if (there + more > mostRows) {
    problem(422, `A study has at most 20,000 rows; this one has ${there.toLocaleString('en')}, and these are ${more.toLocaleString('en')} more.`)
  }
}

/** A row as it was written, for the queue. */
export type WrittenRow = WaitingRow & { key: RowKey }

/** Writes new rows in chunks of one INSERT each. */
export async function insertRows(
  tx: Transaction, { id: studyId, requirements }: Pick<LockedStudy, 'id' | 'requirements'>,
  rows: readonly { inputs: CandidateInputs, position: number, sweepId?: string | null, pin?: number | null }[],
): Promise<WrittenRow[]> {
  const written = rows.map(row => ({ ...row, id: newId(), sweepId: row.sweepId ?? null, key: rowKey(row.inputs, requirements) }))
  for (let i = 0; i < written.length; i += rowsAnInsert) {
    await tx.insert(candidates).values(written.slice(i, i + rowsAnInsert).map(({ id, inputs, position, sweepId, pin, key }) => ({
      id, studyId, sweepId, position, inputs, pin: pin ?? null, resultKey: key.resultKey, errors: key.errors,
    })))
  }
  return written.map(({ id, sweepId, key }) => ({ id, studyId, sweepId, key }))
}

/** Hands rows that have been written and committed to the queue. */
export function enqueueWritten(rows: readonly WrittenRow[]): Promise<void> {
  return enqueue(rows.flatMap(({ key, ...row }) => key.canonical ? [{ ...row, key: key.resultKey, inputs: key.canonical }] : []))
}

/**
 * Takes the reference role from the rows that have it, so that there is one reference a study.
 * @returns the rows that have lost it
 */
export async function clearReference(tx: Transaction, studyId: string, except: string | null): Promise<string[]> {
  const holders = await tx.select({ id: candidates.id }).from(candidates).where(and(
    eq(candidates.studyId, studyId), isNull(candidates.deletedAt), except ? ne(candidates.id, except) : undefined,
    sql`json_value(${candidates.inputs}, '$.role') = 'reference'`,
  ))
  const ids = holders.map(row => row.id)
  if (ids.length > 0) {
    await tx.update(candidates).set({
      inputs: sql`json_set(${candidates.inputs}, '$.role', null)`, version: sql`${candidates.version} + 1`, updatedAt: sql`current_timestamp(3)`,
    }).where(inArray(candidates.id, ids))
  }
  return ids
}
