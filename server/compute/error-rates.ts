import { berExactCurve, bitErrorRates, requiredEsN0Db, serExactCurve } from '#shared/modulation'
import { symbolErrorRates } from '#shared/modulation/symbol-error'
import type { BitErrorKind, Estimate, Geometry, SymbolErrorKind } from '#shared/modulation'
import type { CanonicalInputs, CanonicalPoints } from '#shared/study/canonical-inputs'
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

const once = (esN0Db: Estimate): Required => ({ esN0Db, crossedMoreThanOnce: false, floor: null })

/** White Gaussian noise alone, decisions by minimum distance. */
function plainRate(geometry: Geometry, kind: ErrorKind): ErrorRate {
  if (isBitError(kind)) {
    const rate = bitErrorRates[kind]
    return {
      rates: n0s => kind === 'berExact' ? [...berExactCurve(geometry, n0s)] : n0s.map(n0 => rate(geometry, n0)),
      required: target => once(requiredEsN0Db({ rate: n0 => rate(geometry, n0), meanEnergy: geometry.constellation.meanEnergy }, target)),
    }
  }
  return {
    rates: n0s => kind === 'serExact' ? [...serExactCurve(geometry, n0s)] : n0s.map(n0 => symbolErrorRates[kind](geometry, n0)),
    required: target => once(requiredEsN0Db({ geometry, kind }, target)),
  }
}

/** An error rate of a row by one way; null where that way does not exist for its decisions and its channel. */
export function errorRateOf(model: RowModel, kind: ErrorKind): ErrorRate | null {
  const geometry = isBitError(kind) ? labelledGeometryOf(model.points) : geometryOf(model.points)
  return plainRate(geometry, kind)
}
