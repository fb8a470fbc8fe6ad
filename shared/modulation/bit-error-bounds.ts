import { labelWords } from './bit-error-labels'
import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'
import { requireNoiseDensity } from './errors'
import type { Geometry } from './geometry'
import { onesIn } from './labels/words'
import { pairDistancesOf } from './pair-distances'
import { sumOverPairs } from './symbol-error-bounds'
import type { PairDistances } from './pair-distances'

/** Distances that together weigh: the last geometry's and the last constellation's, as error rates are asked for at one N0 after another. */
let lastNeighbours: { geometry: Geometry, pairs: PairDistances } | null = null
let lastPairs: { constellation: Constellation, pairs: PairDistances } | null = null

/**
 * Neighbour approximation of the bit error rate: (1/k)·Σ_i p_i·Σ_{j∈N_i} d_H(i,j)·Q(d_ij/√(2·N0)); not a bound.
 * @param geometry decision regions, from analyse, of a constellation with labels
 * @param n0 noise density N0 above 0, signal units squared
 * @throws ModulationError with path ['labels'] when there are none, ['n0'] when N0 is not positive and finite
 * @see methods §3
 */
export function berNearest(geometry: Geometry, n0: number): number {
  requireNoiseDensity(n0)
  if (lastNeighbours?.geometry !== geometry) lastNeighbours = { geometry, pairs: neighboursOf(geometry) }
  return sumOverPairs(lastNeighbours.pairs, n0) / geometry.constellation.bitsPerSymbol
}

/**
 * Union bound of the bit error rate over all pairs, for any dimension: (1/k)·Σ_i p_i·Σ_j d_H(i,j)·Q(d_ij/√(2·N0)).
 * @param constellation M points with labels
 * @param n0 noise density N0 above 0, signal units squared
 * @returns may exceed 1 at low SNR; better than 1e-10 relative from there down to 1e-30
 * @throws ModulationError with path ['labels'] when there are none, ['n0'] when N0 is not positive and finite
 * @see methods §3
 */
export function berAllPairs(constellation: Constellation, n0: number): number {
  requireNoiseDensity(n0)
  if (lastPairs?.constellation !== constellation) lastPairs = { constellation, pairs: pairDistancesOf(constellation, labelWords(constellation)) }
  return sumOverPairs(lastPairs.pairs, n0) / constellation.bitsPerSymbol
}

/** Distances of relevant neighbours, weighed with wrong bits. */
export function neighboursOf({ constellation, minimumDistance, offsets, neighbours, distances }: Geometry): PairDistances {
  const words = labelWords(constellation)
  const weight = new Float64Array(neighbours.length)
  words.forEach((word, i) => {
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      weight[entry] = probabilityOf(constellation, i) * onesIn[word ^ words[neighbours[entry]!]!]!
    }
  })
  return { least: minimumDistance ** 2, square: distances.map(distance => distance * distance), weight }
}
