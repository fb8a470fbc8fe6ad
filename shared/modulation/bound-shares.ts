import { requireNoiseDensity } from './errors'
import { logQ } from './gaussian'
import type { Geometry } from './geometry'

/**
 * Each relevant neighbour's share of its point's union bound: what part of the bound goes with taking the point for this neighbour.
 * @param geometry decision regions, from analyse, of any number of dimensions
 * @param n0 noise density N0 above 0, signal units squared
 * @returns by entry, as geometry.neighbours; the shares of a point add up to 1, also where the bound itself is too small for a number
 * @throws ModulationError when n0 is not positive and finite
 * @see methods §2
 */
export function boundShares({ offsets, distances, constellation: { order } }: Geometry, n0: number): Float64Array {
  requireNoiseDensity(n0)
  const shares = distances.map(distance => logQ(distance / Math.sqrt(2 * n0)))
  for (let i = 0; i < order; i++) {
    const own = shares.subarray(offsets[i]!, offsets[i + 1]!)
    const largest = own.reduce((most, share) => Math.max(most, share), -Infinity)
    let sum = 0
    own.forEach((share, n) => sum += own[n] = Math.exp(share - largest))
    own.forEach((share, n) => own[n] = share / sum)
  }
  return shares
}
