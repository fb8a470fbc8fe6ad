import { desc, eq } from 'drizzle-orm'
import type { Search, SearchProgress } from '#shared/schemas/searches'
import type { SearchState } from '../compute/search'
import type { Database, Transaction } from '../database/client'
import { jobs } from '../database/schema'

const goalWords = { mutualInformation: 'mutual information', bitMetricRate: 'bit-metric rate' } as const

/** How far a search is, in the words of its kind. */
export function progressOf(search: SearchState): SearchProgress {
  if (search.kind === 'labels') {
    const { state, availableEsN0Db } = search
    return {
      what: `${state.measure === 'berExact' ? 'BER' : 'BER bound'} at ${availableEsN0Db.toFixed(2)} dB Es/N0`, unit: null,
      startValue: state.startBer, value: state.ber, evaluations: state.swapsTried, startsDone: state.startsDone, starts: state.starts,
      budget: null, converged: state.done, low: null, high: null,
    }
  }
  const { state, goal } = search
  const rests = 'target' in goal ? `${goal.kind.toUpperCase()} of ${goal.target}` : `${goalWords[goal.kind]} of ${Number(goal.netBits.toFixed(4))} bit`
  return {
    what: `${state.request.limit?.by === 'peak' ? 'required Es/N0 plus back-off' : 'required Es/N0'} for ${rests}`, unit: 'dB',
    startValue: state.startValue, value: state.best.value, evaluations: state.evaluations, startsDone: state.startsDone, starts: state.starts,
    budget: state.budget, converged: state.converged, low: state.interval.low, high: state.interval.high,
  }
}

/** A search as the API sends it. */
export function toSearch(row: typeof jobs.$inferSelect): Search {
  return {
    id: row.id, studyId: row.studyId, candidateId: row.candidateId, kind: row.kind, state: row.state, definition: row.definition.asked,
    progress: row.progress && progressOf(row.progress), error: row.error, resultId: row.resultId,
    createdBy: row.createdBy, createdAt: row.createdAt.toISOString(), updatedAt: row.updatedAt.toISOString(),
  }
}

/** A search by its id, or null. */
export async function searchOf(db: Database | Transaction, id: string): Promise<Search | null> {
  const [row] = await db.select().from(jobs).where(eq(jobs.id, id))
  return row ? toSearch(row) : null
}

/** Most searches that a list shows. */
const mostListed = 200

/** Searches of a study, the newest first. */
export async function searchesOf(db: Database, studyId: string): Promise<Search[]> {
  const rows = await db.select().from(jobs).where(eq(jobs.studyId, studyId)).orderBy(desc(jobs.id)).limit(mostListed)
  return rows.map(toSearch)
}
