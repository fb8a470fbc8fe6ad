import { bracketedRoot } from './bracketed-root'
import { bitErrorRates } from './bit-error'
import type { BitErrorKind } from './bit-error'
import { berExactCurve } from './bit-error-exact'
import { bitFactorsOf, serOfFactors } from './bit-error-factors'
import type { Constellation } from './constellation'
import { fromDecibels } from './decibels'
import { ModulationError } from './errors'
import { qInverse } from './gaussian'
import type { Geometry } from './geometry'
import { symbolErrorRates } from './symbol-error'
import type { SymbolErrorKind } from './symbol-error'

/** An error rate to invert: one of the core's, or any function of N0 with the energy its SNR axis refers to. */
export type ErrorCurve
  = | { geometry: Geometry, kind: SymbolErrorKind | BitErrorKind }
    | GivenCurve

interface GivenCurve {
  /** error rate at noise density N0 */
  rate: (n0: number) => number
  /** Es, signal units squared */
  meanEnergy: number
  /** whether the rate is known never to rise with the SNR; otherwise the axis is searched from above */
  monotone?: boolean
}

/** What an error rate needs to meet a target. */
export interface RequiredSnr {
  /** the smallest Es/N0 above which the rate stays at or below the target, dB */
  esN0Db: number
  /** how often the curve crosses the target, up or down, as far as the steps of the search tell; 1 for a curve that falls throughout */
  crossings: number
  /** the rate that is left at the highest SNR, where the curve no longer falls; null without such a floor */
  floor: number | null
}

const rates = { ...symbolErrorRates, ...bitErrorRates }

/** Range of the search, dB. */
const lowest = -30
const highest = 90
/** Step of the search for curves that may rise again, dB; wider ranges of a bit error rate take this many steps. */
const scanStep = 0.25
const scanSteps = 24
/** Room about a range that bounds give, so that rounding does not push the crossing out of it, dB. */
const room = 0.01
/** A curve that falls by less than this factor over the last decibels has a floor. */
const flat = 1.01
const flatSpan = 6

/**
 * The smallest Es/N0 above which an error rate stays at or below a target; as requiredSnr.
 * @returns Es/N0 in dB, to 1e-9 dB, from −30 to 90
 */
export function requiredEsN0Db(curve: ErrorCurve, target: number): number {
  return solve(curve, target, false).esN0Db
}

/**
 * The smallest Es/N0 above which an error rate stays at or below a target, how often the curve crosses it, and its floor.
 * @param curve what error rate
 * @param target above 0 and below 1
 * @returns Es/N0 to 1e-9 dB, from −30 to 90
 * @throws ModulationError with path ['target'] when the curve misses the target at 90 dB or meets it from −30 dB on;
 * ['labels'] when a bit error rate is asked for without labels
 * @see methods §4
 */
export function requiredSnr(curve: ErrorCurve, target: number): RequiredSnr {
  return solve(curve, target, true)
}

function solve(curve: ErrorCurve, target: number, counted: boolean): RequiredSnr {
  requireTarget(target)
  if ('geometry' in curve && curve.kind === 'berExact') return solveExactBits(curve.geometry, target)
  const { rate, meanEnergy, monotone, guess } = described(curve, target)
  const excess = (db: number) => Math.log(rate(meanEnergy / fromDecibels(db)) / target)
  const floor = counted && !('geometry' in curve) ? floorOf(curve) : null
  if (excess(highest) > 0) throw missed('geometry' in curve ? null : floorOf(curve))
  if (monotone) {
    if (!(excess(lowest) > 0)) throw alwaysMet()
    return { esN0Db: bracketedRoot(excess, lowest, highest, guess), crossings: 1, floor }
  }
  let last = NaN
  let crossings = 0
  for (let db = highest - scanStep, met = true; db >= lowest && (counted || crossings === 0); db -= scanStep) {
    if ((excess(db) <= 0) === met) continue
    if (crossings === 0) last = db
    crossings++
    met = !met
  }
  if (crossings === 0) throw alwaysMet()
  return { esN0Db: bracketedRoot(excess, last, last + scanStep, NaN), crossings, floor }
}

