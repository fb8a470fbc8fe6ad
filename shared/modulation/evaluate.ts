import { bitErrorRates } from './bit-error'
import type { Constellation } from './constellation'
import { paprDb } from './constellation'
import { fromDecibels } from './decibels'
import { ModulationError } from './errors'
import type { Estimate } from './estimate'
import { evaluationCurves, needsLabels } from './evaluation-curves'
import type { EvaluationCurves, EvaluationQuantity } from './evaluation-curves'
import { familyOf, generate } from './families'
import type { FamilyParameters } from './families'
import { analyse } from './geometry'
import type { Geometry } from './geometry'
import { informationRates } from './information'
import type { InformationRateKind } from './information'
import { familyLabels } from './labels'
import { rateThresholdDb } from './rate-threshold'
import { requiredEsN0Db } from './required-snr'
import { symbolErrorRates } from './symbol-error'
import type { SymbolErrorKind } from './symbol-error'
import { requiredEsN0Estimate } from './symbol-error-estimate'

export const evaluationQuantities = Object.keys(evaluationCurves) as EvaluationQuantity[]

/** What to compute of one constellation, without a study around it. */
export interface EvaluationRequest {
  /**
   * a family with its parameters (unit mean energy), or family 'custom' with points, taken as given; without labels those of the family
   * count, where a quantity needs some
   */
  constellation: FamilyParameters & { family: string, labels?: string[] | null, probabilities?: number[] | null }
  /** SNR values, dB */
  esN0Db: readonly number[]
  /** a symbol error rate ('ser'), a bit error rate ('ber') or an information rate in bit per symbol ('rate'); left out: no required Es/N0 */
  target?: { quantity: string, value: number } | null
  /** left out: union bound, nearest-neighbour approximation and exact SER */
  quantities?: readonly string[] | null
}

/** The answer of POST /api/evaluate. */
export interface Evaluation {
  order: number
  dimensions: number
  bitsPerSymbol: number
  meanEnergy: number
  peakEnergy: number
  paprDb: number
  minimumDistance: number
  neighbours: { relevantMean: number, nearestMean: number, relevant: number[][] }
  curves: { esN0Db: number[] } & Partial<EvaluationCurves>
  /** of the quantities of the target's kind */
  requiredEsN0Db?: Partial<Record<EvaluationQuantity, Estimate>>
}

const targetRates = { ser: symbolErrorRates, ber: bitErrorRates, rate: informationRates }
const defaultQuantities: SymbolErrorKind[] = ['serUnion', 'serNearest', 'serExact']

/**
 * Evaluates a constellation: geometry, curves of error and information rates, and required Es/N0.
 * @throws ModulationError for every input that is not allowed, with its path in the request
 */
export function evaluate(request: EvaluationRequest): Evaluation {
  const quantities = checkedQuantities(request.quantities ?? defaultQuantities)
  request.esN0Db.forEach((db, n) => {
    if (!(Math.abs(db) <= 300)) throw new ModulationError('An Es/N0 value is from −300 to 300 dB.', ['esN0Db', n])
  })
  const { target } = request
  const targeted = target ? targetedKinds(target.quantity, quantities) : []
  const constellation = within(path => ['constellation', ...path], () => requestedConstellation(request.constellation, quantities.some(needsLabels)))
  const geometry = within(() => ['constellation', 'points'], () => analyse(constellation))
  const n0s = request.esN0Db.map(db => constellation.meanEnergy / fromDecibels(db))

  const curves: Evaluation['curves'] = { esN0Db: [...request.esN0Db] }
  const required: Partial<Record<EvaluationQuantity, Estimate>> = {}
  quantities.forEach((quantity, n) => {
    within(path => path[0] === 'dimensions' ? ['quantities', n] : ['constellation', ...path], () => addCurve(curves, quantity, geometry, n0s))
  })
  for (const kind of targeted) {
    required[kind] = within(() => ['target', 'value'], () => requiredFor(geometry, kind, target!.value))
  }
  const { offsets, neighbours, relevantMean, nearestMean, minimumDistance } = geometry
  const { order, dimensions, bitsPerSymbol, meanEnergy, peakEnergy } = constellation
  return {
    order, dimensions, bitsPerSymbol, meanEnergy, peakEnergy, paprDb: paprDb(constellation), minimumDistance,
    neighbours: {
      relevantMean, nearestMean,
      relevant: Array.from({ length: order }, (_, i) => [...neighbours.subarray(offsets[i], offsets[i + 1])]),
    },
    curves,
    ...(target ? { requiredEsN0Db: required } : {}),
  }
}

function addCurve<Q extends EvaluationQuantity>(curves: Partial<EvaluationCurves>, quantity: Q, geometry: Geometry, n0s: readonly number[]): void {
  curves[quantity] = evaluationCurves[quantity](geometry, n0s)
}

const isInformationRate = (quantity: EvaluationQuantity): quantity is InformationRateKind => quantity in informationRates

function requiredFor(geometry: Geometry, quantity: EvaluationQuantity, value: number): Estimate {
  if (isInformationRate(quantity)) return rateThresholdDb(geometry.constellation, quantity, value)
  return quantity === 'serExact' ? requiredEsN0Estimate(geometry, value) : requiredEsN0Db({ geometry, kind: quantity }, value)
}

const isTarget = (quantity: string): quantity is keyof typeof targetRates => quantity in targetRates

/** The quantities that the target speaks of. */
function targetedKinds(targetQuantity: string, quantities: readonly EvaluationQuantity[]): EvaluationQuantity[] {
  if (!isTarget(targetQuantity)) {
    throw new ModulationError('The target is a symbol error rate (ser), a bit error rate (ber) or an information rate (rate).', ['target', 'quantity'])
  }
  const kinds = quantities.filter(quantity => quantity in targetRates[targetQuantity])
  if (targetQuantity !== 'ser' && kinds.length === 0) {
    const named = { ber: 'A bit error rate', rate: 'An information rate' }[targetQuantity]
    throw new ModulationError(`${named} as target needs one among the quantities: ${Object.keys(targetRates[targetQuantity]).join(', ')}.`, ['target', 'quantity'])
  }
  return kinds
}

function checkedQuantities(quantities: readonly string[]): EvaluationQuantity[] {
  return quantities.map((quantity, n) => {
    const known = evaluationQuantities.find(kind => kind === quantity)
    if (!known) throw new ModulationError(`A quantity is one of ${evaluationQuantities.join(', ')}.`, ['quantities', n])
    return known
  })
}

function requestedConstellation({ family, labels, probabilities, ...parameters }: EvaluationRequest['constellation'], labelled: boolean): Constellation {
  const { id } = familyOf(family)
  return generate(id, parameters, { labels: labels ?? (labelled ? familyLabels(id, parameters) : null), probabilities })
}

/** Runs a part of the work; a refusal's path becomes one of the request. */
function within<T>(place: (path: (string | number)[]) => (string | number)[], compute: () => T): T {
  try {
    return compute()
  } catch (error) {
    if (error instanceof ModulationError) throw new ModulationError(error.message, place(error.path))
    throw error
  }
}
