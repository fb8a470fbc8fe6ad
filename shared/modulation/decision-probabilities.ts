import { probabilityOf } from './constellation'
import { q } from './gaussian'
import type { Geometry } from './geometry'
import { DiagramView } from './diagram-view'
import { serExact } from './symbol-error-exact'
import { SeenEdge } from './symbol-error-seen-edge'

/**
 * Probabilities that point i is sent and another one, c, decided on, for one or two dimensions; minimum-distance decisions.
 * @param geometry decision regions, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @param negligible edges that carry less than this part of the symbol error rate are left out
 * @param take gets each point i with its row p_i·P(c | i) over all c (that of i itself says nothing); the array is used again
 */
export function decisionProbabilities(
  geometry: Geometry, n0: number, negligible: number, take: (i: number, row: Float64Array) => void,
): void {
  const { constellation } = geometry
  const rate = serExact(geometry, n0)
  const farthest = rate > 0 ? n0 * (Math.log(geometry.neighbours.length / negligible) - Math.log(rate)) : 0
  const fill = constellation.dimensions === 1 ? lineRows(geometry, n0, farthest) : planeRows(geometry, n0, farthest)
  const row = new Float64Array(constellation.order)
  for (let i = 0; i < row.length; i++) {
    row.fill(0)
    fill(i, row, probabilityOf(constellation, i))
    take(i, row)
  }
}

type FillRow = (i: number, row: Float64Array, p: number) => void

function planeRows(geometry: Geometry, n0: number, farthest: number): FillRow {
  const diagram = new DiagramView(geometry)
  const seen = new SeenEdge()
  const density = Float64Array.of(n0)
  const flow = new Float64Array(1)
  return (i, row, p) => {
    const [from, to] = diagram.within(i, farthest)
    for (let e = from; e < to; e++) {
      const side = diagram.see(i, e, farthest)
      if (side === 0) continue
      flow[0] = 0
      seen.take(diagram.h, diagram.near, diagram.far)
      seen.addTo(flow, side * p, density, 1)
      row[diagram.a[e]!]! -= flow[0]!
      row[diagram.b[e]!]! += flow[0]!
    }
  }
}

function lineRows({ constellation: { points, order } }: Geometry, n0: number, farthest: number): FillRow {
  const rising = Int32Array.from({ length: order }, (_, i) => i).sort((i, j) => points[i]! - points[j]!)
  const rank = new Int32Array(order)
  rising.forEach((i, place) => rank[i] = place)
  return (i, row, p) => {
    for (const step of [-1, 1]) {
      for (let m = rank[i]!; m + step >= 0 && m + step < order; m += step) {
        const [before, behind] = [rising[m]!, rising[m + step]!]
        const distance = Math.abs((points[before]! - points[i]!) + (points[behind]! - points[before]!) / 2)
        if (distance * distance > farthest) break
        const flow = p * q(distance * Math.sqrt(2 / n0))
        row[before]! -= flow
        row[behind]! += flow
      }
    }
  }
}
