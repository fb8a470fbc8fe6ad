import { and, asc, eq, inArray, isNotNull, isNull, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import type { Candidate } from '#shared/schemas/candidates'
import type { Account } from '#shared/schemas/session'
import { useDatabase } from '../database/client'
import type { Transaction } from '../database/client'
import { candidates } from '../database/schema'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { subjectOf } from './candidates'
import { liveIds, positionsBehind } from './candidate-positions'
import { rowsOf } from './candidate-rows'
import { enqueueWritten, insertRows, lockedStudy, requireRoom } from './candidate-writing'
import type { LockedStudy } from './candidate-writing'
import { appendEvent, lockStudy } from './events'
import { rowKey } from './row-key'
import { transact } from './transactions'

type Row = typeof candidates.$inferSelect

/** Rows of a selection in the order of the grid; 422 names the first that the study does not have. */
async function selected(tx: Transaction, studyId: string, ids: readonly string[], condition: SQL | undefined): Promise<Row[]> {
  const rows = await tx.select().from(candidates)
    .where(and(eq(candidates.studyId, studyId), inArray(candidates.id, [...ids]), condition))
    .orderBy(asc(candidates.position), asc(candidates.id))
  const found = new Set(rows.map(row => row.id))
  const missing = ids.findIndex(id => !found.has(id))
  if (missing >= 0) problem(422, 'A row of the selection is not in this study.', { errors: [{ path: `ids.${missing}`, message: 'This row is not in this study, or not in a state for this.' }] })
  return rows
}

/** Deletes rows; they can be restored. Their pins become free. */
export function deleteCandidates(studyId: string, ids: readonly string[], by: Account): Promise<void> {
  return transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    const rows = await selected(tx, studyId, ids, isNull(candidates.deletedAt))
    await remove(tx, study, rows, by)
  })
}

async function remove(tx: Transaction, study: LockedStudy, rows: readonly Row[], by: Account) {
  const ids = rows.map(row => row.id)
  await tx.update(candidates).set({ deletedAt: sql`current_timestamp(3)`, pin: null, version: sql`${candidates.version} + 1` })
    .where(inArray(candidates.id, ids))
  await appendEvent(tx, study.id, { removed: ids })
  await recordActivity(tx, { study, by, action: 'deleted candidates', subject: subjectOf(rows.map(row => row.inputs)) })
}

/** Deletes one row, if it is still as the caller has read it. */
export function deleteCandidate(studyId: string, id: string, version: number, by: Account): Promise<void> {
  return transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    const [row] = await tx.select().from(candidates).where(and(eq(candidates.id, id), eq(candidates.studyId, studyId), isNull(candidates.deletedAt)))
    if (!row) return problem(404, 'This row does not exist, or has been deleted.')
    if (row.version !== version) {
      const [current] = await rowsOf(tx, [id])
      return problem(409, 'Somebody has changed this row since you read it. Its present values are sent with this answer.', { current })
    }
    await remove(tx, study, [row], by)
  })
}

/** Brings deleted rows back to their places. A reference row comes back as one only where there is none meanwhile. */
export async function restoreCandidates(studyId: string, ids: readonly string[], by: Account): Promise<Candidate[]> {
  const written = await transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    const rows = await selected(tx, studyId, ids, isNotNull(candidates.deletedAt))
    await requireRoom(tx, studyId, rows.length)
    const hasReference = (await tx.select({ id: candidates.id }).from(candidates).where(and(
      eq(candidates.studyId, studyId), isNull(candidates.deletedAt), sql`json_value(${candidates.inputs}, '$.role') = 'reference'`,
    ))).length > 0
    const restored = []
    for (const row of rows) {
      const inputs = hasReference && row.inputs.role === 'reference' ? { ...row.inputs, role: null } : row.inputs
      // The requirements may have changed while the row was away.
      const key = rowKey(inputs, study.requirements)
      if (inputs !== row.inputs || key.resultKey !== row.resultKey) {
        await tx.update(candidates).set({ inputs, resultKey: key.resultKey, errors: key.errors }).where(eq(candidates.id, row.id))
      }
      restored.push({ id: row.id, studyId, sweepId: row.sweepId, key })
    }
    await tx.update(candidates).set({ deletedAt: null, version: sql`${candidates.version} + 1` }).where(inArray(candidates.id, [...ids]))
    await appendEvent(tx, studyId, { candidates: [...ids] })
    await recordActivity(tx, { study, by, action: 'restored candidates', subject: subjectOf(rows.map(row => row.inputs)) })
    return restored
  })
  await enqueueWritten(written)
  return rowsOf(useDatabase(), ids)
}

