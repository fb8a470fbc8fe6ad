import type { Constellation } from './constellation'
import { edgeFlow } from './edge-flow'
import { requireEdges } from './geometry'
import type { CellEdges } from './geometry'
import { onesIn } from './labels/words'
import { SeenEdge } from './symbol-error-seen-edge'

/** Cells as minimum-distance geometry and MAP decisions both give them: the edges of cell i are entries offsets[i] … offsets[i + 1] − 1. */
export interface Cells {
  constellation: Constellation
  offsets: Int32Array
  neighbours: Int32Array
  /** null for more than two dimensions */
  edges: CellEdges | null
}

/** Each edge of a diagram of one or two dimensions once, between the cells of points a and b. */
export interface DiagramEdges {
  a: Int32Array
  b: Int32Array
  /** coordinates of point a */
  ax: Float64Array
  ay: Float64Array
  /** unit vector from a to b */
  ex: Float64Array
  ey: Float64Array
  /** signed distance of the line from a, positive towards b */
  h: Float64Array
  /** ends along the line, to the left of a → b from the foot of a */
  t1: Float64Array
  t2: Float64Array
}

/** One for the module: calls do not overlap, and each takes up its edges anew. */
const seen = new SeenEdge()
const density = new Float64Array(1)
const sum = new Float64Array(1)

/** The edges of all cells, each from the point of the lower index that has it. */
export function diagramEdgesOf({ constellation: { points, dimensions, order }, offsets, neighbours, edges: given }: Cells): DiagramEdges {
  const edges = requireEdges(given)
  const [a, entries] = [[] as number[], [] as number[]]
  for (let i = 0; i < order; i++) {
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      if (neighbours[entry]! < i) continue
      a.push(i)
      entries.push(entry)
    }
  }
  const x = (i: number) => points[dimensions * i]!
  const y = (i: number) => dimensions === 1 ? 0 : points[2 * i + 1]!
  const along = (coordinate: (i: number) => number) => Float64Array.from(entries, (entry, n) => {
    const [i, j] = [a[n]!, neighbours[entry]!]
    return (coordinate(j) - coordinate(i)) / Math.hypot(x(j) - x(i), y(j) - y(i))
  })
  return {
    a: Int32Array.from(a), b: Int32Array.from(entries, entry => neighbours[entry]!),
    ax: Float64Array.from(a, x), ay: Float64Array.from(a, y), ex: along(x), ey: along(y),
    h: Float64Array.from(entries, entry => edges.h[entry]!),
    t1: Float64Array.from(entries, entry => edges.t1[entry]!), t2: Float64Array.from(entries, entry => edges.t2[entry]!),
  }
}

/**
 * The edges that change the number of wrong bits of a word, and come within a distance of a place.
 * @param words labels as numbers
 * @param word what was sent
 */
export function edgesThatMatter(diagram: DiagramEdges, words: Uint16Array, word: number, x: number, y: number, distance: number): DiagramEdges {
  const { a, b, ax, ay, ex, ey, h, t1, t2 } = diagram
  const kept = a.map((_, e) => e).filter((e) => {
    if (onesIn[word ^ words[a[e]!]!] === onesIn[word ^ words[b[e]!]!]) return false
    const [dx, dy] = [x - ax[e]!, y - ay[e]!]
    const foot = dy * ex[e]! - dx * ey[e]!
    const aside = Math.max(0, t1[e]! - foot, foot - t2[e]!)
    return Math.hypot(h[e]! - (dx * ex[e]! + dy * ey[e]!), aside) <= distance
  })
  const some = (values: Float64Array) => Float64Array.from(kept, e => values[e]!)
  return {
    a: kept.map(e => a[e]!), b: kept.map(e => b[e]!),
    ax: some(ax), ay: some(ay), ex: some(ex), ey: some(ey), h: some(h), t1: some(t1), t2: some(t2),
  }
}

/**
 * Mean number of wrong bits of a word whose signal stands at any place of the plane: those of the cell at that place, and for each edge
 * what the noise that crosses it gains and loses, whichever cell the place is in.
 * @param words labels as numbers
 * @param word what was sent
 * @param home the cell that holds the place, which rounding then cannot contradict
 * @param n0 noise density N0 above 0, signal units squared
 * @param reach square of the distance beyond which edges are left out
 * @see methods §3; Szczecinski et al. 2003
 */
export function wrongBitsAt(
  diagram: DiagramEdges, words: Uint16Array, word: number, x: number, y: number, home: number, n0: number, reach: number,
): number {
  const { a, b, ax, ay, ex, ey, h, t1, t2 } = diagram
  density[0] = n0
  sum[0] = onesIn[word ^ words[home]!]!
  for (let e = 0; e < a.length; e++) {
    const [before, behind] = [a[e]!, b[e]!]
    const bits = onesIn[word ^ words[behind]!]! - onesIn[word ^ words[before]!]!
    if (bits === 0) continue
    const [dx, dy] = [x - ax[e]!, y - ay[e]!]
    let signed = h[e]! - (dx * ex[e]! + dy * ey[e]!)
    if (signed * signed > reach) continue
    const foot = dy * ex[e]! - dx * ey[e]!
    if (before === home && signed < 0) signed = 0
    if (behind === home && signed >= 0) signed = -0
    addFlow(bits, signed, t1[e]! - foot, t2[e]! - foot, reach)
  }
  return sum[0]!
}

/** Adds the flow through an edge, from any point, times a factor; −0 is the farther side of the line itself. */
function addFlow(factor: number, signed: number, right: number, left: number, reach: number): void {
  const h = Math.abs(signed)
  const mirrored = left + right < 0
  const near = mirrored ? -left : right
  if (near > 0 && h * h + near * near > reach) return
  const side = signed < 0 || Object.is(signed, -0) ? -factor : factor
  if (h === 0) {
    sum[0]! += side * edgeFlow(0, right, left, density[0]!)
    return
  }
  seen.take(h, near, mirrored ? -right : left)
  seen.addTo(sum, side, density, 1)
}