function solveExactBits(geometry: Geometry, target: number): RequiredSnr {
  const { constellation } = geometry
  const bitRates = (n0s: number[]) => berExactCurve(geometry, n0s)
  // Refuses what has no exact rate before anything is searched.
  bitRates([])
  if (constellation.dimensions <= 2) {
    return requiredOfBits(constellation, { symbols: { geometry, kind: 'serExact' }, symbolRate: n0 => symbolErrorRates.serExact(geometry, n0), bitRates }, target)
  }
  const symbolRate = (n0: number) => serOfFactors(bitFactorsOf(constellation)!, n0)
  return requiredOfBits(constellation, { symbols: { rate: symbolRate, meanEnergy: constellation.meanEnergy, monotone: true }, symbolRate, bitRates }, target)
}

/** A bit error rate with the symbol error rate of the same decisions. */
export interface BitCurves {
  symbols: ErrorCurve
  symbolRate: (n0: number) => number
  bitRates: (n0s: number[]) => Float64Array
}

/**
 * A symbol in error has from one to k wrong bits: the exact bit error rate lies between 1/k of the symbol error rate and all of it, which
 * falls throughout. So it crosses the target only between the places where those two do, and there it may rise.
 */
export function requiredOfBits({ meanEnergy, bitsPerSymbol }: Constellation, { symbols, symbolRate, bitRates }: BitCurves, target: number): RequiredSnr {
  requireTarget(target)
  const rateAt = (db: number) => symbolRate(meanEnergy / fromDecibels(db))
  const bitRatesAt = (dbs: number[]) => bitRates(dbs.map(db => meanEnergy / fromDecibels(db)))
  const end = rateAt(highest) > target ? highest : rateAt(lowest) <= target ? lowest : requiredEsN0Db(symbols, target) + room
  const most = target * bitsPerSymbol
  const begin = most >= 1 || rateAt(lowest) <= most ? lowest : rateAt(highest) > most ? highest : requiredEsN0Db(symbols, most) - room
  const steps = Math.max(1, Math.min(scanSteps, Math.ceil((end - begin) / scanStep)))
  const places = Array.from({ length: steps + 1 }, (_, n) => begin + (end - begin) * n / steps)
  const met = [...bitRatesAt(places)].map(rate => rate <= target)
  if (!met[steps]) throw missed(null)
  const crossings = met.filter((now, n) => n > 0 && now !== met[n - 1]).length
  if (crossings === 0) throw alwaysMet()
  const last = met.lastIndexOf(false)
  const excess = (db: number) => Math.log(bitRatesAt([db])[0]! / target)
  return { esN0Db: bracketedRoot(excess, places[last]!, places[last + 1]!, NaN), crossings, floor: null }
}

function requireTarget(target: number): void {
  if (!(target > 0 && target < 1)) throw new ModulationError('A target error rate is above 0 and below 1.', ['target'])
}

function missed(floor: number | null): ModulationError {
  const left = floor === null ? '' : ` It has a floor at ${floor.toExponential(2)}.`
  return new ModulationError(`The error rate stays above this target up to 90 dB Es/N0: enter a larger target.${left}`, ['target'])
}

function alwaysMet(): ModulationError {
  return new ModulationError('The error rate meets this target from −30 dB Es/N0 on: enter a smaller target.', ['target'])
}

function floorOf({ rate, meanEnergy }: GivenCurve): number | null {
  const left = rate(meanEnergy / fromDecibels(highest))
  return left > 0 && rate(meanEnergy / fromDecibels(highest - flatSpan)) < flat * left ? left : null
}

function described(curve: ErrorCurve, target: number) {
  if ('rate' in curve) return { ...curve, monotone: curve.monotone ?? false, guess: NaN }
  const { geometry, kind } = curve
  const { nearestMean, minimumDistance, constellation: { meanEnergy } } = geometry
  // Minimum-distance decisions: every term falls with the SNR. The approximation's own answer is close to all of them.
  const x = target < nearestMean / 2 ? qInverse(target / nearestMean) : 0.1
  const guess = 10 * Math.log10(2 * meanEnergy * x * x / (minimumDistance * minimumDistance))
  return { rate: (n0: number) => rates[kind](geometry, n0), meanEnergy, monotone: true, guess }
}