/** Copies rows behind the last of them; a copy of the reference row is not a second reference. */
export async function duplicateCandidates(studyId: string, ids: readonly string[], by: Account): Promise<Candidate[]> {
  const written = await transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    const rows = await selected(tx, studyId, ids, isNull(candidates.deletedAt))
    await requireRoom(tx, studyId, rows.length)
    const { positions, renumbered } = await positionsBehind(tx, studyId, rows.at(-1)!.id, rows.length)
    const copies = await insertRows(tx, study, rows.map(({ inputs }, i) => ({
      inputs: inputs.role === 'reference' ? { ...inputs, role: null } : inputs, position: positions[i]!,
    })))
    await appendEvent(tx, studyId, { candidates: renumbered ? await liveIds(tx, studyId) : copies.map(row => row.id) })
    await recordActivity(tx, { study, by, action: 'duplicated candidates', subject: subjectOf(rows.map(row => row.inputs)) })
    return copies
  })
  await enqueueWritten(written)
  return rowsOf(useDatabase(), written.map(row => row.id))
}

/** Puts rows, in the order given, behind another one; null: in the first place. */
export function moveCandidates(studyId: string, ids: readonly string[], after: string | null): Promise<Candidate[]> {
  return transact(async (tx) => {
    await lockStudy(tx, studyId)
    await selected(tx, studyId, ids, isNull(candidates.deletedAt))
    if (after !== null && ids.includes(after)) {
      problem(422, 'Rows cannot go behind one of themselves.', { errors: [{ path: 'after', message: 'Name a row that is not moved itself.' }] })
    }
    const { positions, renumbered } = await positionsBehind(tx, studyId, after, ids.length, ids)
    const rowsAtOnce = 500
    for (let i = 0; i < ids.length; i += rowsAtOnce) {
      const some = ids.slice(i, i + rowsAtOnce)
      const cases = some.map((id, n) => sql`when ${id} then cast(${positions[i + n]!} as double)`)
      await tx.update(candidates).set({ position: sql`case ${candidates.id} ${sql.join(cases, sql` `)} end` })
        .where(inArray(candidates.id, some))
    }
    await appendEvent(tx, studyId, { candidates: renumbered ? await liveIds(tx, studyId) : [...ids] })
    return rowsOf(tx, ids)
  })
}

/** The overlay has this many slots; each has its own colour, dash and marker. */
const slots = 12

/** Pins a row to the lowest free slot of the overlay, or unpins it. */
export function pinCandidate(studyId: string, id: string, pinned: boolean): Promise<Candidate> {
  return transact(async (tx) => {
    await lockStudy(tx, studyId)
    const [row] = await selected(tx, studyId, [id], isNull(candidates.deletedAt))
    const taken = await tx.select({ pin: candidates.pin }).from(candidates)
      .where(and(eq(candidates.studyId, studyId), isNull(candidates.deletedAt), isNotNull(candidates.pin)))
    const free = Array.from({ length: slots }, (_, i) => i + 1).find(slot => !taken.some(({ pin }) => pin === slot))
    if (pinned && row!.pin === null && free === undefined) {
      problem(422, 'Twelve rows are pinned, as many as the overlay can tell apart: unpin one first.', {
        errors: [{ path: 'pinned', message: 'Unpin another row first: at most 12 are pinned.' }],
      })
    }
    const pin = pinned ? row!.pin ?? free! : null
    if (pin !== row!.pin) {
      await tx.update(candidates).set({ pin }).where(eq(candidates.id, id))
      await appendEvent(tx, studyId, { candidates: [id] })
    }
    const [candidate] = await rowsOf(tx, [id])
    return candidate!
  })
}
