import type { Constellation } from './constellation'
import { requireNoiseDensity } from './errors'
import { q } from './gaussian'
import type { Geometry } from './geometry'
import { pairDistancesOf } from './pair-distances'
import type { PairDistances } from './pair-distances'

/** A pair whose exponent exceeds the least one by this much adds less than 1e-13 of the sum, were there 4096² such pairs. */
const negligibleExponent = 48

/**
 * Probability that a received vector is nearer to another point than to the one sent.
 * @param distance of the two points, signal units
 * @param n0 noise density N0 above 0, signal units squared
 * @throws ModulationError when n0 is not positive and finite
 * @see methods §2
 */
export function pairwiseError(distance: number, n0: number): number {
  requireNoiseDensity(n0)
  return q(distance / Math.sqrt(2 * n0))
}

/**
 * Mean symbol error rate by the union bound over relevant neighbours.
 * @param geometry decision regions, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @returns may exceed 1 at low SNR (it is a bound)
 * @throws ModulationError when n0 is not positive and finite
 * @see methods §2; Proakis, Digital Communications, union bound
 */
export function serUnionBound(geometry: Geometry, n0: number): number {
  requireNoiseDensity(n0)
  const { distance, weight } = geometry.distanceClasses
  const farthest = farthestOf(geometry.minimumDistance, n0)
  let sum = 0
  for (let n = 0; n < distance.length && distance[n]! <= farthest; n++) sum += weight[n]! * q(distance[n]! / Math.sqrt(2 * n0))
  return sum
}

/** The last constellation's distances: its error rate is asked for at one N0 after another. */
let last: { constellation: Constellation, pairs: PairDistances } | null = null

function pairsOf(constellation: Constellation): PairDistances {
  if (last?.constellation !== constellation) last = { constellation, pairs: pairDistancesOf(constellation) }
  return last.pairs
}

/**
 * Mean symbol error rate by the union bound over all pairs: looser than that over relevant neighbours, for any dimension.
 * @param constellation M points
 * @param n0 noise density N0 above 0, signal units squared
 * @returns may exceed 1 at low SNR; better than 1e-10 relative from there down to 1e-30
 * @throws ModulationError when n0 is not positive and finite
 */
export function serAllPairs(constellation: Constellation, n0: number): number {
  requireNoiseDensity(n0)
  return sumOverPairs(pairsOf(constellation), n0)
}

/** Σ w·Q(d/√(2·N0)) over pairs. */
export function sumOverPairs({ least, square, weight }: PairDistances, n0: number): number {
  const farthest = least + 4 * n0 * negligibleExponent
  let sum = 0
  for (let n = 0; n < square.length; n++) {
    if (square[n]! <= farthest) sum += weight[n]! * q(Math.sqrt(square[n]! / (2 * n0)))
  }
  return sum
}

/**
 * Nearest-neighbour approximation Ā·Q(d_min/√(2·N0)); not a bound.
 * @param geometry decision regions, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @throws ModulationError when n0 is not positive and finite
 * @see methods §2
 */
export function serNearest(geometry: Geometry, n0: number): number {
  return geometry.nearestMean * pairwiseError(geometry.minimumDistance, n0)
}

function farthestOf(minimumDistance: number, n0: number): number {
  return Math.sqrt(minimumDistance ** 2 + 4 * n0 * negligibleExponent)
}
