import { highOf, lowOf, mapEstimate, ModulationError, rateThresholdDb, valueOf } from '#shared/modulation'
import type { Estimate } from '#shared/modulation'
import type { TargetQuantity } from '#shared/schemas/requirements'
import type { CandidateValues, RequiredWay } from '#shared/schemas/values'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { errorRateOf, modelKey, modelOf } from './error-rates'
import type { ErrorKind, Required, RowModel } from './error-rates'
import { Lru } from './lru'
import { constellationOf, labelledGeometryOf, pointsKey } from './points'

export type RequiredValues = Pick<CandidateValues,
  'requiredBy' | 'requiredUnionEsN0Db' | 'requiredAllPairsEsN0Db' | 'requiredNearestEsN0Db' | 'boundPenaltyDb' | 'crossedMoreThanOnce' | 'errorFloor'>
  & { requiredEsN0Db: Estimate }

const byErrorRate = new Lru<RequiredValues>(1000)
const thresholds = new Lru<Estimate>(1000)

/** The ways to a target of each kind: what decides, the bounds and the approximation. */
const waysTo = {
  ser: { exact: 'serExact', union: 'serUnion', allPairs: 'serAllPairs', nearest: 'serNearest' },
  ber: { exact: 'berExact', union: null, allPairs: 'berAllPairs', nearest: 'berNearest' },
} as const satisfies Record<TargetQuantity, Record<string, ErrorKind | null>>

/** Required Es/N0 by one way; null where the row has no such way, or it misses the target everywhere or meets it everywhere. */
function otherWay(model: RowModel, kind: ErrorKind | null, target: number): number | null {
  try {
    const found = kind && errorRateOf(model, kind)?.required(target)
    return found ? valueOf(found.esN0Db) : null
  } catch (error) {
    if (error instanceof ModulationError) return null
    throw error
  }
}

/** What decides: the exact error rate, or the union bound where nothing better is known. */
function deciding(model: RowModel, quantity: TargetQuantity, target: number): Required & { by: RequiredWay } {
  const kind = waysTo[quantity].exact
  const exact = errorRateOf(model, kind)
  if (exact) return { ...exact.required(target), by: kind }
  const bound = errorRateOf(model, 'serUnion')
  if (!bound || quantity === 'ber') throw new ModulationError('This row has no exact error rate of the target\'s kind: use another basis.', ['basis'])
  return { ...bound.required(target), by: 'serUnion' }
}

/** Required Es/N0 of a row's decisions by each way. */
function requiredByErrorRate(model: RowModel, { quantity, value }: CanonicalInputs['study']['target']): RequiredValues {
  return byErrorRate.get(`${modelKey(model)} ${quantity} ${value}`, () => {
    const { by, esN0Db, crossedMoreThanOnce, floor } = deciding(model, quantity, value)
    const { union, allPairs, nearest } = waysTo[quantity]
    const [byUnion, byAllPairs, byNearest] = [union, allPairs, nearest].map(kind => otherWay(model, kind, value)) as (number | null)[]
    const bound = quantity === 'ser' ? byUnion! : byAllPairs!
    return {
      requiredBy: by, requiredEsN0Db: esN0Db, crossedMoreThanOnce, errorFloor: floor,
      requiredUnionEsN0Db: byUnion!, requiredAllPairsEsN0Db: byAllPairs!, requiredNearestEsN0Db: byNearest!,
      boundPenaltyDb: bound === null || by === 'serUnion' ? null : mapEstimate(esN0Db, exact => bound - exact),
    }
  })
}

const without = { requiredUnionEsN0Db: null, requiredAllPairsEsN0Db: null, requiredNearestEsN0Db: null, boundPenaltyDb: null, crossedMoreThanOnce: false, errorFloor: null }

const greater = (a: Estimate, b: Estimate): Estimate => typeof a === 'number' && typeof b === 'number'
  ? Math.max(a, b)
  : { value: Math.max(valueOf(a), valueOf(b)), low: Math.max(lowOf(a), lowOf(b)), high: Math.max(highOf(a), highOf(b)) }

/** The SNR in dB at which an information rate of the row reaches its net bits per symbol. */
export function thresholdOf(points: RowModel['points'], kind: 'mutualInformation' | 'bitMetricRate', netBits: number): Estimate {
  return thresholds.get(`${pointsKey(points)} ${kind} ${netBits}`, () =>
    rateThresholdDb(kind === 'bitMetricRate' ? labelledGeometryOf(points).constellation : constellationOf(points), kind, netBits))
}

/**
 * Required Es/N0 of a row: as entered; or where its error rate meets the target; or its rate threshold with the decoder's gap, and
 * not below the SNR that a target before decoding asks for.
 * @param netBits R, bit per symbol
 * @see methods §4, §5
 */
export function requiredValues(inputs: CanonicalInputs, netBits: number): RequiredValues {
  const { requiredEsN0Db, threshold, study } = inputs
  const model = modelOf(inputs)
  if (requiredEsN0Db !== null || !model) return { ...without, requiredBy: 'entered', requiredEsN0Db: requiredEsN0Db! }
  if (!threshold) return requiredByErrorRate(model, study.target)
  const { kind, decoderGapDb, stage } = threshold
  const afterDecoding = mapEstimate(thresholdOf(model.points, kind, netBits), db => db + decoderGapDb)
  if (stage === 'afterDecoding') return { ...without, requiredBy: kind, requiredEsN0Db: afterDecoding }
  const before = requiredByErrorRate(model, study.target)
  const both = greater(afterDecoding, before.requiredEsN0Db)
  return valueOf(both) === valueOf(afterDecoding) ? { ...without, requiredBy: kind, requiredEsN0Db: both } : { ...before, requiredEsN0Db: both }
}
