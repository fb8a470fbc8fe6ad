import { createConstellation } from './constellation'
import type { Constellation } from './constellation'
import { analyse } from './geometry'
import type { Geometry } from './geometry'
import { informationSources } from './information-source'
import type { InformationSource } from './information-source'
import { serExact } from './symbol-error-exact'

/** A factor of a product whose bits are its own. */
export interface BitFactor {
  geometry: Geometry
  /** how many bits of the word are the factor's */
  bits: number
}

/** Factors of constellations that have been asked for; null where there are none. */
const known = new WeakMap<Constellation, BitFactor[] | null>()

/**
 * The factors of one or two dimensions of a Cartesian product in which each bit depends on one factor alone, as in a square grid with Gray labels
 * or a product of families: decisions on them are independent, and the bit error rate is the mean of theirs, weighted with their bits.
 * @param constellation M points with labels, of any dimension
 * @returns null where the set is no such product
 */
export function bitFactorsOf(constellation: Constellation): BitFactor[] | null {
  let factors = known.get(constellation)
  if (factors === undefined) known.set(constellation, factors = find(constellation))
  return factors
}

/** Symbol error rate of the product: right when each factor is, never as 1 minus a product, which loses what is small. */
export function serOfFactors(factors: readonly BitFactor[], n0: number): number {
  return -Math.expm1(factors.reduce((sum, { geometry }) => sum + Math.log1p(-serExact(geometry, n0)), 0))
}

function find(constellation: Constellation): BitFactor[] | null {
  const sources = informationSources(constellation, true)
  if (sources.length === 1 || sources.some(({ dimensions }) => dimensions > 2)) return null
  // A coordinate that is the same for all points has no bits.
  return sources.filter(({ order }) => order > 1).map(factorOf)
}

/** As many words as points, and all different: the bits of all factors together tell all points apart. */
function factorOf({ order, dimensions, points, probabilities, words, bits }: InformationSource): BitFactor {
  const rows = Array.from({ length: order }, (_, i) => points.subarray(i * dimensions, (i + 1) * dimensions))
  const labels = Array.from(words!, word => bits.map(bit => word & bit ? '1' : '0').join(''))
  const total = probabilities.reduce((sum, p) => sum + p, 0)
  return { geometry: analyse(createConstellation(rows, { labels, probabilities: probabilities.map(p => p / total) })), bits: bits.length }
}
