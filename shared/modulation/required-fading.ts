import { berFadingCurve } from './bit-error-fading'
import type { BitErrorKind } from './bit-error'
import type { Channel } from './fading'
import type { Geometry } from './geometry'
import { requiredOfBits, requiredSnr } from './required-snr'
import type { RequiredSnr } from './required-snr'
import type { SymbolErrorKind } from './symbol-error'
import { serFading, serFadingCurve } from './symbol-error-fading'

/**
 * The smallest mean Es/N0 of a branch above which an error rate on a fading channel stays at or below a target; as requiredSnr.
 * @param geometry decision regions, from analyse
 * @param kind which error rate; the exact bit error rate is looked for between the symbol error rate and its k-th part, as it may rise
 * @param target above 0 and below 1
 * @param channel fading, or AWGN
 * @throws ModulationError with path ['target'] when the curve misses the target at 90 dB or meets it from −30 dB on, and for all that serFadingCurve
 * and berFadingCurve refuse
 * @see methods §4, §6
 */
export function requiredFadingSnr(geometry: Geometry, kind: SymbolErrorKind | BitErrorKind, target: number, channel: Channel): RequiredSnr {
  if (channel.kind === 'awgn') return requiredSnr({ geometry, kind }, target)
  const { constellation, constellation: { meanEnergy } } = geometry
  const curveOf = (rate: (n0: number) => number) => ({ rate, meanEnergy, monotone: true })
  switch (kind) {
    case 'berExact': {
      const symbolRate = (n0: number) => serFading(geometry, 'serExact', n0, channel)
      return requiredOfBits(constellation, { symbols: curveOf(symbolRate), symbolRate, bitRates: n0s => berFadingCurve(geometry, kind, n0s, channel) }, target)
    }
    case 'berNearest':
    case 'berAllPairs': return requiredSnr(curveOf(n0 => berFadingCurve(geometry, kind, [n0], channel)[0]!), target)
    default: return requiredSnr(curveOf(n0 => serFadingCurve(geometry, kind, [n0], channel)[0]!), target)
  }
}
