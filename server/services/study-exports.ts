import { and, asc, count, desc, eq, inArray, isNotNull, isNull, or, sql } from 'drizzle-orm'
import { coreVersion, normalise } from '#shared/modulation'
import type { Candidate } from '#shared/schemas/candidates'
import { canonicalInputs } from '#shared/study/canonical-inputs'
import type { Requirements } from '#shared/schemas/requirements'
import { constellationOf } from '../compute/points'
import { useDatabase } from '../database/client'
import { candidates, results } from '../database/schema'
import type { StudyExport } from '../exports/study-export'
import { version } from '../../package.json'
import { rowsAfter, rowsOf } from './candidate-rows'
import { listMembers } from './members'
import { curvesOf } from './results'
import { getStudy } from './studies'

/** Rows read at a time: some 5 MB of them. */
const pageRows = 1000
/** Leading candidates named on the summary. */
const leadingRows = 10

const live = (studyId: string) => and(eq(candidates.studyId, studyId), isNull(candidates.deletedAt))
const roleOf = sql`json_value(${candidates.inputs}, '$.role')`

async function countRows(studyId: string): Promise<StudyExport['counts']> {
  const [row] = await useDatabase().select({
    candidates: count(),
    passing: sql<number>`count(case when ${results.passes} = 1 then 1 end)`.mapWith(Number),
    failed: sql<number>`count(case when ${candidates.resultKey} is null or json_length(${results.errors}) > 0 then 1 end)`.mapWith(Number),
    computing: sql<number>`count(case when ${candidates.resultKey} is not null and ${results.key} is null then 1 end)`.mapWith(Number),
  }).from(candidates).leftJoin(results, eq(results.key, candidates.resultKey)).where(live(studyId))
  return row!
}

/** The rows with the largest surplus, those that pass first. */
async function leadingOf(studyId: string): Promise<Candidate[]> {
  const db = useDatabase()
  const best = await db.select({ id: candidates.id }).from(candidates).innerJoin(results, eq(results.key, candidates.resultKey))
    .where(and(live(studyId), isNotNull(results.surplusDb)))
    .orderBy(desc(results.passes), desc(results.surplusDb), asc(candidates.position))
    .limit(leadingRows)
  const rows = new Map((await rowsOf(db, best.map(row => row.id))).map(row => [row.id, row]))
  return best.flatMap(({ id }) => rows.get(id) ?? [])
}

/** Rows that are pinned or have a role, in the grid's order. */
async function notedRows(studyId: string): Promise<Candidate[]> {
  const noted = await useDatabase().select({ id: candidates.id }).from(candidates)
    .where(and(live(studyId), or(isNotNull(candidates.pin), sql`${roleOf} in ('reference', 'chosen', 'fallback')`)))
  return rowsOf(useDatabase(), noted.map(row => row.id))
}

async function curvesOfRows(rows: readonly Candidate[]): Promise<StudyExport['pinned']> {
  const db = useDatabase()
  if (!rows.length) return []
  const keys = await db.select({ id: candidates.id, key: candidates.resultKey }).from(candidates).where(inArray(candidates.id, rows.map(row => row.id)))
  const keyOf = new Map(keys.map(({ id, key }) => [id, key]))
  const found = await Promise.all(rows.map(async (row) => {
    const key = keyOf.get(row.id)
    const curves = key ? await curvesOf(db, key) : null
    return curves ? [{ row, curves }] : []
  }))
  return found.flat()
}

/** Points of a computed row after its normalisation; null for one without points. */
function pointsOf(row: Candidate, requirements: Requirements): number[][] | null {
  if (row.state !== 'computed') return null
  const { constellation } = canonicalInputs(row.inputs, requirements)
  if (!constellation) return null
  const { order, dimensions, points } = normalise(constellationOf(constellation), constellation.normalisation)
  return Array.from({ length: order }, (_, i) => [...points.subarray(i * dimensions, (i + 1) * dimensions)])
}

/** Made one at a time, when they are written: a study may give thousands of rows a role. */
function* constellationsOf(rows: readonly Candidate[], requirements: Requirements): Generator<{ row: Candidate, points: number[][] }> {
  for (const row of rows) {
    const points = pointsOf(row, requirements)
    if (points) yield { row, points }
  }
}

async function* pagesOf(studyId: string): AsyncGenerator<Candidate[]> {
  let after: { position: number, id: string } | null = null
  for (;;) {
    const page: Candidate[] = await rowsAfter(useDatabase(), studyId, after, pageRows)
    if (page.length) yield page
    if (page.length < pageRows) return
    after = page.at(-1)!
  }
}

/**
 * What an export of a study says; the rows themselves are read while it is written.
 * @param by name of who asks for it
 */
export async function gatherStudy(studyId: string, by: string): Promise<StudyExport> {
  const [study, members, counts, leading, noted] = await Promise.all([
    getStudy({ id: studyId, role: null }), listMembers(studyId), countRows(studyId), leadingOf(studyId), notedRows(studyId),
  ])
  const pinned = noted.filter(row => row.pin !== null).sort((a, b) => a.pin! - b.pin!)
  return {
    study, members, by, at: new Date(), version, coreVersion, counts, leading,
    reference: noted.find(row => row.inputs.role === 'reference') ?? null,
    pinned: await curvesOfRows(pinned),
    constellations: () => constellationsOf(noted, study.requirements),
    rows: () => pagesOf(studyId),
  }
}
