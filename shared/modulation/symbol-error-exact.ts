import { edgeFlow } from './edge-flow'
import { ModulationError, requireNoiseDensity } from './errors'
import { expNegative } from './exponential'
import { requireEdges } from './geometry'
import type { Geometry } from './geometry'
import type { Pieces } from './geometry-pieces'
import { PieceIntegral } from './symbol-error-edge'
import { structuredErrorOf } from './symbol-error-structured'

/** Pieces that together cannot reach this part of the sum are left out. */
const negligible = 1e-12

/** One for the module: calls do not overlap, and each takes up its pieces anew. */
const integral = new PieceIntegral()

/**
 * Exact mean symbol error rates of minimum-distance decisions over many noise densities, for all sets of one or two dimensions,
 * their Cartesian products, and equidistant and biorthogonal sets of more dimensions.
 * @param geometry decision regions, from analyse
 * @param n0s noise densities N0 above 0, signal units squared
 * @returns one probability for each of n0s; relative error below 1e-9 from 0.9 down to 1e-30
 * @throws ModulationError when one is not positive and finite; with path ['dimensions'] where no exact rate is known
 * @see methods §2; Craig 1991
 */
export function serExactCurve(geometry: Geometry, n0s: ArrayLike<number>): Float64Array {
  if (geometry.pieces) return planeCurve(geometry.pieces, n0s)
  const rate = structuredErrorOf(geometry.constellation)
  if (!rate) throw new ModulationError('An exact symbol error rate is known for one and two dimensions, products of such, orthogonal, biorthogonal and simplex sets: use the estimate.', ['dimensions'])
  return Float64Array.from(n0s, (n0) => {
    requireNoiseDensity(n0)
    return rate(n0)
  })
}

/** Whether serExactCurve knows the exact rate. */
export const hasExactRate = ({ pieces, constellation }: Geometry): boolean => pieces !== null || structuredErrorOf(constellation) !== null

function planeCurve({ h, a, b, reach, weight, remaining }: Pieces, n0s: ArrayLike<number>): Float64Array {
  const sums = new Float64Array(n0s.length)
  const open = Int32Array.from({ length: n0s.length }, (_, s) => s)
  open.forEach(s => requireNoiseDensity(n0s[s]!))
  let count = open.length
  for (let n = 0; n < h.length && count > 0; n++) {
    integral.take(h[n]!, a[n]!, b[n]!)
    let kept = 0
    for (let m = 0; m < count; m++) {
      const s = open[m]!
      const n0 = n0s[s]!
      // A wedge holds at most ½·exp(−(least distance)²/N0), and later pieces are farther away.
      if (remaining[n]! * expNegative(-reach[n]! / n0) <= 2 * negligible * sums[s]!) continue
      sums[s]! += weight[n]! * integral.at(n0)
      open[kept++] = s
    }
    count = kept
  }
  return sums
}

/**
 * Exact mean symbol error rate of minimum-distance decisions at one noise density; as serExactCurve.
 * @param geometry decision regions, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @throws ModulationError when n0 is not positive and finite
 */
export function serExact(geometry: Geometry, n0: number): number {
  return serExactCurve(geometry, [n0])[0]!
}

/**
 * Exact symbol error probability of each point, given that it is sent.
 * @param geometry decision regions, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @returns M probabilities; Σ p_i of them is serExact
 * @throws ModulationError when n0 is not positive and finite; with path ['dimensions'] for more than two dimensions
 */
export function serExactByPoint(geometry: Geometry, n0: number): Float64Array {
  requireNoiseDensity(n0)
  const { offsets, constellation: { order } } = geometry
  const edges = requireEdges(geometry.edges)
  return Float64Array.from({ length: order }, (_, i) => {
    let sum = 0
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      sum += edgeFlow(edges.h[entry]!, edges.t1[entry]!, edges.t2[entry]!, n0)
    }
    return sum
  })
}
