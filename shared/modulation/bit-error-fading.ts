import { bitErrorRates } from './bit-error'
import type { BitErrorKind } from './bit-error'
import { neighboursOf } from './bit-error-bounds'
import { berExactCurve, requireExactBits } from './bit-error-exact'
import { labelWords } from './bit-error-labels'
import { requireNoiseDensity } from './errors'
import { fadingOf } from './fading'
import type { Channel, Fading } from './fading'
import { FadedPairwise } from './fading-pairwise'
import { seenPieces } from './fading-seen-pieces'
import type { Geometry } from './geometry'
import type { Row } from './geometry-pieces'
import { pairDistancesOf } from './pair-distances'
import { addFadedPieces, sumsOverPairs } from './symbol-error-fading'

/** Pieces of the geometry asked for last, where they fit the memory: error rates are asked for at one N0 after another. */
let last: { geometry: Geometry, parts: Row[][] } | null = null

/**
 * Mean bit error rates of minimum-distance decisions over many noise densities on a fading channel: the bound over all pairs in any dimension,
 * the neighbour approximation, and the exact rate in one or two dimensions with any labels.
 * @param geometry decision regions, from analyse, of a constellation with labels
 * @param kind bound, approximation or exact
 * @param n0s noise densities N0 above 0, signal units squared; Es/N0 is the mean SNR of a branch
 * @param channel fading, or AWGN
 * @returns one for each of n0s, to 1e-8 relative; the bound may exceed 1
 * @throws ModulationError with path ['labels'] when there are none, ['n0'], ['dimensions'] for the exact rate of more than two, or the field of
 * the channel that is wrong
 * @see methods §3, §6; Simon and Alouini, Digital Communication over Fading Channels, ch. 8
 */
export function berFadingCurve(geometry: Geometry, kind: BitErrorKind, n0s: ArrayLike<number>, channel: Channel): Float64Array {
  for (let s = 0; s < n0s.length; s++) requireNoiseDensity(n0s[s]!)
  if (channel.kind === 'awgn') {
    return kind === 'berExact' ? berExactCurve(geometry, n0s) : Float64Array.from(n0s, n0 => bitErrorRates[kind](geometry, n0))
  }
  const fading = fadingOf(channel)
  const pairwise = new FadedPairwise(fading)
  const wrongBits = wrongBitsOf(geometry, kind, n0s, fading, pairwise)
  return wrongBits.map(sum => sum / geometry.constellation.bitsPerSymbol)
}

/**
 * Mean bit error rate at one noise density on a fading channel; as berFadingCurve.
 * @param n0 noise density N0 above 0, signal units squared
 */
export function berFading(geometry: Geometry, kind: BitErrorKind, n0: number, channel: Channel): number {
  return berFadingCurve(geometry, kind, [n0], channel)[0]!
}

function wrongBitsOf(geometry: Geometry, kind: BitErrorKind, n0s: ArrayLike<number>, fading: Fading, pairwise: FadedPairwise): Float64Array {
  const { constellation } = geometry
  switch (kind) {
    case 'berAllPairs': return sumsOverPairs(pairDistancesOf(constellation, labelWords(constellation)), n0s, pairwise)
    case 'berNearest': return sumsOverPairs(neighboursOf(geometry), n0s, pairwise)
    case 'berExact': return exact(geometry, n0s, fading, pairwise)
  }
}

function exact(geometry: Geometry, n0s: ArrayLike<number>, fading: Fading, pairwise: FadedPairwise): Float64Array {
  const words = requireExactBits(geometry)
  const sums = new Float64Array(n0s.length)
  const kept = last?.geometry === geometry ? last.parts : null
  const parts: Row[][] = []
  let count = 0
  for (const part of kept ?? seenPieces(geometry, words)) {
    addFadedPieces(sums, part, n0s, fading, pairwise)
    if (count++ === 0) parts.push(part)
  }
  if (!kept && count === 1) last = { geometry, parts }
  return sums
}
