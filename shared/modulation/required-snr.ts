import { fromDecibels } from './decibels'
import { ModulationError } from './errors'
import { qInverse } from './gaussian'
import type { Geometry } from './geometry'
import { symbolErrorRates } from './symbol-error'
import type { SymbolErrorKind } from './symbol-error'

/** An error rate to invert: one of the core's, or any function of N0 with the energy its SNR axis refers to. */
export type ErrorCurve
  = | { geometry: Geometry, kind: SymbolErrorKind }
    | {
    /** error rate at noise density N0 */
      rate: (n0: number) => number
      /** Es, signal units squared */
      meanEnergy: number
      /** whether the rate is known never to rise with the SNR; otherwise the axis is searched from above */
      monotone?: boolean
    }

/** Range of the search, dB. */
const lowest = -30
const highest = 90
/** Step of the search from above for curves that may rise again, dB. */
const scanStep = 0.25
/** Half of what the answer may be wrong by, dB. */
const tolerance = 2e-10

/**
 * The smallest Es/N0 above which an error rate stays at or below a target.
 * The logarithm of an error rate is nearly a straight line over the SNR itself (not in dB), so that secants there,
 * kept inside a bracket, need few steps.
 * @param curve what error rate
 * @param target above 0 and below 1
 * @returns Es/N0 in dB, to 1e-9 dB, from −30 to 90
 * @throws ModulationError with path ['target'] when the curve misses the target at 90 dB or meets it from −30 dB on
 * @see methods §4
 */
export function requiredEsN0Db(curve: ErrorCurve, target: number): number {
  if (!(target > 0 && target < 1)) throw new ModulationError('A target error rate is above 0 and below 1.', ['target'])
  const { rate, meanEnergy, monotone, guess } = described(curve, target)
  const excess = (db: number) => Math.log(rate(meanEnergy / fromDecibels(db)) / target)
  if (excess(highest) > 0) {
    throw new ModulationError('The error rate stays above this target up to 90 dB Es/N0: enter a larger target.', ['target'])
  }
  let low = lowest
  let high = highest
  if (!monotone) {
    low = highest - scanStep
    while (low > lowest && excess(low) <= 0) low -= scanStep
    high = low + scanStep
  }
  if (!(excess(low) > 0)) {
    throw new ModulationError('The error rate meets this target from −30 dB Es/N0 on: enter a smaller target.', ['target'])
  }
  return bracketed(excess, low, high, guess)
}

function described(curve: ErrorCurve, target: number) {
  if ('rate' in curve) return { ...curve, monotone: curve.monotone ?? false, guess: NaN }
  const { geometry, kind } = curve
  const { nearestMean, minimumDistance, constellation: { meanEnergy } } = geometry
  // Minimum-distance decisions: every term falls with the SNR. The approximation's own answer is close to all of them.
  const x = target < nearestMean / 2 ? qInverse(target / nearestMean) : 0.1
  const guess = 10 * Math.log10(2 * meanEnergy * x * x / (minimumDistance * minimumDistance))
  return { rate: (n0: number) => symbolErrorRates[kind](geometry, n0), meanEnergy, monotone: true, guess }
}

/** Root of a function that is positive at `low` and not at `high`. */
function bracketed(excess: (db: number) => number, low: number, high: number, guess: number): number {
  let db = guess > low && guess < high ? guess : (low + high) / 2
  let before: { snr: number, value: number } | null = null
  for (let step = 0; step < 200; step++) {
    const value = excess(db)
    if (value === 0) return db
    if (value > 0) low = db
    else high = db
    if (high - low <= tolerance) break
    const snr = fromDecibels(db)
    let following = NaN
    if (before && Number.isFinite(value)) {
      following = 10 * Math.log10(snr - value * (snr - before.snr) / (value - before.value))
    } else if (Number.isFinite(value)) {
      following = db + 1e-3 * Math.sign(value)
    }
    before = Number.isFinite(value) ? { snr, value } : null
    if (Math.abs(following - db) <= tolerance) return following
    db = following > low && following < high ? following : (low + high) / 2
  }
  return (low + high) / 2
}
