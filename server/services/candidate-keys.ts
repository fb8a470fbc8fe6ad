import { and, asc, eq, gt, inArray, isNotNull, isNull, lt, ne, or, sql } from 'drizzle-orm'
import { coreVersion } from '#shared/modulation'
import type { Requirements } from '#shared/schemas/requirements'
import { useDatabase } from '../database/client'
import type { Transaction } from '../database/client'
import { candidates, results, studies } from '../database/schema'
import { groupBy } from '../utils/group-by'
import { enqueueWritten, insertRows } from './candidate-writing'
import type { WrittenRow } from './candidate-writing'
import { unlocked } from './event-hub'
import { appendEvent, lockStudy } from './events'
import { isPending } from './queue'
import { rowKey } from './row-key'

type Row = Pick<typeof candidates.$inferSelect, 'id' | 'studyId' | 'sweepId' | 'inputs' | 'resultKey'>
const columns = {
  id: candidates.id, studyId: candidates.studyId, sweepId: candidates.sweepId, inputs: candidates.inputs, resultKey: candidates.resultKey,
}

/** Rows of one statement. */
const rowsAtOnce = 500

/** Gives rows the keys that they have under the requirements; only those that change are written. */
async function rekey(tx: Transaction, rows: readonly Row[], requirements: Requirements): Promise<WrittenRow[]> {
  const keyed = rows.map(({ inputs, ...row }) => ({ ...row, key: rowKey(inputs, requirements) }))
  const changed = keyed.filter(row => row.key.resultKey !== null && row.key.resultKey !== row.resultKey)
  for (let i = 0; i < changed.length; i += rowsAtOnce) {
    const some = changed.slice(i, i + rowsAtOnce)
    const cases = some.map(({ id, key }) => sql`when ${id} then ${key.resultKey}`)
    await tx.update(candidates).set({ resultKey: sql`case ${candidates.id} ${sql.join(cases, sql` `)} end`, errors: [] })
      .where(inArray(candidates.id, some.map(row => row.id)))
  }
  // Requirements that contradict each other give all rows of a study the same reason.
  const failing = keyed.filter(row => row.key.resultKey === null)
  for (const some of groupBy(failing, row => JSON.stringify(row.key.errors)).values()) {
    await tx.update(candidates).set({ resultKey: null, errors: some[0]!.key.errors }).where(inArray(candidates.id, some.map(row => row.id)))
  }
  return keyed.map(({ id, studyId, sweepId, key }) => ({ id, studyId, sweepId, key }))
}

/** Hands rows to the queue as soon as the transaction that wrote them has committed. */
function enqueueAtCommit(studyId: string, rows: readonly WrittenRow[]) {
  unlocked(studyId).then(() => enqueueWritten(rows)).catch((error: unknown) => {
    // They are found without results at the next look through the tables.
    console.error('Rows could not be queued.', error)
  })
}

/**
 * Gives all rows of a study the keys that they have under new requirements; they are computed after the commit.
 * @param tx the transaction that changes the requirements; it must hold the study's row lock, or takes it here
 */
export async function rekeyStudy(tx: Transaction, studyId: string, requirements: Requirements): Promise<void> {
  await lockStudy(tx, studyId)
  const rows = await tx.select(columns).from(candidates).where(and(eq(candidates.studyId, studyId), isNull(candidates.deletedAt)))
  if (rows.length === 0) return
  const keyed = await rekey(tx, rows, requirements)
  await appendEvent(tx, studyId, { candidates: rows.map(row => row.id) })
  enqueueAtCommit(studyId, keyed)
}

/** Copies the rows of one study to another one with their places, pins and roles; results are shared by their keys. */
export async function copyCandidates(tx: Transaction, fromStudyId: string, toStudyId: string): Promise<void> {
  const [to] = await tx.select({ id: studies.id, requirements: studies.requirements }).from(studies).where(eq(studies.id, toStudyId)).for('update')
  const rows = await tx.select({ inputs: candidates.inputs, position: candidates.position, pin: candidates.pin }).from(candidates)
    .where(and(eq(candidates.studyId, fromStudyId), isNull(candidates.deletedAt))).orderBy(asc(candidates.position), asc(candidates.id))
  if (!to || rows.length === 0) return
  const written = await insertRows(tx, to, rows)
  await appendEvent(tx, toStudyId, { candidates: written.map(row => row.id) })
  enqueueAtCommit(toStudyId, written)
}

/**
 * Finds rows that have no result, or one of an older core, gives them their present keys and queues them:
 * at the start for what an ended server left behind, later for what another server did.
 * @param untouchedFor only rows that nobody has changed for so long, in milliseconds
 * @returns how many were queued
 */
export async function requeueRows(untouchedFor: number): Promise<number> {
  const db = useDatabase()
  const before = new Date(Date.now() - untouchedFor)
  let queued = 0
  for (let after = ''; ;) {
    const rows = await db.select({ ...columns, requirements: studies.requirements }).from(candidates)
      .innerJoin(studies, eq(studies.id, candidates.studyId))
      .leftJoin(results, eq(results.key, candidates.resultKey))
      .where(and(
        gt(candidates.id, after), isNull(candidates.deletedAt), isNull(studies.deletedAt), isNotNull(candidates.resultKey),
        or(isNull(results.key), ne(results.coreVersion, coreVersion)), lt(candidates.updatedAt, before),
      ))
      .orderBy(asc(candidates.id)).limit(rowsAtOnce)
    const lost = rows.filter(row => !isPending(row.resultKey!))
    for (const [studyId, some] of groupBy(lost, row => row.studyId)) queued += await requeue(studyId, some)
    if (rows.length < rowsAtOnce) return queued
    after = rows.at(-1)!.id
  }
}

async function requeue(studyId: string, rows: readonly Row[]): Promise<number> {
  const ids = rows.map(row => row.id)
  const keyed = await useDatabase().transaction(async (tx) => {
    const [study] = await tx.select({ requirements: studies.requirements }).from(studies).where(eq(studies.id, studyId)).for('update')
    const present = await tx.select(columns).from(candidates).where(and(inArray(candidates.id, ids), isNull(candidates.deletedAt)))
    const rekeyed = await rekey(tx, present, study!.requirements)
    const moved = rekeyed.filter(row => row.key.resultKey !== present.find(({ id }) => id === row.id)!.resultKey)
    if (moved.length > 0) await appendEvent(tx, studyId, { candidates: moved.map(row => row.id) })
    return rekeyed
  })
  await enqueueWritten(keyed)
  return keyed.length
}
