import { and, count, eq, inArray, isNull, sql } from 'drizzle-orm'
import type { Search, SearchCreation } from '#shared/schemas/searches'
import type { Account } from '#shared/schemas/session'
import { compute } from '../compute/pool'
import { useDatabase } from '../database/client'
import type { Transaction } from '../database/client'
import { candidates, jobs, studies } from '../database/schema'
import { newId } from '../utils/ids'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { lockedStudy } from './candidate-writing'
import { appendEvent } from './events'
import { rowKey } from './row-key'
import { searchesOf, searchOf, toSearch } from './search-rows'
import { startSearch } from './search-runs'
import { transact } from './transactions'

/** Searches of a study that may be under way at a time. */
const mostActive = 20

/** Searches of a study, the newest first. */
export const listSearches = async (studyId: string) => ({ items: await searchesOf(useDatabase(), studyId), next: null })

/**
 * Begins a search from a row as it is now; how far it is follows as events.
 * @throws a 422 problem naming what the search or the row lacks
 */
export async function createSearch(studyId: string, candidateId: string, asked: SearchCreation, by: Account, signal: AbortSignal): Promise<Search> {
  const [row] = await useDatabase().select({ inputs: candidates.inputs, requirements: studies.requirements }).from(candidates)
    .innerJoin(studies, eq(studies.id, candidates.studyId)).where(and(eq(candidates.id, candidateId), isNull(candidates.deletedAt)))
  if (!row) return problem(404, 'This row does not exist, or has been deleted.')
  const { canonical, errors } = rowKey(row.inputs, row.requirements)
  if (!canonical) return problem(422, `This row cannot be searched. ${errors[0]!.message}`, { errors })
  const definition = { asked, inputs: row.inputs, row: canonical }
  const begun = await compute({ kind: 'search', asked: { task: definition, state: null, milliseconds: 0 } }, { priority: 'evaluation', signal })
  if ('issues' in begun) return problem(422, begun.issues[0]!.message, { errors: begun.issues })

  const id = newId()
  const created = await transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    await requireActive(tx, studyId)
    await tx.insert(jobs).values({ id, studyId, candidateId, kind: asked.kind, definition, progress: begun.state, createdBy: by.name, createdById: by.id })
    await appendEvent(tx, studyId, { job: id })
    await recordActivity(tx, { study, by, action: `started a search for ${asked.kind}`, subject: row.inputs.name })
    return searchOf(tx, id)
  })
  startSearch(id)
  return created!
}

async function requireActive(tx: Transaction, studyId: string) {
  const [row] = await tx.select({ n: count() }).from(jobs).where(and(eq(jobs.studyId, studyId), inArray(jobs.state, ['queued', 'running'])))
  if ((row?.n ?? 0) >= mostActive) problem(422, `A study has at most ${mostActive} searches under way: wait for one to end, or cancel one.`)
}

type Job = typeof jobs.$inferSelect

/** Changes a search under its study's lock; one that is in another state than those named stays as it is. */
async function changeState(
  studyId: string, id: string, by: Account, { from, to, action }: { from: readonly Job['state'][], to: Job['state'], action: string },
): Promise<Search> {
  return transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    const [job] = await tx.select().from(jobs).where(and(eq(jobs.id, id), eq(jobs.studyId, studyId))).for('update')
    if (!job) return problem(404, 'This search does not exist.')
    if (!from.includes(job.state)) return toSearch(job)
    await tx.update(jobs).set({ state: to, error: null, updatedAt: sql`current_timestamp(3)` }).where(eq(jobs.id, id))
    await appendEvent(tx, studyId, { job: id })
    await recordActivity(tx, { study, by, action, subject: job.definition.inputs.name })
    return (await searchOf(tx, id))!
  })
}

/** Cancels a search; what it has found is kept, so that it may be resumed. One that has ended stays as it is. */
export const cancelSearch = (studyId: string, id: string, by: Account): Promise<Search> =>
  changeState(studyId, id, by, { from: ['queued', 'running'], to: 'cancelled', action: 'cancelled a search' })

/** Goes on with a search that was cancelled or has failed, from where it stood. */
export async function resumeSearch(studyId: string, id: string, by: Account): Promise<Search> {
  const search = await changeState(studyId, id, by, { from: ['cancelled', 'failed'], to: 'queued', action: 'resumed a search' })
  if (search.state === 'queued') startSearch(id)
  return search
}
