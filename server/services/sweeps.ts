import { and, count, eq, inArray, isNull, sql } from 'drizzle-orm'
import type { StartedSweep, SweepCancellation, SweepCreation } from '#shared/schemas/sweeps'
import type { Account } from '#shared/schemas/session'
import { expandSweep } from '#shared/study/expand-sweep'
import type { SweepPlan } from '#shared/study/expand-sweep'
import { useDatabase } from '../database/client'
import type { Transaction } from '../database/client'
import { candidates, results, sweeps } from '../database/schema'
import { newId } from '../utils/ids'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { lastPosition } from './candidate-positions'
import { enqueueWritten, insertRows, lockedStudy, requireRoom } from './candidate-writing'
import type { LockedStudy } from './candidate-writing'
import { appendEvent, lockStudy } from './events'
import { forgetSweep } from './queue'
import { sweepOf, toSweep } from './sweep-rows'
import { finishSweep } from './sweep-state'
import { transact } from './transactions'

/** Rows made in one transaction. */
const rowsAtOnce = 500

/** The plan of a sweep, without mistakes. A sweep makes no reference row: there is one a study. */
function planOf(definition: SweepCreation): SweepPlan {
  const { base } = definition
  const plan = expandSweep(base.role === 'reference' ? { ...definition, base: { ...base, role: null } } : definition)
  if (plan.issues.length > 0) problem(422, plan.issues[0]!.message, { errors: plan.issues })
  return plan
}

/** Starts a sweep: its rows are made and computed after the answer, and events tell how far it is. */
export async function createSweep(studyId: string, definition: SweepCreation, by: Account): Promise<StartedSweep> {
  const plan = planOf(definition)
  const id = newId()
  const sweep = await transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    await requireRoom(tx, studyId, plan.rows)
    await tx.insert(sweeps).values({ id, studyId, definition, total: plan.rows, createdBy: by.name })
    await appendEvent(tx, studyId, { sweep: id })
    await recordActivity(tx, { study, by, action: 'started a sweep', subject: `${plan.rows.toLocaleString('en')} rows` })
    return sweepOf(tx, id)
  })
  void runSweep(id)
  return { ...sweep!, leftOut: plan.leftOut }
}

/**
 * Makes a sweep's rows from where it stands, a transaction at a time, and queues them: so a restart loses and doubles
 * nothing, and other edits of the study go in between.
 */
export async function runSweep(id: string): Promise<void> {
  let plan: SweepPlan | undefined
  try {
    while (await makeSome(id, definition => plan ??= planOf(definition)));
    await transact(tx => conclude(tx, id))
  } catch (error) {
    console.error(`Sweep ${id} has stopped; it goes on at the next look through the tables.`, error)
  }
}

/** @returns whether there are more rows to make */
async function makeSome(id: string, planOnce: (definition: SweepCreation) => SweepPlan): Promise<boolean> {
  const [known] = await useDatabase().select({ studyId: sweeps.studyId }).from(sweeps).where(eq(sweeps.id, id))
  if (!known) return false
  const { studyId } = known
  const { written, more } = await transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    const [sweep] = await tx.select().from(sweeps).where(eq(sweeps.id, id)).for('update')
    if (sweep?.state !== 'running' || sweep.made >= sweep.total) return { written: [], more: false }
    const plan = planOnce(sweep.definition)
    const position = await lastPosition(tx, studyId)
    const rows = Array.from({ length: Math.min(rowsAtOnce, sweep.total - sweep.made) }, (_, i) => ({
      inputs: plan.make(sweep.made + i), position: position + i + 1, sweepId: id,
    }))
    const inserted = await insertRows(tx, study, rows)
    const made = sweep.made + rows.length
    await tx.update(sweeps).set({ made }).where(eq(sweeps.id, id))
    await appendEvent(tx, studyId, { candidates: inserted.map(row => row.id), sweep: id })
    return { written: inserted, more: made < sweep.total }
  })
  await enqueueWritten(written)
  return more
}

/** Ends a sweep all of whose rows had results before it was made. */
async function conclude(tx: Transaction, id: string) {
  const [sweep] = await tx.select({ studyId: sweeps.studyId, state: sweeps.state }).from(sweeps).where(eq(sweeps.id, id))
  if (sweep?.state !== 'running') return
  await lockStudy(tx, sweep.studyId)
  await finishSweep(tx, id)
  await appendEvent(tx, sweep.studyId, { sweep: id })
}

/** Goes on with every sweep that has not ended. */
export async function continueSweeps(): Promise<void> {
  const running = await useDatabase().select({ id: sweeps.id }).from(sweeps).where(eq(sweeps.state, 'running'))
  for (const { id } of running) await runSweep(id)
}

/**
 * Cancels a sweep: no more rows are made, those that have no numbers yet are removed, the others stay.
 * A sweep that has ended stays as it is.
 */
export async function cancelSweep(studyId: string, id: string, by: Account): Promise<SweepCancellation> {
  const answer = await transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    const [sweep] = await tx.select().from(sweeps).where(and(eq(sweeps.id, id), eq(sweeps.studyId, studyId))).for('update')
    if (!sweep) return problem(404, 'This sweep does not exist.')
    const removed = sweep.state === 'running' ? await cancel(tx, study, id, by) : 0
    const [row] = await tx.select({ kept: count() }).from(candidates).where(and(eq(candidates.sweepId, id), isNull(candidates.deletedAt)))
    const [present] = await tx.select().from(sweeps).where(eq(sweeps.id, id))
    return { ...await toSweep(tx, present!), removed, kept: row!.kept }
  })
  forgetSweep(id)
  return answer
}

async function cancel(tx: Transaction, study: LockedStudy, id: string, by: Account): Promise<number> {
  const waiting = await tx.select({ id: candidates.id }).from(candidates)
    .leftJoin(results, eq(results.key, candidates.resultKey))
    .where(and(eq(candidates.sweepId, id), isNull(candidates.deletedAt), sql`${candidates.resultKey} is not null`, isNull(results.key)))
  const ids = waiting.map(row => row.id)
  if (ids.length > 0) await tx.delete(candidates).where(inArray(candidates.id, ids))
  await tx.update(sweeps).set({ state: 'cancelled', finishedAt: sql`current_timestamp(3)` }).where(eq(sweeps.id, id))
  await appendEvent(tx, study.id, { removed: ids, sweep: id })
  await recordActivity(tx, { study, by, action: 'cancelled a sweep', subject: `${ids.length.toLocaleString('en')} rows removed` })
  return ids.length
}
