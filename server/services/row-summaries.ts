import { and, count, eq, inArray, isNotNull, isNull, sql } from 'drizzle-orm'
import type { StudySummary } from '#shared/schemas/studies'
import { useDatabase } from '../database/client'
import { candidates, results } from '../database/schema'

/** What the list of studies tells of a study's rows. */
export type RowSummary = Pick<StudySummary, 'candidates' | 'computing' | 'passing' | 'leading'>

/** Most summaries kept, a few hundred bytes each. */
const mostKept = 10_000
/** The summary of each study as of an event. Whatever changes a study's rows or brings their results raises the number of its last event. */
const kept = new Map<string, { eventNumber: number, summary: RowSummary }>()

/**
 * Summaries of studies' rows. Only studies that have had an event since the last time are read again.
 * @param studies each with the number of its last event, read before
 * @returns one for each study
 */
export async function rowSummaries(studies: readonly { id: string, eventNumber: number }[]): Promise<Map<string, RowSummary>> {
  const summaries = new Map<string, RowSummary>()
  for (const { id, eventNumber } of studies) {
    const known = kept.get(id)
    if (known?.eventNumber === eventNumber) summaries.set(id, known.summary)
  }
  const changed = studies.filter(({ id }) => !summaries.has(id))
  if (changed.length === 0) return summaries
  const ids = changed.map(({ id }) => id)
  const [rows, leaders] = await Promise.all([countsQuery(ids), leadersOf(ids)])
  const counts = new Map(rows.map(({ studyId, ...numbers }) => [studyId, numbers]))
  if (kept.size + changed.length > mostKept) kept.clear()
  for (const { id, eventNumber } of changed) {
    const summary = { ...(counts.get(id) ?? { candidates: 0, computing: 0, passing: 0 }), leading: leaders.get(id) ?? null }
    summaries.set(id, summary)
    kept.set(id, { eventNumber, summary })
  }
  return summaries
}

const live = (ids: string[]) => and(inArray(candidates.studyId, ids), isNull(candidates.deletedAt))

/*
 * Indexes that hold all that is asked for. Left to itself the database follows the primary key into the wide rows of results,
 * a hundred times as much to read.
 */
const ofCandidates = { forceIndex: 'candidates_summary' }
const ofResults = { forceIndex: 'results_summary' }

/** How many rows each study has, how many are being computed, and how many pass. */
export function countsQuery(ids: string[]) {
  return useDatabase().select({
    studyId: candidates.studyId,
    candidates: count(),
    computing: sql`coalesce(sum(${candidates.resultKey} is not null and ${results.key} is null), 0)`.mapWith(Number),
    passing: sql`coalesce(sum(${results.passes}), 0)`.mapWith(Number),
  }).from(candidates, ofCandidates).leftJoin(results, eq(results.key, candidates.resultKey), ofResults).where(live(ids)).groupBy(candidates.studyId)
}

/** Each study's leading candidate: one that passes before one that does not, then the larger surplus in the case that decides. */
async function leadersOf(ids: string[]) {
  const db = useDatabase()
  const ranked = db.select({
    id: candidates.id, surplusDb: results.surplusDb,
    place: sql<number>`row_number() over (partition by ${candidates.studyId} order by ${results.passes} desc, ${results.surplusDb} desc, ${candidates.position})`.as('place'),
  }).from(candidates, ofCandidates).innerJoin(results, eq(results.key, candidates.resultKey), ofResults)
    .where(and(live(ids), isNotNull(results.surplusDb))).as('ranked')
  const rows = await db.select({ studyId: candidates.studyId, inputs: candidates.inputs, surplusDb: ranked.surplusDb }).from(ranked)
    .innerJoin(candidates, eq(candidates.id, ranked.id)).where(eq(ranked.place, 1))
  return new Map(rows.map(row => [row.studyId, { name: row.inputs.name, surplusDb: row.surplusDb! }]))
}
