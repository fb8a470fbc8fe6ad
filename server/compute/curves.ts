import { highOf, isInterval, lowOf, rateCurves, valueOf } from '#shared/modulation'
import type { Estimate } from '#shared/modulation'
import type { BitErrorCurves, CandidateCurves, InformationCurves } from '#shared/schemas/values'
import { snrGrid } from '#shared/study/snr-grid'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { errorRateOf, modelKey } from './error-rates'
import type { ErrorKind, RowModel } from './error-rates'
import { Lru } from './lru'
import { geometryOf, labelledGeometryOf, noiseDensityAt } from './points'

type Range = CanonicalInputs['range']

const kept = new Lru<CandidateCurves>(200)

function axisOf({ points }: RowModel, { start, stop, step }: Range) {
  const esN0Db = snrGrid(start, stop, step)
  const { constellation } = geometryOf(points)
  return { esN0Db, n0s: esN0Db.map(db => noiseDensityAt(constellation, db)) }
}

const ratesOf = (model: RowModel, kind: ErrorKind, n0s: readonly number[]): Estimate[] => errorRateOf(model, kind)?.rates(n0s) ?? []

/** The ends of a curve's intervals; nothing where all of it is exact. */
const band = (curve: readonly Estimate[]) => curve.some(isInterval) ? { low: curve.map(lowOf), high: curve.map(highOf) } : null

/** SER of a row over its SNR range. */
export function symbolErrorCurves(model: RowModel, range: Range): CandidateCurves {
  return kept.get(`${modelKey(model)} ${JSON.stringify(range)}`, () => {
    const { esN0Db, n0s } = axisOf(model, range)
    const exact = ratesOf(model, 'serExact', n0s)
    const ends = band(exact)
    return {
      esN0Db,
      serUnion: ratesOf(model, 'serUnion', n0s).map(valueOf), serNearest: ratesOf(model, 'serNearest', n0s).map(valueOf), serExact: exact.map(valueOf),
      ...(ends && { serLow: ends.low, serHigh: ends.high }),
    }
  })
}

/** BER of a row over its SNR range. */
export function bitErrorCurves(model: RowModel, range: Range): BitErrorCurves {
  const { esN0Db, n0s } = axisOf(model, range)
  const [berExact, berAllPairs, berNearest] = (['berExact', 'berAllPairs', 'berNearest'] as const).map(kind => ratesOf(model, kind, n0s).map(valueOf))
  return { esN0Db, berAllPairs: berAllPairs!, berNearest: berNearest!, berExact: berExact! }
}

/** Information rates of a row over its SNR range, bit per symbol. */
export function informationCurves(model: RowModel, range: Range): InformationCurves {
  const { esN0Db, n0s } = axisOf(model, range)
  const { mutualInformation, bitMetricRate } = rateCurves(labelledGeometryOf(model.points).constellation, n0s)
  const [mutual, metric] = [band(mutualInformation), bitMetricRate && band(bitMetricRate)]
  return {
    esN0Db, mutualInformation: mutualInformation.map(valueOf), bitMetricRate: bitMetricRate?.map(valueOf) ?? [],
    ...(mutual && { mutualInformationLow: mutual.low, mutualInformationHigh: mutual.high }),
    ...(metric && { bitMetricRateLow: metric.low, bitMetricRateHigh: metric.high }),
  }
}
