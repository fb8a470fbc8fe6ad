import { probabilityOf } from './constellation'
import { ModulationError, requireNoiseDensity } from './errors'
import type { Geometry } from './geometry'
import { bitFactorsOf } from './bit-error-factors'
import { labelWords } from './bit-error-labels'
import { addLineBits } from './bit-error-line'
import { addPlaneBits } from './bit-error-plane'
import { serExactCurve } from './symbol-error-exact'

/** Edges too far away to matter may together take this part of the sum: methods §3. */
const negligible = 1e-10

/**
 * Exact mean bit error rates of minimum-distance decisions over many noise densities, with any labels: in one or two dimensions, and in
 * more for a product of such sets whose bits each depend on one of them.
 * @param geometry decision regions, from analyse, of a constellation with labels
 * @param n0s noise densities N0 above 0, signal units squared
 * @returns one probability for each of n0s; relative error below 1e-8 from 0.5 down to 1e-20
 * @throws ModulationError with path ['labels'] when there are none, ['dimensions'] for other sets of more than two, ['n0'] when one is not
 * positive and finite
 * @see methods §3; Szczecinski et al. 2003
 */
export function berExactCurve(geometry: Geometry, n0s: ArrayLike<number>): Float64Array {
  const { constellation } = geometry
  labelWords(constellation)
  const factors = bitFactorsOf(constellation)
  if (!factors) return wholeCurve(geometry, n0s)
  const rates = new Float64Array(n0s.length)
  for (const factor of factors) {
    wholeCurve(factor.geometry, n0s).forEach((rate, s) => {
      rates[s]! += factor.bits / constellation.bitsPerSymbol * rate
    })
  }
  return rates
}

function wholeCurve(geometry: Geometry, n0s: ArrayLike<number>): Float64Array {
  const { constellation } = geometry
  const words = requireExactBits(geometry)
  const falling = Int32Array.from({ length: n0s.length }, (_, s) => s).sort((a, b) => n0s[b]! - n0s[a]!)
  falling.forEach(s => requireNoiseDensity(n0s[s]!))
  const densities = Float64Array.from(falling, s => n0s[s]!)
  const bits = Math.log2(constellation.order)
  const p = Float64Array.from(words, (_, i) => probabilityOf(constellation, i))
  const sums = new Float64Array(n0s.length)
  const seen = { words, p, densities, reach: reachOf(geometry, densities, bits), sums }
  if (constellation.dimensions === 1) addLineBits(geometry, seen)
  else addPlaneBits(geometry, seen)
  const result = new Float64Array(n0s.length)
  falling.forEach((s, n) => result[s] = sums[n]! / bits)
  return result
}

/**
 * The labels as numbers of a constellation that has an exact bit error rate.
 * @throws ModulationError with path ['labels'] when there are none, ['dimensions'] for more than two
 */
export function requireExactBits({ constellation }: Geometry): Uint16Array {
  const words = labelWords(constellation)
  if (constellation.dimensions <= 2) return words
  throw new ModulationError('The exact bit error rate is offered for one and two dimensions and for products of such sets: use the bound over all pairs.', ['dimensions'])
}

/**
 * Exact mean bit error rate of minimum-distance decisions at one noise density; as berExactCurve.
 * @param geometry decision regions, from analyse, of a constellation with labels
 * @param n0 noise density N0 above 0, signal units squared
 */
export function berExact(geometry: Geometry, n0: number): number {
  return berExactCurve(geometry, [n0])[0]!
}

/**
 * Squares of the distance beyond which an edge does not matter, for each of falling densities; falling themselves.
 * A symbol in error has at least one wrong bit, so that the sum of wrong bits is at least the symbol error rate; an edge at distance r
 * carries at most ½·exp(−r²/N0), k times at most, and there are as many for each point as facets.
 */
function reachOf(geometry: Geometry, densities: Float64Array, bits: number): Float64Array {
  const rates = serExactCurve(geometry, densities)
  const facets = geometry.neighbours.length / 2
  const room = Math.log(facets * bits / 2 / negligible)
  const reach = densities.map((n0, s) => rates[s]! > 0 ? n0 * (room - Math.log(rates[s]!)) : 0)
  for (let s = reach.length - 2; s >= 0; s--) reach[s] = Math.max(reach[s]!, reach[s + 1]!)
  return reach
}
