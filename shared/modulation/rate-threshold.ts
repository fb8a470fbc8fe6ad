import type { Constellation } from './constellation'
import { decibels, fromDecibels } from './decibels'
import { esN0ForCapacity } from './efficiency'
import { ModulationError } from './errors'
import type { Estimate } from './estimate'
import { highOf, isInterval, lowOf, valueOf } from './estimate'
import { ratesOf } from './information'
import type { InformationRateKind } from './information'
import { defaultDraws } from './information-simulated'
import type { InformationSimulation } from './information-simulated'

/** Range of the search, dB. */
const lowest = -30
const highest = 90
/** The search ends when its step or its bracket is shorter, dB. */
const tolerance = 1e-5
/** Either side of a simulated threshold, dB, from which the rate's slope is taken. */
const slopeSpan = 0.25
/** A simulated threshold is found with so many times fewer draws, and then refined with all of them, until it moves by less, in dB. */
const fewer = 16
const moved = 1e-4
const refinements = 3
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
  const { order, entropy, meanEnergy, dimensions } = constellation
  if (!(netBits > 0)) throw new ModulationError('Net bits per symbol are a number above 0.', ['netBits'])
  if (netBits >= entropy * (1 - rounding)) {
    throw new ModulationError(
      'A rate threshold needs a code rate below 1: only without noise does a symbol carry all bits that the points hold.', ['netBits'])
  }
  const estimate = (db: number, how = simulation) => ratesOf(constellation, kind, [meanEnergy / fromDecibels(db)], how)[0]!
  const excess = (rate: number) => Math.log((entropy - rate) / (entropy - netBits))
  // Few draws find the place and the slope; where the rate is a number they do not matter.
  const few = { ...simulation, draws: Math.round((simulation?.draws ?? defaultDraws(order)) / fewer) }
  const roughly = (db: number) => excess(valueOf(estimate(db, few)))
  let db = root(roughly, bracket(roughly, decibels(esN0ForCapacity(netBits, dimensions))))
  let rate = estimate(db)
  if (!isInterval(rate)) return db

  const slope = (roughly(db + slopeSpan) - roughly(db - slopeSpan)) / (2 * slopeSpan)
  for (let step = 0; step < refinements && Math.abs(excess(valueOf(rate)) / slope) > moved; step++) {
    db -= excess(valueOf(rate)) / slope
    rate = estimate(db)
  }
  const at = (end: number) => Math.min(highest, Math.max(lowest, db - excess(end) / slope))
  return { value: at(valueOf(rate)), low: at(highOf(rate)), high: at(lowOf(rate)) }
}

/** Two SNR values in dB, with the excess at each, above 0 at the lower one alone. */
interface Bracket { low: number, atLow: number, high: number, atHigh: number }

/** A bracket from a lower bound on. */
function bracket(excess: (db: number) => number, bound: number): Bracket {
  // A simulated rate may lie a little above what the bound allows.
  let low = Math.min(highest, Math.max(lowest, bound - 0.01))
  let atLow = excess(low)
  while (low > lowest && atLow <= 0) atLow = excess(low = Math.max(lowest, low - 1))
  if (atLow <= 0) {
    throw new ModulationError('So few net bits per symbol are carried from −30 dB Es/N0 on: enter a larger code rate.', ['netBits'])
  }
  for (let step = 1; low < highest; step *= 2) {
    const high = Math.min(highest, low + step)
    const atHigh = excess(high)
    if (atHigh <= 0) return { low, atLow, high, atHigh }
    low = high
    atLow = atHigh
  }
  throw new ModulationError('The rate stays below these net bits per symbol up to 90 dB Es/N0: enter a smaller code rate.', ['netBits'])
}

/** Root in dB of a function that falls through 0, by regula falsi over the SNR with Illinois' halving of an end that stays. */
function root(excess: (db: number) => number, { low, atLow, high, atHigh }: Bracket): number {
  let stayed = 0
  let before = Infinity
  for (let step = 0; step < 100 && high - low > tolerance; step++) {
    const [x, y] = [fromDecibels(low), fromDecibels(high)]
    const secant = decibels((x * atHigh - y * atLow) / (atHigh - atLow))
    // A rate that is H without rounding has no logarithm to go by.
    const db = secant > low && secant < high ? secant : (low + high) / 2
    if (Math.abs(db - before) < tolerance) return db
    before = db
    const value = excess(db)
    if (value === 0) return db
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
