import { asymptoticEfficiencyDb, lowOf, mapEstimate, ModulationError, normalise, paprDb as paprOf, valueOf } from '#shared/modulation'
import type { Estimate, SymbolErrorKind } from '#shared/modulation'
import { ebN0Db, epkN0Db, evmPercentAt, gapToCapacityDb } from '#shared/modulation/efficiency'
import { verdict } from '#shared/modulation/verdict'
import type { Issue } from '#shared/schemas/common'
import type { CandidateCurves, CandidateValues } from '#shared/schemas/values'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { linkValues } from './link-values'
import { symbolErrorCurves } from './curves'
import { errorRateOf, modelOf } from './error-rates'
import { geometryOf, noiseDensityAt } from './points'
import { requiredValues, thresholdOf } from './required'
import type { RequiredValues } from './required'
import { rowPath } from './row-path'
import { settingOf } from './setting'
import type { Setting } from './setting'

/** What is stored of a row's computation; values and curves are null when it has errors. */
export interface Evaluated {
  values: CandidateValues | null
  curves: CandidateCurves | null
  errors: Issue[]
}

type Points = NonNullable<CanonicalInputs['constellation']>

/** Cells that follow from the points alone, and those that an entered scheme does not have. */
type PointValues = Pick<CandidateValues,
  'order' | 'dimensions' | 'bitsPerSymbol' | 'meanEnergy' | 'peakEnergy' | 'paprDb' | 'minimumDistance' | 'spacing'
  | 'nearestMean' | 'relevantMean'>

const noPoints: PointValues = {
  order: null, dimensions: null, bitsPerSymbol: null, meanEnergy: null, peakEnergy: null, paprDb: null, minimumDistance: null,
  spacing: null, nearestMean: null, relevantMean: null,
}

function pointValues(points: Points): PointValues {
  const geometry = geometryOf(points)
  const { constellation, minimumDistance, nearestMean, relevantMean } = geometry
  const { order, dimensions, bitsPerSymbol } = constellation
  const { meanEnergy, peakEnergy } = normalise(constellation, points.normalisation)
  return {
    order, dimensions, bitsPerSymbol, meanEnergy, peakEnergy, paprDb: paprOf(constellation),
    minimumDistance: minimumDistance / Math.sqrt(constellation.meanEnergy),
    spacing: minimumDistance * Math.sqrt(meanEnergy / constellation.meanEnergy),
    nearestMean, relevantMean,
  }
}

function compute(inputs: CanonicalInputs): CandidateValues {
  const { constellation, rollOff, implementationLossDb, study } = inputs
  const points = constellation ? pointValues(constellation) : noPoints
  const setting = settingOf(inputs)
  const { netBits, dimensions, backOff, rates: { symbolRateHz, occupiedBandwidthHz, netBitRateBps: netBitRate, spectralEfficiency } } = setting
  const required = requiredValues(inputs, netBits)
  const { requiredEsN0Db } = required
  const { paprDb } = points
  const link = linkValues(inputs, { requiredEsN0Db, backOffDb: backOff.backOffDb ?? 0, symbolRateHz, meanEnergy: setting.meanEnergy })
  const rates = errorRatesAt(inputs, link.availableEsN0Db)
  const judged = verdict({
    // At the unfavourable end of what is known.
    margin: lowOf(link.marginDb), requiredMargin: link.requiredMarginDb, decidingCase: link.decidingCase,
    netBitRate: netBitRate / 1e6, occupiedBandwidth: occupiedBandwidthHz / 1e6, spectralEfficiency, papr: paprDb,
  }, study.mustHaves.map(mustHave => ({ ...mustHave, reason: '' })))
  return {
    ...points, netBits, ...required,
    asymptoticEfficiencyDb: constellation
      ? asymptoticEfficiencyDb(geometryOf(constellation).constellation, geometryOf(constellation).minimumDistance, netBits)
      : null,
    requiredEbN0Db: mapEstimate(requiredEsN0Db, db => ebN0Db(db, netBits)),
    requiredEpkN0Db: paprDb === null ? null : mapEstimate(requiredEsN0Db, db => epkN0Db(db, paprDb)),
    gapToCapacityDb: gapToCapacityOf(inputs, required, setting),
    evmPercent: constellation ? mapEstimate(requiredEsN0Db, db => evmPercentAt(db, dimensions)) : null,
    ...backOff, symbolRateHz, occupiedBandwidthHz, netBitRate, spectralEfficiency,
    ...link, availableEbN0Db: ebN0Db(link.availableEsN0Db, netBits),
    implementationLossDb, rollOff, ...rates,
    passes: judged.passes, verdict: judged.text, checks: judged.checks,
  }
}

/**
 * Gap to capacity in dB of the required Es/N0; where a rate threshold decides, of the threshold alone, as the decoder's gap is not the
 * points' own. Null without points, and over fading, whose capacity is another.
 */
function gapToCapacityOf({ constellation, channel, threshold }: CanonicalInputs, { requiredBy, requiredEsN0Db }: RequiredValues, { netBits, dimensions }: Setting) {
  if (!constellation || channel) return null
  const own = threshold?.kind === requiredBy ? thresholdOf(constellation, threshold.kind, netBits) : requiredEsN0Db
  return mapEstimate(own, db => gapToCapacityDb(db, netBits, dimensions))
}

/** SER at the available Es/N0 by each way; null where the row has no such way. */
function errorRatesAt(inputs: CanonicalInputs, esN0Db: number): Pick<CandidateValues, 'serUnion' | 'serAllPairs' | 'serNearest' | 'serExact'> {
  const model = modelOf(inputs)
  if (!model) return { serUnion: null, serAllPairs: null, serNearest: null, serExact: null }
  const n0 = noiseDensityAt(geometryOf(model.points).constellation, esN0Db)
  const at = (kind: SymbolErrorKind) => errorRateOf(model, kind)?.rates([n0])[0] ?? null
  const plain = (estimate: Estimate | null) => estimate === null ? null : valueOf(estimate)
  return { serUnion: plain(at('serUnion')), serAllPairs: plain(at('serAllPairs')), serNearest: plain(at('serNearest')), serExact: at('serExact') }
}

/**
 * Computed cells and curves of one row.
 * @param inputs canonical inputs
 * @returns errors instead of values when the core refuses them; the row keeps its inputs and shows why
 * @see methods §1, §2, §4, §6, §7
 */
export function evaluateCandidate(inputs: CanonicalInputs): Evaluated {
  try {
    const values = compute(inputs)
    const model = modelOf(inputs)
    return { values, curves: model && symbolErrorCurves(model, inputs.range), errors: [] }
  } catch (error) {
    if (!(error instanceof ModulationError)) throw error
    return { values: null, curves: null, errors: [{ path: rowPath(error.path), message: error.message }] }
  }
}
