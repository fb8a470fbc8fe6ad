import { bitErrorRates } from './bit-error'
import type { BitErrorKind } from './bit-error'
import { berExactCurve } from './bit-error-exact'
import type { Estimate } from './estimate'
import type { Geometry } from './geometry'
import { ratesOf } from './information'
import type { InformationRateKind } from './information'
import { symbolErrorRates } from './symbol-error'
import type { SymbolErrorKind } from './symbol-error'
import { symbolErrorRateCurve } from './symbol-error-estimate'

/** Curves by the names of the evaluation's quantities: a value for each noise density. */
export type EvaluationCurves = Record<Exclude<SymbolErrorKind, 'serExact'> | BitErrorKind, number[]> & Record<InformationRateKind | 'serExact', Estimate[]>
export type EvaluationQuantity = keyof EvaluationCurves

type CurveOf<Values> = (geometry: Geometry, n0s: readonly number[]) => Values

const rates = { ...symbolErrorRates, ...bitErrorRates }
const errorRate = (kind: SymbolErrorKind | BitErrorKind): CurveOf<number[]> => (geometry, n0s) => n0s.map(n0 => rates[kind](geometry, n0))
const informationRate = (kind: InformationRateKind): CurveOf<Estimate[]> => (geometry, n0s) => ratesOf(geometry.constellation, kind, n0s)

/** All that can be asked of a constellation as a function of the SNR. A new quantity is an entry here. */
export const evaluationCurves: { readonly [Q in EvaluationQuantity]: CurveOf<EvaluationCurves[Q]> } = {
  serUnion: errorRate('serUnion'),
  serAllPairs: errorRate('serAllPairs'),
  serNearest: errorRate('serNearest'),
  serExact: (geometry, n0s) => symbolErrorRateCurve(geometry, n0s),
  berAllPairs: errorRate('berAllPairs'),
  berNearest: errorRate('berNearest'),
  berExact: (geometry, n0s) => [...berExactCurve(geometry, n0s)],
  mutualInformation: informationRate('mutualInformation'),
  bitMetricRate: informationRate('bitMetricRate'),
}

/** Quantities that need labels. */
const labelled: ReadonlySet<EvaluationQuantity> = new Set([...Object.keys(bitErrorRates) as BitErrorKind[], 'bitMetricRate'])

/** Whether a quantity depends on the labels. */
export const needsLabels = (quantity: EvaluationQuantity): boolean => labelled.has(quantity)
