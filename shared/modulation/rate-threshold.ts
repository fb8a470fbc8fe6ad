import type { Constellation } from './constellation'
import { decibels, fromDecibels } from './decibels'
import { esN0ForCapacity } from './efficiency'
import { ModulationError } from './errors'
import type { Estimate } from './estimate'
import { highOf, isInterval, lowOf, valueOf } from './estimate'
import { ratesOf } from './information'
import type { InformationRateKind } from './information'
import type { InformationSimulation } from './information-simulated'

/** Range of the search, dB. */
const lowest = -30
const highest = 90
/** The search ends when its step or its bracket is shorter, dB. */
const tolerance = 1e-6
/** Either side of a simulated threshold, dB, from which the rate's slope is taken. */
const slopeSpan = 0.25
/** R this close to H, relative to it, is H: it was rounded. */
const rounding = 1e-12

/**
 * The SNR at which an information rate reaches the net bits per symbol: what an ideal code of that rate needs. Rates rise with the SNR.
 * The logarithm of what is lost, H − rate, is nearly a straight line over the SNR itself, so that secants there, kept inside a bracket,
 * need few steps; the capacity's own SNR bounds the answer from below.
 * @param kind mutual information, or bit-metric rate, which needs labels
 * @param netBits R, above 0 and below H, bit per symbol
 * @param simulation seed and effort, for sets that are no product of parts in 1 or 2 dimensions
 * @returns Es/N0 in dB to 1e-4 dB, from −30 to 90; an interval of 95 % where the rate is one
 * @throws ModulationError with path ['netBits'] when R is outside, as it is for an uncoded row, or the rate passes it outside of that range; with path
 * ['labels'] when the bit-metric rate lacks them
 * @see methods §5
 */
export function rateThresholdDb(
  constellation: Constellation, kind: InformationRateKind, netBits: number, simulation?: InformationSimulation,
): Estimate {
  const { entropy, meanEnergy, dimensions } = constellation
  if (!(netBits > 0)) throw new ModulationError('Net bits per symbol are a number above 0.', ['netBits'])
  if (netBits >= entropy * (1 - rounding)) {
    throw new ModulationError(
      'A rate threshold needs a code rate below 1: only without noise does a symbol carry all bits that the points hold.', ['netBits'])
  }
  const lost = (db: number, part: (estimate: Estimate) => number) =>
    Math.log((entropy - part(ratesOf(constellation, kind, [meanEnergy / fromDecibels(db)], simulation)[0]!)) / (entropy - netBits))
  const excess = (db: number) => lost(db, valueOf)
  const db = root(excess, ...bracket(excess, decibels(esN0ForCapacity(netBits, dimensions))))

  if (!isInterval(ratesOf(constellation, kind, [meanEnergy / fromDecibels(db)], simulation)[0]!)) return db
  const slope = (excess(db + slopeSpan) - excess(db - slopeSpan)) / (2 * slopeSpan)
  const within = (end: number) => Math.min(highest, Math.max(lowest, end))
  return { value: db, low: within(db - lost(db, highOf) / slope), high: within(db - lost(db, lowOf) / slope) }
}

/** Two SNR values in dB between which the excess falls through 0, from a lower bound on. */
function bracket(excess: (db: number) => number, bound: number): [number, number] {
  // A simulated rate may lie a little above what the bound allows.
  let low = Math.min(highest, Math.max(lowest, bound - 0.01))
  while (low > lowest && excess(low) <= 0) low = Math.max(lowest, low - 1)
  if (low === lowest && excess(low) <= 0) {
    throw new ModulationError('So few net bits per symbol are carried from −30 dB Es/N0 on: enter a larger code rate.', ['netBits'])
  }
  for (let step = 1; low < highest; step *= 2) {
    const high = Math.min(highest, low + step)
    if (excess(high) <= 0) return [low, high]
    low = high
  }
  throw new ModulationError('The rate stays below these net bits per symbol up to 90 dB Es/N0: enter a smaller code rate.', ['netBits'])
}

/** Root in dB of a function that falls through 0, by regula falsi over the SNR with Illinois' halving of an end that stays. */
function root(excess: (db: number) => number, low: number, high: number): number {
  let [atLow, atHigh] = [excess(low), excess(high)]
  let stayed = 0
  let before = Infinity
  for (let step = 0; step < 100 && high - low > tolerance; step++) {
    const [x, y] = [fromDecibels(low), fromDecibels(high)]
    const secant = decibels((x * atHigh - y * atLow) / (atHigh - atLow))
    // A rate that is H without rounding has no logarithm to go by.
    const db = secant > low && secant < high ? secant : (low + high) / 2
    const value = excess(db)
    if (value === 0 || Math.abs(db - before) < tolerance) return db
    before = db
    if (value > 0) {
      low = db
      atLow = value
      if (stayed > 0) atHigh /= 2
      stayed = 1
    } else {
      high = db
      atHigh = value
      if (stayed < 0) atLow /= 2
      stayed = -1
    }
  }
  return (low + high) / 2
}
