import { and, asc, eq, inArray, isNull, lt, sql } from 'drizzle-orm'
import type { PartsAnswer, PartsRequest } from '#shared/schemas/parts'
import { useDatabase } from '../database/client'
import { candidates, resultParts, results, studies } from '../database/schema'
import { problem } from '../utils/problem'
import { enqueueParts, isPartPending } from './part-queue'
import type { WaitingPart } from './part-queue'
import { rowKey } from './row-key'
import { notePartsAsked } from './stored-parts'

/**
 * Has a part computed for rows that lack it. Rows without points, and those that cannot be computed at all, have none.
 * @throws a 422 problem naming the first row that the study does not have
 */
export async function requestParts(studyId: string, { part, ids }: PartsRequest): Promise<PartsAnswer> {
  const db = useDatabase()
  const rows = await db.select({
    id: candidates.id, inputs: candidates.inputs, resultKey: candidates.resultKey, requirements: studies.requirements,
    failed: sql<number>`coalesce(json_length(${results.errors}), 0)`.mapWith(Number), state: resultParts.state,
  }).from(candidates)
    .innerJoin(studies, eq(studies.id, candidates.studyId))
    .leftJoin(results, eq(results.key, candidates.resultKey))
    .leftJoin(resultParts, and(eq(resultParts.key, candidates.resultKey), eq(resultParts.part, part)))
    .where(and(eq(candidates.studyId, studyId), inArray(candidates.id, ids), isNull(candidates.deletedAt)))
  const there = new Set(rows.map(row => row.id))
  const missing = ids.findIndex(id => !there.has(id))
  if (missing >= 0) problem(422, 'A row of the selection is not in this study.', { errors: [{ path: `ids.${missing}`, message: 'This row is not in this study.' }] })

  const able = rows.filter(row => row.resultKey !== null && row.failed === 0 && row.inputs.family !== 'entered')
  const lacking = able.filter(row => row.state === null || row.state === 'computing')
  // Rows of one study share their requirements, and those their canonical form.
  const [requirements] = rows.map(row => row.requirements)
  const waiting = lacking.flatMap(({ inputs }): WaitingPart[] => {
    const { resultKey: key, canonical } = rowKey(inputs, requirements!)
    return canonical ? [{ key, part, inputs: canonical }] : []
  })
  await notePartsAsked(db, waiting.map(one => one.key), part)
  enqueueParts(waiting)
  return { computed: able.length - lacking.length, queued: waiting.length, without: rows.length - able.length + lacking.length - waiting.length }
}

/** Parts of one look through the table. */
const partsAtOnce = 500

/**
 * Finds parts that were asked for and have not been computed, and queues them: at the start for what an ended server left behind,
 * later for what another server did. Those of results that no row has any more are forgotten.
 * @param askedBefore only parts asked for so long ago, in milliseconds
 */
export async function requeueParts(askedBefore: number): Promise<void> {
  const db = useDatabase()
  const before = new Date(Date.now() - askedBefore)
  const lost = (await db.select({ key: resultParts.key, part: resultParts.part }).from(resultParts)
    .where(and(eq(resultParts.state, 'computing'), lt(resultParts.askedAt, before)))
    .orderBy(asc(resultParts.askedAt)).limit(partsAtOnce)).filter(part => !isPartPending(part))
  for (const { key, part } of lost) {
    const [row] = await db.select({ inputs: candidates.inputs, requirements: studies.requirements }).from(candidates)
      .innerJoin(studies, eq(studies.id, candidates.studyId))
      .where(and(eq(candidates.resultKey, key), isNull(candidates.deletedAt))).limit(1)
    const present = row && rowKey(row.inputs, row.requirements)
    if (present?.resultKey === key) enqueueParts([{ key, part, inputs: present.canonical }])
    else await db.delete(resultParts).where(and(eq(resultParts.key, key), eq(resultParts.part, part)))
  }
}
