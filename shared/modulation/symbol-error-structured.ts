import { createConstellation } from './constellation'
import type { Constellation } from './constellation'
import { analyse } from './geometry'
import { informationSources } from './information-source'
import type { InformationSource } from './information-source'
import { serExactCurve } from './symbol-error-exact'
import { biorthogonalError, simplexError } from './symbol-error-special'

type Rate = (n0: number) => number

/** Distances that agree to this part are equal: no error rate above 1e-30 differs by 1e-9 for it. */
const rounding = 1e-12

/** The rates of constellations that have been asked for; null where none is known. */
const known = new WeakMap<Constellation, Rate | null>()

/**
 * The exact symbol error rate of a set of more than two dimensions from its structure. Distances tell it, wherever the set lies and
 * whatever its scale.
 * @returns null where no exact rate is known
 * @see methods §2; Proakis, Digital Communications
 */
export function structuredErrorOf(constellation: Constellation): Rate | null {
  let rate = known.get(constellation)
  if (rate === undefined) known.set(constellation, rate = find(constellation))
  return rate
}

function find(constellation: Constellation): Rate | null {
  const factors = informationSources(constellation, false)
  if (factors.length === 1) return specialError(constellation)
  const rates = factors.map(factorError)
  if (!rates.every(rate => rate !== null)) return null
  // Right when each factor is: never as 1 minus a product, which loses what is small.
  return n0 => -Math.expm1(rates.reduce((sum, rate) => sum + Math.log1p(-rate(n0)), 0))
}

function factorError({ points, dimensions, order, probabilities }: InformationSource): Rate | null {
  const rows = Array.from({ length: order }, (_, i) => points.subarray(i * dimensions, (i + 1) * dimensions))
  // A factor of a single point is never in error: a constellation has at least two.
  if (order < 2) return () => 0
  const sum = probabilities.reduce((total, p) => total + p, 0)
  const constellation = createConstellation(rows, { probabilities: probabilities.map(p => p / sum) })
  if (dimensions > 2) return specialError(constellation)
  const geometry = analyse(constellation)
  return n0 => serExactCurve(geometry, [n0])[0]!
}

/** Points that are all equally far from each other, or all but each one's opposite. */
function specialError({ points, dimensions, order }: Constellation): Rate | null {
  // More points cannot be so; this also keeps large sets from being looked at.
  if (order > 2 * dimensions && order !== dimensions + 1) return null
  const rows = Array.from({ length: order }, (_, i) => Array.from({ length: order }, (_, j) => squareBetween(points, dimensions, i, j)).filter((_, j) => j !== i))
  const least = Math.min(...rows[0]!)
  const isEqual = (square: number, times: number) => Math.abs(square - times * least) <= rounding * least
  const distance = Math.sqrt(least)
  if (rows.every(row => row.every(square => isEqual(square, 1)))) return n0 => simplexError(order, distance, n0)
  const opposed = rows.every((row) => {
    const others = row.filter(square => !isEqual(square, 1))
    return others.length === 1 && isEqual(others[0]!, 2)
  })
  return opposed ? n0 => biorthogonalError(order, distance, n0) : null
}

function squareBetween(points: Float64Array, dimensions: number, i: number, j: number): number {
  let sum = 0
  for (let n = 0; n < dimensions; n++) sum += (points[i * dimensions + n]! - points[j * dimensions + n]!) ** 2
  return sum
}
