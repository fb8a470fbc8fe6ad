import {
  berExactCurve, berFadingCurve, berMap, berWithPhaseError, bitErrorRates, fromDecibels, requiredEsN0Estimate, requiredFadingSnr, requiredSnr, requiredSnrWithPhaseError, serFadingCurve, serMap, serMapUnion, serWithPhaseError, symbolErrorRateCurve,
} from '#shared/modulation'
import type { BitErrorKind, Channel, Constellation, Estimate, Geometry, RequiredSnr, SymbolErrorKind } from '#shared/modulation'
import { bitFactorsOf } from '#shared/modulation/bit-error-factors'
import { symbolErrorRates } from '#shared/modulation/symbol-error'
import type { CanonicalFading, CanonicalInputs, CanonicalPoints } from '#shared/study/canonical-inputs'
import { geometryOf, labelledGeometryOf, pointsKey } from './points'

export type ErrorKind = SymbolErrorKind | BitErrorKind

/** What an error rate depends on: the points, the decision, and what lies between. */
export type RowModel = Pick<CanonicalInputs, 'decision' | 'channel' | 'phaseErrorDeg'> & { points: CanonicalPoints }

/** The model of a row that has points. */
export const modelOf = ({ constellation, decision, channel, phaseErrorDeg }: CanonicalInputs): RowModel | null =>
  constellation && { points: constellation, decision, channel, phaseErrorDeg }

export const modelKey = ({ points, decision, channel, phaseErrorDeg }: RowModel) =>
  `${pointsKey(points)} ${JSON.stringify([decision, channel, phaseErrorDeg])}`

/** Where a required SNR lies, and what may surprise about its curve. */
export interface Required { esN0Db: Estimate, crossedMoreThanOnce: boolean, floor: number | null }

/** One way to an error rate of a row. */
export interface ErrorRate {
  /** at each noise density, signal units squared */
  rates: (n0s: readonly number[]) => Estimate[]
  /** @throws ModulationError with path ['target'] when no SNR meets the target, or every one does */
  required: (target: number) => Required
}

const isBitError = (kind: ErrorKind): kind is BitErrorKind => kind in bitErrorRates

const noted = ({ esN0Db, crossings, floor }: RequiredSnr): Required => ({ esN0Db, crossedMoreThanOnce: crossings > 1, floor })

const once = (esN0Db: Estimate): Required => ({ esN0Db, crossedMoreThanOnce: false, floor: null })

/** White Gaussian noise alone, decisions by minimum distance. */
function plainRate(geometry: Geometry, kind: ErrorKind): ErrorRate | null {
  const { constellation } = geometry
  if (kind === 'berExact' && constellation.dimensions > 2 && constellation.labels && !bitFactorsOf(constellation)) return null
  const required = (target: number) => noted(requiredSnr({ geometry, kind }, target))
  // Exact where a way to that is known, else the directional estimate between the two bounds.
  if (kind === 'serExact') return { rates: n0s => symbolErrorRateCurve(geometry, n0s), required: target => once(requiredEsN0Estimate(geometry, target)) }
  if (kind === 'berExact') return { rates: n0s => [...berExactCurve(geometry, n0s)], required }
  const rate = isBitError(kind) ? bitErrorRates[kind] : symbolErrorRates[kind]
  return { rates: n0s => n0s.map(n0 => rate(geometry, n0)), required }
}

/** Any function of N0. */
function givenRate({ meanEnergy }: Constellation, rate: (n0: number) => number, monotone: boolean): ErrorRate {
  return {
    rates: n0s => n0s.map(rate),
    required: target => noted(requiredSnr({ rate, meanEnergy, monotone }, target)),
  }
}

/** Maximum a posteriori decisions. */
function mapRate({ constellation }: Geometry, kind: ErrorKind): ErrorRate | null {
  switch (kind) {
    case 'serExact': return givenRate(constellation, n0 => serMap(constellation, n0), true)
    case 'berExact': return givenRate(constellation, n0 => berMap(constellation, n0), false)
    case 'serUnion': return givenRate(constellation, n0 => serMapUnion(constellation, n0), false)
    default: return null
  }
}

/** Fading with maximal-ratio combining; what is exact is so in one and two dimensions. */
function fadingRate(geometry: Geometry, kind: ErrorKind, fading: CanonicalFading): ErrorRate | null {
  const { constellation: { dimensions } } = geometry
  if (dimensions > 2 && (kind === 'serExact' || kind === 'berExact')) return null
  const channel: Channel = {
    kind: fading.kind, branches: fading.branches, m: fading.m, kFactor: fading.kDb === undefined ? undefined : fromDecibels(fading.kDb),
  }
  const curve = (n0s: readonly number[]) => isBitError(kind) ? berFadingCurve(geometry, kind, n0s, channel) : serFadingCurve(geometry, kind, n0s, channel)
  return {
    rates: n0s => [...curve(n0s)],
    required: target => noted(requiredFadingSnr(geometry, kind, target, channel)),
  }
}

/** A carrier phase error: the exact rates of two dimensions alone, as no bound is known of them. */
function phaseErrorRate(geometry: Geometry, kind: ErrorKind, degrees: number): ErrorRate | null {
  if (kind !== 'serExact' && kind !== 'berExact') return null
  const sigma = degrees * Math.PI / 180
  const rate = kind === 'berExact' ? berWithPhaseError : serWithPhaseError
  return {
    rates: n0s => n0s.map(n0 => rate(geometry, n0, sigma)),
    required: target => noted(requiredSnrWithPhaseError(geometry, sigma, kind === 'berExact' ? 'ber' : 'ser', target)),
  }
}

/** An error rate of a row by one way; null where that way does not exist for its decisions and its channel. */
export function errorRateOf(model: RowModel, kind: ErrorKind): ErrorRate | null {
  const geometry = isBitError(kind) ? labelledGeometryOf(model.points) : geometryOf(model.points)
  if (model.channel) return fadingRate(geometry, kind, model.channel)
  if (model.phaseErrorDeg) return phaseErrorRate(geometry, kind, model.phaseErrorDeg)
  if (model.decision === 'map') return mapRate(geometry, kind)
  return plainRate(geometry, kind)
}
