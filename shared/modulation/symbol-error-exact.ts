import { requireNoiseDensity } from './errors'
import type { Geometry } from './geometry'
import { pieceError } from './symbol-error-edge'

/** Pieces that together cannot reach this part of the sum are left out. */
const negligible = 1e-12

/**
 * Exact mean symbol error rate of minimum-distance decisions for one or two dimensions.
 * @param geometry decision regions, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @returns probability; relative error below 1e-9 from 0.9 down to 1e-30
 * @throws ModulationError when n0 is not positive and finite
 * @see methods §2; Craig 1991
 */
export function serExact(geometry: Geometry, n0: number): number {
  requireNoiseDensity(n0)
  const { h, a, b, reach, weight, remaining } = geometry.pieces
  let sum = 0
  for (let n = 0; n < h.length; n++) {
    // A wedge holds at most ½·exp(−(least distance)²/N0), and later pieces are farther away.
    if (remaining[n]! * Math.exp(-reach[n]! / n0) / 2 <= negligible * sum) break
    sum += weight[n]! * pieceError(h[n]!, a[n]!, b[n]!, n0)
  }
  return sum
}

/**
 * Exact mean symbol error rates over many noise densities.
 * @returns one probability for each of n0s
 * @throws ModulationError when one is not positive and finite
 */
export function serExactCurve(geometry: Geometry, n0s: ArrayLike<number>): Float64Array {
  return Float64Array.from(n0s, n0 => serExact(geometry, n0))
}

/**
 * Exact symbol error probability of each point, given that it is sent.
 * @param geometry decision regions, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @returns M probabilities; Σ p_i of them is serExact
 * @throws ModulationError when n0 is not positive and finite
 */
export function serExactByPoint(geometry: Geometry, n0: number): Float64Array {
  requireNoiseDensity(n0)
  const { offsets, edges, constellation: { order } } = geometry
  return Float64Array.from({ length: order }, (_, i) => {
    let sum = 0
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      sum += edgeError(edges.h[entry]!, edges.t1[entry]!, edges.t2[entry]!, n0)
    }
    return sum
  })
}

/** A whole edge from t1 to t2, cut at the foot where the foot lies on it. */
function edgeError(h: number, t1: number, t2: number, n0: number): number {
  if (t1 >= 0) return pieceError(h, t1, t2, n0)
  if (t2 <= 0) return pieceError(h, -t2, -t1, n0)
  return pieceError(h, 0, t2, n0) + pieceError(h, 0, -t1, n0)
}
