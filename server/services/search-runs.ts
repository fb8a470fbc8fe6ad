import { and, eq, inArray, isNull, lt, sql } from 'drizzle-orm'
import { compute, ComputationFailed } from '../compute/pool'
import type { SearchState } from '../compute/search'
import { useDatabase } from '../database/client'
import type { Transaction } from '../database/client'
import { candidates, jobs } from '../database/schema'
import { Refusal } from '../utils/problem'
import { recordActivity } from './activity'
import { liveIds, positionsBehind } from './candidate-positions'
import { enqueueWritten, insertRows, lockedStudy, requireRoom } from './candidate-writing'
import type { LockedStudy, WrittenRow } from './candidate-writing'
import { appendEvent } from './events'
import { foundInputs, isBetter } from './search-results'
import { transact } from './transactions'

type Job = typeof jobs.$inferSelect

/** A slice of a search in one worker, in milliseconds: the rest of the server's work goes in between. */
const slice = 400
/** Searches that one server advances at a time; others wait. */
const atOnce = 2

const active = ['queued', 'running'] as const
const running = new Set<string>()
const waiting = new Set<string>()

/** Goes on with a search in this server. */
export function startSearch(id: string): void {
  if (running.has(id)) return
  waiting.add(id)
  pump()
}

function pump() {
  for (const id of waiting) {
    if (running.size >= atOnce) return
    waiting.delete(id)
    running.add(id)
    void run(id).finally(() => {
      running.delete(id)
      pump()
    })
  }
}

async function run(id: string): Promise<void> {
  try {
    while (await advance(id));
  } catch (error) {
    console.error(`Search ${id} has stopped; it goes on at the next look through the tables.`, error)
  }
}

/** Why a search has failed for good; null where it may go on later, as after a lost connection. */
export function sentenceOf(error: unknown): string | null {
  if (error instanceof ComputationFailed) return 'The search broke down twice. Change it, or ask the administrator to look at the server\'s log.'
  // Its row is refused, as in a full study: another attempt would be too.
  return error instanceof Refusal ? error.message : null
}

/** One slice. @returns whether there is more to do */
async function advance(id: string): Promise<boolean> {
  const [job] = await useDatabase().select().from(jobs).where(and(eq(jobs.id, id), inArray(jobs.state, active)))
  if (!job) return false
  const { definition: { asked, row }, progress } = job
  try {
    const answer = await compute({ kind: 'search', asked: { task: { asked, row }, state: progress, milliseconds: slice } }, { priority: 'bulk' })
    if ('issues' in answer) return await fail(job, answer.issues[0]!.message)
    return await keep(job, answer.state)
  } catch (error) {
    const sentence = sentenceOf(error)
    if (sentence === null) throw error
    return fail(job, sentence)
  }
}

function fail({ id, studyId }: Job, error: string): Promise<boolean> {
  return transact(async (tx) => {
    await lockedStudy(tx, studyId)
    await tx.update(jobs).set({ state: 'failed', error: error.slice(0, 1000), updatedAt: sql`current_timestamp(3)` }).where(and(eq(jobs.id, id), inArray(jobs.state, active)))
    await appendEvent(tx, studyId, { job: id })
    return false
  })
}

const isDone = (progress: SearchState) => progress.state.done

/** Keeps how far a search is; at its end its row comes behind the one that was searched, in the same transaction. */
async function keep(job: Job, progress: SearchState): Promise<boolean> {
  const { id, studyId } = job
  const written = await transact(async (tx): Promise<WrittenRow[] | null> => {
    const study = await lockedStudy(tx, studyId)
    const [present] = await tx.select({ state: jobs.state }).from(jobs).where(eq(jobs.id, id)).for('update')
    // Cancelled meanwhile: what this slice has found is kept, for who resumes it.
    const goesOn = present?.state === 'queued' || present?.state === 'running'
    const done = goesOn && isDone(progress)
    const rows = done && isBetter(progress) ? await insertFound(tx, study, job, progress) : []
    await tx.update(jobs).set({
      progress, ...(goesOn && { state: done ? 'done' as const : 'running' as const }), ...(rows[0] && { resultId: rows[0].id }), updatedAt: sql`current_timestamp(3)`,
    }).where(eq(jobs.id, id))
    await appendEvent(tx, studyId, { job: id })
    return goesOn && !done ? null : rows
  })
  if (written) await enqueueWritten(written)
  return written === null
}

async function insertFound(tx: Transaction, study: LockedStudy, job: Job, progress: SearchState): Promise<WrittenRow[]> {
  await requireRoom(tx, study.id, 1)
  const [behind] = await tx.select({ id: candidates.id }).from(candidates).where(and(eq(candidates.id, job.candidateId), isNull(candidates.deletedAt)))
  const { positions, renumbered } = await positionsBehind(tx, study.id, behind?.id, 1)
  const inputs = foundInputs(progress, job.definition)
  const rows = await insertRows(tx, study, [{ inputs, position: positions[0]! }])
  await appendEvent(tx, study.id, { candidates: renumbered ? await liveIds(tx, study.id) : rows.map(row => row.id) })
  await recordActivity(tx, { study, by: { id: job.createdById, name: job.createdBy }, action: 'found a candidate by a search', subject: inputs.name })
  return rows
}

/**
 * Goes on with searches that nobody advances: at the start those that an ended server left behind, later those of another server.
 * @param untouchedFor only searches that have not gone on for so long, in milliseconds
 */
export async function continueSearches(untouchedFor: number): Promise<void> {
  const before = new Date(Date.now() - untouchedFor)
  const left = await useDatabase().select({ id: jobs.id }).from(jobs)
    .where(and(inArray(jobs.state, active), lt(jobs.updatedAt, before)))
  for (const { id } of left) startSearch(id)
}
