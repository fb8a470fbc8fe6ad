import { and, asc, eq, gt, isNull, max, notInArray, sql } from 'drizzle-orm'
import type { Transaction } from '../database/client'
import { candidates } from '../database/schema'
import { problem } from '../utils/problem'

/** Least distance of two positions; closer together, all rows are numbered anew. */
const leastStep = 1e-6

const live = (studyId: string) => and(eq(candidates.studyId, studyId), isNull(candidates.deletedAt))

/** The last position of a study's rows; 0 when there are none. */
export async function lastPosition(tx: Transaction, studyId: string): Promise<number> {
  const [row] = await tx.select({ last: max(candidates.position) }).from(candidates).where(live(studyId))
  return row?.last ?? 0
}

/**
 * Positions for rows that go behind another one.
 * @param after the row before them; null: they come first; undefined: they come last
 * @param count how many
 * @param except rows that are about to leave their places
 * @returns rising positions, and whether all rows were numbered anew to make room
 */
export async function positionsBehind(
  tx: Transaction, studyId: string, after: string | null | undefined, count: number, except: readonly string[] = [],
): Promise<{ positions: number[], renumbered: boolean }> {
  if (after === undefined) {
    const last = await lastPosition(tx, studyId)
    return { positions: Array.from({ length: count }, (_, i) => last + i + 1), renumbered: false }
  }
  const free = await gap(tx, studyId, after, except)
  if ((free.to - free.from) / (count + 1) > leastStep) return { positions: spread(free, count), renumbered: false }
  await renumber(tx, studyId)
  return { positions: spread(await gap(tx, studyId, after, except), count), renumbered: true }
}

const spread = ({ from, to }: { from: number, to: number }, count: number) =>
  Array.from({ length: count }, (_, i) => from + (to - from) * (i + 1) / (count + 1))

/** Positions of the row behind which there is to be room, and of the one after it. */
async function gap(tx: Transaction, studyId: string, after: string | null, except: readonly string[]) {
  const from = after === null ? null : await positionOf(tx, studyId, after)
  const [next] = await tx.select({ position: candidates.position }).from(candidates)
    .where(and(
      live(studyId),
      from === null ? undefined : gt(candidates.position, from),
      except.length > 0 ? notInArray(candidates.id, [...except]) : undefined,
    ))
    .orderBy(asc(candidates.position)).limit(1)
  const start = from ?? (next ? next.position - 2 : 0)
  return { from: start, to: next?.position ?? start + 2 }
}

async function positionOf(tx: Transaction, studyId: string, id: string): Promise<number> {
  const [row] = await tx.select({ position: candidates.position }).from(candidates).where(and(live(studyId), eq(candidates.id, id)))
  return row?.position ?? problem(422, 'The row to go behind is not in this study.', {
    errors: [{ path: 'after', message: 'Name a row of this study, or null for the first place.' }],
  })
}

/** Numbers a study's rows 1, 2, 3, … in their present order. */
async function renumber(tx: Transaction, studyId: string) {
  await tx.execute(sql`
    update ${candidates} join (
      select ${candidates.id} as ordered_id, row_number() over (order by ${candidates.position}, ${candidates.id}) as place
      from ${candidates} where ${candidates.studyId} = ${studyId} and ${candidates.deletedAt} is null
    ) as ordered on ordered.ordered_id = ${candidates.id}
    set ${candidates.position} = ordered.place`)
}

/** Ids of all rows of a study. */
export async function liveIds(tx: Transaction, studyId: string): Promise<string[]> {
  const rows = await tx.select({ id: candidates.id }).from(candidates).where(live(studyId))
  return rows.map(row => row.id)
}
