import { bisectLeft } from 'd3'
import type { CandidateCurves } from '#shared/schemas/values'
import type { LineKind } from '../pin-style'

export type CurveField = 'serExact' | 'serUnion' | 'serNearest'

/** The three ways to get an error rate, in the order of lists and tables. */
export const lineKinds: readonly { id: LineKind, title: string, short: string, field: CurveField }[] = [
  { id: 'exact', title: 'Exact', short: 'exact', field: 'serExact' },
  { id: 'union', title: 'Union bound', short: 'bound', field: 'serUnion' },
  { id: 'nearest', title: 'Approximation', short: 'approximation', field: 'serNearest' },
]

/** A pinned row with curves, as the overlay draws it. */
export type CurveRow = {
  id: string
  name: string
  /** 1 to 12 */
  slot: number
  curves: CandidateCurves
  /** dB from Es/N0 to the axis drawn */
  shiftDb: number
  /** on the axis drawn, of the case that decides */
  availableDb: number
  decidingCase: string | null
  /** the row has changed since these curves were computed */
  stale: boolean
}

/** Place in a drawing or on its axes. */
export type Place = readonly [x: number, y: number]

const ratio = (db: number) => 10 ** (db / 10)

/**
 * Error rate between two computed points, as its common logarithm. The logarithm is taken as linear in the SNR as a
 * ratio, not in dB: a tail of Q is very nearly so, which keeps 1 dB steps within 0.5 % of the curve.
 * @param esN0Db within the row's SNR range
 * @returns null outside the range, and where the rate is too small for a number
 */
export function logRateAt(curves: CandidateCurves, field: CurveField, esN0Db: number): number | null {
  const { esN0Db: places, [field]: rates } = curves
  const after = bisectLeft(places, esN0Db)
  const high = rates[after]
  if (high === undefined) return null
  if (places[after] === esN0Db) return high > 0 ? Math.log10(high) : null
  const low = rates[after - 1]
  if (low === undefined || !(low > 0) || !(high > 0)) return null
  const from = ratio(places[after - 1]!)
  const share = (ratio(esN0Db) - from) / (ratio(places[after]!) - from)
  return Math.log10(low) + share * (Math.log10(high) - Math.log10(low))
}

/**
 * SNR at which a curve falls to a rate: the inverse of logRateAt.
 * @param logRate common logarithm of the rate
 * @returns Es/N0 in dB, null when the curve does not fall through that rate
 */
export function esN0AtLogRate(curves: CandidateCurves, field: CurveField, logRate: number): number | null {
  const { esN0Db: places, [field]: rates } = curves
  for (let i = 1; i < places.length; i++) {
    const above = Math.log10(rates[i - 1]!)
    const below = Math.log10(rates[i]!)
    if (!Number.isFinite(above) || !Number.isFinite(below) || above < logRate || below > logRate || above === below) continue
    const from = ratio(places[i - 1]!)
    return 10 * Math.log10(from + (ratio(places[i]!) - from) * (above - logRate) / (above - below))
  }
  return null
}

/** Steps between drawn points, in dB: short enough for the eye to see a smooth line. */
const drawnStep = 0.2

/**
 * One line of a row on the axes drawn: SNR in dB and common logarithm of the rate, with points between the computed
 * ones. Ends where the rate is too small for a number.
 */
export function lineOf({ curves, shiftDb }: Pick<CurveRow, 'curves' | 'shiftDb'>, field: CurveField): Place[] {
  const places = curves.esN0Db
  const line: Place[] = []
  for (let i = 0; i < places.length; i++) {
    const steps = i === 0 ? 1 : Math.min(20, Math.max(1, Math.round((places[i]! - places[i - 1]!) / drawnStep)))
    for (let n = 1; n <= steps; n++) {
      const esN0Db = n === steps ? places[i]! : places[i - 1]! + (places[i]! - places[i - 1]!) * n / steps
      const logRate = logRateAt(curves, field, esN0Db)
      if (logRate === null) return line
      line.push([esN0Db + shiftDb, logRate])
    }
  }
  return line
}
