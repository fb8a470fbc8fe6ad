import { probabilityOf } from './constellation'
import { requireNoiseDensity } from './errors'
import { q } from './gaussian'
import type { Geometry } from './geometry'
import { PieceIntegral } from './symbol-error-edge'

/** Neighbours whose pairwise error is this much smaller than the nearest one's are left out: a bound on fewer events is still one. */
const negligibleExponent = 23
/** Neighbours of a point that are looked at, nearest first. */
const mostNeighbours = 64
/** Half spaces of bisectors that are parallel to this part, facing away from each other, do not meet. */
const parallel = 1e-12

const integral = new PieceIntegral()

/** How far the work goes. */
export interface LowerBoundEffort {
  /** nearest neighbours of a point that are looked at; default 64 */
  neighbours?: number
}

/**
 * Lower bound on the mean symbol error rate by de Caen and Séguin: Σ_i p_i Σ_{j∈N_i} Q_j²/Σ_{k∈N_i} P(A_j∩A_k), A_j the event that the
 * received vector is nearer to s_j than to s_i.
 * @param geometry decision regions of any dimension, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @throws ModulationError when n0 is not positive and finite
 * @see methods §2; Séguin 1998, A lower bound on the error probability for signals in white Gaussian noise
 */
export function serLowerBound(geometry: Geometry, n0: number, { neighbours = mostNeighbours }: LowerBoundEffort = {}): number {
  requireNoiseDensity(n0)
  const { constellation } = geometry
  let sum = 0
  for (let i = 0; i < constellation.order; i++) sum += probabilityOf(constellation, i) * pointBound(geometry, i, n0, neighbours)
  return sum
}

function pointBound({ constellation: { points, dimensions }, offsets, neighbours, distances }: Geometry, i: number, n0: number, most: number): number {
  const entries = Array.from({ length: offsets[i + 1]! - offsets[i]! }, (_, n) => offsets[i]! + n).sort((a, b) => distances[a]! - distances[b]!)
  const farthest = distances[entries[0]!]! ** 2 + 4 * n0 * negligibleExponent
  const counted = entries.filter((entry, n) => n < most && distances[entry]! ** 2 <= farthest)
  const own = counted.map(entry => q(distances[entry]! / Math.sqrt(2 * n0)))
  const sums = [...own]
  counted.forEach((first, m) => {
    for (let n = 0; n < m; n++) {
      const second = counted[n]!
      const cosine = dotFrom(points, dimensions, i, neighbours[first]!, neighbours[second]!) / distances[first]! / distances[second]!
      const both = bothBeyond(distances[first]! / 2, distances[second]! / 2, cosine, n0)
      sums[m]! += both
      sums[n]! += both
    }
  })
  return own.reduce((sum, p, m) => p > 0 ? sum + p / sums[m]! * p : sum, 0)
}

function dotFrom(points: Float64Array, dimensions: number, i: number, j: number, k: number): number {
  let sum = 0
  for (let n = 0; n < dimensions; n++) {
    const from = points[i * dimensions + n]!
    sum += (points[j * dimensions + n]! - from) * (points[k * dimensions + n]! - from)
  }
  return sum
}

/**
 * Probability that noise carries a point beyond two lines at distances h and k, whose normals enclose an angle: a bivariate normal tail. The
 * wedge beyond both is seen from the point as two pieces of lines that meet in the corner, so that nothing is ever subtracted.
 * @see Craig 1991; Simon and Divsalar 1998
 */
export function bothBeyond(h: number, k: number, cosine: number, n0: number): number {
  const sine = Math.sqrt(Math.max(0, (1 - cosine) * (1 + cosine)))
  if (sine < parallel) return cosine < 0 ? 0 : q(Math.max(h, k) * Math.sqrt(2 / n0))
  return beyond(h, (k - h * cosine) / sine, n0) + beyond(k, (h - k * cosine) / sine, n0)
}

/** Across the line at distance h from a place along it, counted from the foot of the perpendicular, to infinity. */
function beyond(h: number, from: number, n0: number): number {
  integral.take(h, Math.max(0, from), Infinity)
  const outer = integral.at(n0)
  if (from >= 0) return outer
  integral.take(h, 0, -from)
  return outer + integral.at(n0)
}
