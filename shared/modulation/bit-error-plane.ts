import { CongruentFlows } from './congruent-flows'
import { DiagramView } from './diagram-view'
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

/** Noise densities from which it pays to put congruent flows together. */
const manyDensities = 4

/** One for the module: calls do not overlap, and each takes up its edges anew. */
const seen = new SeenEdge()

/**
 * Adds Σ_i p_i·Σ_edges(a|b) [d_H(i,b) − d_H(i,a)]·I_i(edge): noise that crosses an edge from a's side to b's loses the wrong bits of a
 * and takes up those of b, whichever cell the point itself stands in.
 * @see methods §3
 */
export function addPlaneBits(geometry: Geometry, { words, p, densities, reach, sums }: SeenBits): void {
  const diagram = new DiagramView(geometry)
  const farthest = reach.length > 0 ? reach[0]! : 0
  const add = (h: number, near: number, far: number, factor: number) => {
    const square = near > 0 ? h * h + near * near : h * h
    let count = 1
    while (count < densities.length && square <= reach[count]!) count++
    seen.take(h, near, far)
    seen.addTo(sums, factor, densities, count)
  }
  const together = diagram.regular && densities.length >= manyDensities ? new CongruentFlows(geometry.minimumDistance, add) : null
  for (let i = 0; i < words.length; i++) {
    const word = words[i]!
    const [from, to] = diagram.within(i, farthest)
    for (let e = from; e < to; e++) {
      const bits = onesIn[word ^ words[diagram.b[e]!]!]! - onesIn[word ^ words[diagram.a[e]!]!]!
      if (bits === 0) continue
      const side = diagram.see(i, e, farthest)
      if (side === 0) continue
      if (together) together.add(diagram.h, diagram.near, diagram.far, side * p[i]! * bits)
      else add(diagram.h, diagram.near, diagram.far, side * p[i]! * bits)
    }
  }
  together?.flush()
}
