import { PieceIntegral } from './symbol-error-edge'
import { SeenEdge } from './symbol-error-seen-edge'

/** For the module: calls do not overlap, and each takes up its pieces anew. */
const integral = new PieceIntegral()
const seen = new SeenEdge()
const density = new Float64Array(1)
const sum = new Float64Array(1)

/** A point this near to an edge's line, in √N0, is on it: the integral there is that of its limit to any digit. */
const onLine = 1e-30

/**
 * The flow of a point's noise through an edge towards the edge's other side: (1/2π)·∫ exp(−(h²+t²)/N0)·h/(h²+t²) dt from t1 to t2.
 * It is negative when the point is beyond the edge already. On the edge, where it jumps, the point counts as before it: ½.
 * @param h signed distance of the edge's line, not negative when the point is before it, signal units
 * @param t1 the edge's first end along the line, from the foot of the perpendicular
 * @param t2 its second end, above t1; ends may be infinite
 * @param n0 noise density N0 above 0, signal units squared
 * @returns −½ to ½, relative error below 2e-11
 * @see methods §2; Craig 1991
 */
export function edgeFlow(h: number, t1: number, t2: number, n0: number): number {
  const distance = Math.abs(h)
  const flow = distance > onLine * Math.sqrt(n0) ? flowFrom(distance, t1, t2, n0) : flowOnLine(t1, t2)
  return h < 0 ? -flow : flow
}

/**
 * The same, a few times as fast and less exact, where it is asked for at many places.
 * @returns −½ to ½, relative error below 2e-10
 */
export function quickEdgeFlow(h: number, t1: number, t2: number, n0: number): number {
  const distance = Math.abs(h)
  if (!(distance > onLine * Math.sqrt(n0))) return edgeFlow(h, t1, t2, n0)
  if (t1 + t2 < 0) seen.take(distance, -t2, -t1)
  else seen.take(distance, t1, t2)
  density[0] = n0
  sum[0] = 0
  seen.addTo(sum, h < 0 ? -1 : 1, density, 1)
  return sum[0]
}

/** Cut at the foot where the foot lies on the edge. */
function flowFrom(h: number, t1: number, t2: number, n0: number): number {
  if (t1 >= 0) return piece(h, t1, t2, n0)
  if (t2 <= 0) return piece(h, -t2, -t1, n0)
  return piece(h, 0, t2, n0) + piece(h, 0, -t1, n0)
}

function piece(h: number, a: number, b: number, n0: number): number {
  integral.take(h, a, b)
  return integral.at(n0)
}

/** The limit from before the line: a quarter for either side of the foot on which the edge lies. */
function flowOnLine(t1: number, t2: number): number {
  if (t1 > 0 || t2 < 0) return 0
  return (t1 < 0 ? 0.25 : 0) + (t2 > 0 ? 0.25 : 0)
}
