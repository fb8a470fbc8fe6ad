import { probabilityOf } from './constellation'
import type { Geometry } from './geometry'
import { merged, quantum } from './geometry-pieces'
import type { Row } from './geometry-pieces'
import { onesIn } from './labels/words'
import { diagramEdgesOf } from './wrong-bits'

/** So many pieces are held at a time. */
const mostRows = 2 ** 17

/**
 * Every edge of the diagram as every point sees it, cut at the foot, weighed with p_i and with the wrong bits that noise gains when it crosses
 * it; congruent ones together, which for lattices leaves few. What is too much for the memory comes in several parts.
 * @param geometry decision regions of one or two dimensions
 * @param words labels as numbers
 */
export function* seenPieces(geometry: Geometry, words: Uint16Array): Generator<Row[]> {
  const step = quantum * geometry.minimumDistance
  let rows: Row[] = []
  let repeats = true
  for (let i = 0; i < words.length; i++) {
    addSeenFrom(i, rows, geometry, words)
    if (rows.length < mostRows) continue
    const together: Row[] = repeats ? merged(rows, step) : rows
    repeats = together.length < rows.length / 2
    if (repeats) {
      rows = together
    } else {
      yield together
      rows = []
    }
  }
  yield repeats ? merged(rows, step) : rows
}

/** The edges of the geometry asked for last. */
let last: { geometry: Geometry, diagram: ReturnType<typeof diagramEdgesOf> } | null = null

function addSeenFrom(i: number, rows: Row[], geometry: Geometry, words: Uint16Array): void {
  if (last?.geometry !== geometry) last = { geometry, diagram: diagramEdgesOf(geometry) }
  const { a, b, ax, ay, ex, ey, h, t1, t2 } = last.diagram
  const { points, dimensions } = geometry.constellation
  const p = probabilityOf(geometry.constellation, i)
  const [x, y] = [points[dimensions * i]!, dimensions === 1 ? 0 : points[2 * i + 1]!]
  for (let e = 0; e < a.length; e++) {
    const bits = onesIn[words[i]! ^ words[b[e]!]!]! - onesIn[words[i]! ^ words[a[e]!]!]!
    if (bits === 0) continue
    const [dx, dy] = [x - ax[e]!, y - ay[e]!]
    const signed = h[e]! - (dx * ex[e]! + dy * ey[e]!)
    // The point may lie on the line of an edge that is elsewhere: nothing flows through it.
    if (signed === 0) continue
    const foot = dy * ex[e]! - dx * ey[e]!
    addCut(rows, Math.abs(signed), t1[e]! - foot, t2[e]! - foot, signed > 0 ? p * bits : -p * bits)
  }
}

/** An edge from t1 to t2 as pieces on one side of the foot. */
function addCut(rows: Row[], h: number, t1: number, t2: number, weight: number): void {
  if (t2 <= 0) rows.push({ h, a: -t2, b: -t1, weight })
  else if (t1 >= 0) rows.push({ h, a: t1, b: t2, weight })
  else rows.push({ h, a: 0, b: t2, weight }, { h, a: 0, b: -t1, weight })
}
