import { bracketedRoot } from './bracketed-root'
import { fromDecibels } from './decibels'
import { ModulationError } from './errors'
import type { Geometry } from './geometry'
import { serInsideWithPhaseError, serPhaseErrorFloor, serWithPhaseError } from './phase-error'
import { berPhaseErrorFloor, berWithPhaseError } from './phase-error-bits'
import { requiredSnr } from './required-snr'
import type { RequiredSnr } from './required-snr'

/** Range of the search, dB. */
const lowest = -30
const highest = 90
/** Step of the search between the two places that bound the crossings, dB; wider ranges take this many steps. */
const scanStep = 0.25
const scanSteps = 48
/** Room about the range, so that rounding does not push a crossing out of it, dB. */
const room = 0.01

/**
 * The smallest Es/N0 above which an error rate under a carrier phase error stays at or below a target, how often the curve crosses it, and
 * its floor. Errors that need noise, although the phase error alone would have led to none, fall with the SNR throughout. Below where they
 * alone are above the target so is the whole; above where they and the floor together meet it, so does the whole: the search is between.
 * @param geometry decision regions of minimum distance, from analyse, of two dimensions
 * @param sigmaRad r.m.s. phase error, radians, 0 or more
 * @param quantity symbol or bit error rate
 * @param target above 0 and below 1
 * @returns Es/N0 to 1e-9 dB, from −30 to 90
 * @throws ModulationError with path ['target'] when the curve misses the target at 90 dB or meets it from −30 dB on; else as berWithPhaseError
 * @see methods §4, §6
 */
export function requiredSnrWithPhaseError(geometry: Geometry, sigmaRad: number, quantity: 'ser' | 'ber', target: number): RequiredSnr {
  if (!(target > 0 && target < 1)) throw new ModulationError('A target error rate is above 0 and below 1.', ['target'])
  if (sigmaRad === 0) return requiredSnr({ geometry, kind: quantity === 'ser' ? 'serExact' : 'berExact' }, target)
  const { meanEnergy, bitsPerSymbol } = geometry.constellation
  const [rate, floorOf] = quantity === 'ser' ? [serWithPhaseError, serPhaseErrorFloor] : [berWithPhaseError, berPhaseErrorFloor]
  const floor = floorOf(geometry, sigmaRad)
  const n0 = (db: number) => meanEnergy / fromDecibels(db)
  const excess = (db: number) => Math.log(rate(geometry, n0(db), sigmaRad) / target)
  const inside = (limit: number) => insideMeets(db => serInsideWithPhaseError(geometry, n0(db), sigmaRad), limit)
  const end = Math.min(highest, inside(target - serPhaseErrorFloor(geometry, sigmaRad)) + room)
  // A symbol in error has up to k wrong bits.
  const begin = Math.max(lowest, inside(quantity === 'ser' ? target : target * bitsPerSymbol) - room)
  if (excess(end) > 0) {
    throw new ModulationError(
      `The error rate stays above this target up to 90 dB Es/N0: enter a larger target or a smaller phase error, which leaves ${floor.toExponential(2)}.`,
      ['target'])
  }
  const steps = Math.max(1, Math.min(scanSteps, Math.ceil((end - begin) / scanStep)))
  const places = Array.from({ length: steps + 1 }, (_, n) => begin + (end - begin) * n / steps)
  const met = places.map(db => excess(db) <= 0)
  const last = met.lastIndexOf(false)
  if (last < 0) throw new ModulationError('The error rate meets this target from −30 dB Es/N0 on: enter a smaller target.', ['target'])
  const crossings = met.filter((now, n) => n > 0 && now !== met[n - 1]).length
  return { esN0Db: bracketedRoot(excess, places[last]!, places[last + 1]!, NaN), crossings, floor: floor > 0 ? floor : null }
}

/** The SNR at which a rate that falls throughout has come down to a limit; an end of the range where it has not, or always is below. */
function insideMeets(rate: (db: number) => number, limit: number): number {
  if (!(limit > 0) || rate(highest) > limit) return highest
  return rate(lowest) <= limit ? lowest : bracketedRoot(db => Math.log(rate(db) / limit), lowest, highest, NaN)
}
