import { ModulationError, requireNoiseDensity } from './errors'
import { fadingOf } from './fading'
import type { Channel, Fading } from './fading'
import { fadedPiece } from './fading-edge'
import { FadedPairwise } from './fading-pairwise'
import type { Geometry } from './geometry'
import type { Row } from './geometry-pieces'
import { pairDistancesOf } from './pair-distances'
import type { PairDistances } from './pair-distances'
import { symbolErrorRates } from './symbol-error'
import type { SymbolErrorKind } from './symbol-error'
import { serExactCurve } from './symbol-error-exact'

/**
 * Mean symbol error rates of minimum-distance decisions over many noise densities on a fading channel: the bounds and the approximation
 * in any dimension, the exact rate in one or two.
 * @param geometry decision regions, from analyse
 * @param kind bound, approximation or exact
 * @param n0s noise densities N0 above 0, signal units squared; Es/N0 is the mean SNR of a branch
 * @param channel fading, or AWGN
 * @returns one for each of n0s, to 1e-9 relative; bounds may exceed 1
 * @throws ModulationError with path ['n0'], ['dimensions'] for the exact rate of more than two, or the field of the channel that is wrong
 * @see methods §6; Simon and Alouini, Digital Communication over Fading Channels, ch. 8
 */
export function serFadingCurve(geometry: Geometry, kind: SymbolErrorKind, n0s: ArrayLike<number>, channel: Channel): Float64Array {
  for (let s = 0; s < n0s.length; s++) requireNoiseDensity(n0s[s]!)
  if (channel.kind === 'awgn') {
    return kind === 'serExact' ? serExactCurve(geometry, n0s) : Float64Array.from(n0s, n0 => symbolErrorRates[kind](geometry, n0))
  }
  const fading = fadingOf(channel)
  const pairwise = new FadedPairwise(fading)
  switch (kind) {
    case 'serExact': return exact(geometry, n0s, fading, pairwise)
    case 'serNearest': return Float64Array.from(n0s, n0 => geometry.nearestMean * pairwise.at(geometry.minimumDistance ** 2 / (4 * n0)))
    case 'serUnion': return sumsOverPairs(neighboursOf(geometry), n0s, pairwise)
    case 'serAllPairs': return sumsOverPairs(pairDistancesOf(geometry.constellation), n0s, pairwise)
  }
}

/**
 * Mean symbol error rate at one noise density on a fading channel; as serFadingCurve.
 * @param n0 noise density N0 above 0, signal units squared
 */
export function serFading(geometry: Geometry, kind: SymbolErrorKind, n0: number, channel: Channel): number {
  return serFadingCurve(geometry, kind, [n0], channel)[0]!
}

/** Σ w·E Q(d/√(2·N0)) over pairs for each noise density. */
export function sumsOverPairs({ square, weight }: PairDistances, n0s: ArrayLike<number>, pairwise: FadedPairwise): Float64Array {
  return Float64Array.from(n0s, (n0) => {
    let sum = 0
    for (let n = 0; n < square.length; n++) sum += weight[n]! * pairwise.at(square[n]! / (4 * n0))
    return sum
  })
}

function neighboursOf({ distanceClasses: { distance, weight }, minimumDistance }: Geometry): PairDistances {
  return { least: minimumDistance ** 2, square: distance.map(d => d * d), weight }
}

/** Adds Σ w·(the averaged integral over a piece) for each noise density; no piece is too far away, as a fade may always be deep enough. */
export function addFadedPieces(sums: Float64Array, pieces: readonly Row[], n0s: ArrayLike<number>, fading: Fading, pairwise: FadedPairwise): void {
  for (const { h, a, b, weight } of pieces) {
    const half = a === 0 && b === Infinity
    for (let s = 0; s < sums.length; s++) {
      const n0 = n0s[s]!
      sums[s]! += weight * (half ? pairwise.at(h * h / n0) / 2 : fadedPiece(fading, h, a, b, n0))
    }
  }
}

function exact({ pieces }: Geometry, n0s: ArrayLike<number>, fading: Fading, pairwise: FadedPairwise) {
  if (!pieces) {
    throw new ModulationError('The exact symbol error rate with fading is offered for one and two dimensions: use the bound.', ['dimensions'])
  }
  const { h, a, b, weight } = pieces
  const sums = new Float64Array(n0s.length)
  addFadedPieces(sums, Array.from(h, (distance, n) => ({ h: distance, a: a[n]!, b: b[n]!, weight: weight[n]! })), n0s, fading, pairwise)
  return sums
}
