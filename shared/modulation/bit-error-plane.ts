import type { Geometry } from './geometry'
import { onesIn } from './labels/words'
import { SeenEdge } from './symbol-error-seen-edge'

/** What the sums over points and edges need beside the geometry. */
export interface SeenBits {
  /** labels as numbers */
  words: Uint16Array
  /** probabilities of the points */
  p: Float64Array
  /** falling noise densities N0 */
  densities: Float64Array
  /** squares of the distance beyond which an edge does not matter, falling */
  reach: Float64Array
  /** Σ over wrong bits, one for each density: to be added to */
  sums: Float64Array
}

/** Each edge of the diagram once, between point a on the left in the order of x and b. */
interface Edges {
  a: Int32Array
  b: Int32Array
  /** unit vector from a to b */
  ex: Float64Array
  ey: Float64Array
  /** half the distance */
  half: Float64Array
  /** ends along the line, to the left of a → b from the middle between them */
  t1: Float64Array
  t2: Float64Array
}

/** One for the module: calls do not overlap, and each takes up its edges anew. */
const seen = new SeenEdge()

/**
 * Adds Σ_i p_i·Σ_edges(a|b) [d_H(i,b) − d_H(i,a)]·I_i(edge): noise that crosses an edge from a's side to b's loses the wrong bits of a
 * and takes up those of b, whichever cell the point itself stands in.
 * @see methods §3
 */
export function addPlaneBits(geometry: Geometry, { words, p, densities, reach, sums }: SeenBits): void {
  const { constellation: { points, order } } = geometry
  const { a, b, ex, ey, half, t1, t2 } = edgesOf(geometry)
  const farthest = reach.length > 0 ? reach[0]! : 0
  for (let i = 0; i < order; i++) {
    const x = points[2 * i]!
    const y = points[2 * i + 1]!
    const word = words[i]!
    // Every place of an edge is no farther from a than from i, so that a is no farther from i than twice that.
    const [from, to] = within(points, a, x, 2 * Math.sqrt(farthest) * (1 + 1e-9))
    for (let e = from; e < to; e++) {
      const bits = onesIn[word ^ words[b[e]!]!]! - onesIn[word ^ words[a[e]!]!]!
      if (bits === 0) continue
      const dx = x - points[2 * a[e]!]!
      const dy = y - points[2 * a[e]! + 1]!
      const signed = half[e]! - (dx * ex[e]! + dy * ey[e]!)
      const h = Math.abs(signed)
      const foot = dy * ex[e]! - dx * ey[e]!
      const left = t2[e]! - foot
      const right = t1[e]! - foot
      const mirrored = left + right < 0
      const near = mirrored ? -left : right
      const square = near > 0 ? h * h + near * near : h * h
      // On the edge's own line nothing flows through it.
      if (square > farthest || h === 0) continue
      seen.take(h, near, mirrored ? -right : left)
      let count = 1
      while (count < densities.length && square <= reach[count]!) count++
      seen.addTo(sums, signed > 0 ? p[i]! * bits : -p[i]! * bits, densities, count)
    }
  }
}

/** The range of edges whose a lies within a distance of x in the first coordinate. */
function within(points: Float64Array, a: Int32Array, x: number, distance: number): [number, number] {
  const first = (limit: number) => {
    let low = 0
    let high = a.length
    while (low < high) {
      const middle = (low + high) >> 1
      if (points[2 * a[middle]!]! < limit) low = middle + 1
      else high = middle
    }
    return low
  }
  return [first(x - distance), first(x + distance)]
}

function edgesOf({ constellation: { points, order }, offsets, neighbours, distances, edges }: Geometry): Edges {
  const a: number[] = []
  const entries: number[] = []
  const byX = Int32Array.from({ length: order }, (_, i) => i).sort((i, j) => points[2 * i]! - points[2 * j]! || i - j)
  const rank = new Int32Array(order)
  byX.forEach((i, place) => rank[i] = place)
  for (const i of byX) {
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      if (rank[neighbours[entry]!]! < rank[i]!) continue
      a.push(i)
      entries.push(entry)
    }
  }
  const along = (entry: number, n: number, c: number) => (points[2 * neighbours[entry]! + c]! - points[2 * a[n]! + c]!) / distances[entry]!
  return {
    a: Int32Array.from(a),
    b: Int32Array.from(entries, entry => neighbours[entry]!),
    ex: Float64Array.from(entries, (entry, n) => along(entry, n, 0)),
    ey: Float64Array.from(entries, (entry, n) => along(entry, n, 1)),
    half: Float64Array.from(entries, entry => distances[entry]! / 2),
    t1: Float64Array.from(entries, entry => edges.t1[entry]!),
    t2: Float64Array.from(entries, entry => edges.t2[entry]!),
  }
}
