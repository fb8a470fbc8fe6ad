import { asymptoticEfficiencyDb, ModulationError, normalise, paprDb } from '#shared/modulation'
import { ebN0Db, epkN0Db, evmPercentAt, gapToCapacityDb, netBitsPerSymbol, ratesOf } from '#shared/modulation/efficiency'
import { verdict } from '#shared/modulation/verdict'
import type { Issue } from '#shared/schemas/common'
import type { CandidateCurves, CandidateValues } from '#shared/schemas/values'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { linkValues } from './link-values'
import { backOffOf, curvesOf, errorRatesAt, geometryOf, requiredOf } from './points'

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

/** An entered scheme counts as one symbol of two real dimensions, as on an I/Q carrier, at unit mean energy. */
const enteredDimensions = 2

function pointValues(points: Points): PointValues {
  const geometry = geometryOf(points)
  const { constellation, minimumDistance, nearestMean, relevantMean } = geometry
  const { order, dimensions, bitsPerSymbol } = constellation
  const { meanEnergy, peakEnergy } = normalise(constellation, points.normalisation)
  return {
    order, dimensions, bitsPerSymbol, meanEnergy, peakEnergy, paprDb: paprDb(constellation),
    minimumDistance: minimumDistance / Math.sqrt(constellation.meanEnergy),
    spacing: minimumDistance * Math.sqrt(meanEnergy / constellation.meanEnergy),
    nearestMean, relevantMean,
  }
}

function backOffValues({ backOff, constellation, rollOff }: CanonicalInputs): Pick<CandidateValues, 'backOffDb' | 'backOffErrorDb'> {
  if (backOff.by === 'entered' || !constellation) return { backOffDb: backOff.by === 'entered' ? backOff.db : 0, backOffErrorDb: null }
  if (backOff.by === 'papr') return { backOffDb: paprDb(geometryOf(constellation).constellation), backOffErrorDb: null }
  const { backOffDb, standardErrorDb } = backOffOf(constellation, rollOff, backOff.exceedance)
  return { backOffDb, backOffErrorDb: standardErrorDb }
}

type RequiredValues = Pick<CandidateValues,
  'requiredUnionEsN0Db' | 'requiredAllPairsEsN0Db' | 'requiredNearestEsN0Db' | 'boundPenaltyDb'> & { requiredEsN0Db: number }

function requiredValues({ constellation, requiredEsN0Db, study }: CanonicalInputs): RequiredValues {
  if (requiredEsN0Db !== null || !constellation) {
    return { requiredEsN0Db: requiredEsN0Db!, requiredUnionEsN0Db: null, requiredAllPairsEsN0Db: null, requiredNearestEsN0Db: null, boundPenaltyDb: null }
  }
  const { serExact, serUnion, serAllPairs, serNearest } = requiredOf(constellation, study.target.value)
  return {
    requiredEsN0Db: serExact, requiredUnionEsN0Db: serUnion, requiredAllPairsEsN0Db: serAllPairs, requiredNearestEsN0Db: serNearest,
    boundPenaltyDb: serUnion === null ? null : serUnion - serExact,
  }
}

function netBitsOf({ netBits, constellation, codeRate }: CanonicalInputs): number {
  if (netBits !== null || !constellation) return netBits!
  const { entropy, bitsPerSymbol } = geometryOf(constellation).constellation
  return netBitsPerSymbol(entropy, bitsPerSymbol, codeRate)
}

function compute(inputs: CanonicalInputs): CandidateValues {
  const { constellation, rollOff, implementationLossDb, study } = inputs
  const points = constellation ? pointValues(constellation) : noPoints
  const dimensions = points.dimensions ?? enteredDimensions
  const netBits = netBitsOf(inputs)
  const required = requiredValues(inputs)
  const { requiredEsN0Db } = required
  const backOff = backOffValues(inputs)
  const { overhead, dimensionsPerInterval, heldConstant } = study
  const { symbolRateHz, occupiedBandwidthHz, netBitRateBps: netBitRate, spectralEfficiency } = ratesOf(
    { heldConstant: heldConstant.kind, value: heldConstant.value }, { netBits, dimensions, rollOff, overhead, dimensionsPerInterval },
  )
  const link = linkValues(inputs, { requiredEsN0Db, backOffDb: backOff.backOffDb, symbolRateHz, meanEnergy: points.meanEnergy ?? 1 })
  const rates = constellation
    ? errorRatesAt(constellation, link.availableEsN0Db)
    : { serUnion: null, serAllPairs: null, serNearest: null, serExact: null }
  const judged = verdict({
    margin: link.marginDb, requiredMargin: link.requiredMarginDb, decidingCase: link.decidingCase,
    netBitRate: netBitRate / 1e6, occupiedBandwidth: occupiedBandwidthHz / 1e6, spectralEfficiency, papr: points.paprDb,
  }, study.mustHaves.map(mustHave => ({ ...mustHave, reason: '' })))
  return {
    ...points, netBits, ...required,
    asymptoticEfficiencyDb: constellation
      ? asymptoticEfficiencyDb(geometryOf(constellation).constellation, geometryOf(constellation).minimumDistance, netBits)
      : null,
    requiredEbN0Db: ebN0Db(requiredEsN0Db, netBits),
    requiredEpkN0Db: points.paprDb === null ? null : epkN0Db(requiredEsN0Db, points.paprDb),
    gapToCapacityDb: constellation ? gapToCapacityDb(requiredEsN0Db, netBits, dimensions) : null,
    evmPercent: constellation ? evmPercentAt(requiredEsN0Db, dimensions) : null,
    ...backOff, symbolRateHz, occupiedBandwidthHz, netBitRate, spectralEfficiency,
    ...link, availableEbN0Db: ebN0Db(link.availableEsN0Db, netBits),
    implementationLossDb, rollOff, ...rates,
    passes: judged.passes, verdict: judged.text, checks: judged.checks,
  }
}

/** Where the core's refusals belong in a row: the target is the study's. */
const pathOf = ([field, ...rest]: (string | number)[]) =>
  field === 'target' ? 'requirements.target.value' : [field ?? 'family', ...rest].join('.')

/**
 * Computed cells and curves of one row.
 * @param inputs canonical inputs
 * @returns errors instead of values when the core refuses them; the row keeps its inputs and shows why
 * @see methods §1, §2, §4, §6, §7
 */
export function evaluateCandidate(inputs: CanonicalInputs): Evaluated {
  try {
    const values = compute(inputs)
    return { values, curves: inputs.constellation ? curvesOf(inputs.constellation, inputs.range) : null, errors: [] }
  } catch (error) {
    if (!(error instanceof ModulationError)) throw error
    return { values: null, curves: null, errors: [{ path: pathOf(error.path), message: error.message }] }
  }
}
