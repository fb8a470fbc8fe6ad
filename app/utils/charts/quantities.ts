import type { BitErrorCurves, CandidateCurves, CurveQuantity, InformationCurves } from '#shared/schemas/values'
import type { LineKind } from '../pin-style'

/** The ends of a curve of which only intervals are known. */
export type Band = { low: readonly number[], high: readonly number[] }

/** Curves of one row in one quantity, by the kind of line that each is drawn as; empty where the row has no such curve. */
export type Curves = { esN0Db: readonly number[], bands: Partial<Record<LineKind, Band>> } & Readonly<Record<LineKind, readonly number[]>>

export type KindOfLine = { id: LineKind, title: string, short: string }

/** What the overlay can show. Heights are what is drawn: logarithms of error rates, information rates as they are. */
export type Quantity = {
  id: CurveQuantity
  /** on the axis and in front of numbers */
  title: string
  words: string
  unit: string | null
  /** in the order of lists and tables, the row's main curve first */
  kinds: readonly KindOfLine[]
  /** powers of ten on its axis */
  logarithmic: boolean
}

const errorKinds: readonly KindOfLine[] = [
  { id: 'exact', title: 'Exact', short: 'exact' },
  { id: 'union', title: 'Union bound', short: 'bound' },
  { id: 'nearest', title: 'Approximation', short: 'approximation' },
]
const rateKinds: readonly KindOfLine[] = [
  { id: 'exact', title: 'Mutual information', short: 'mutual information' },
  { id: 'union', title: 'Bit-metric rate', short: 'bit-metric rate' },
]

export const quantities: readonly Quantity[] = [
  { id: 'ser', title: 'SER', words: 'symbol error rate', unit: null, kinds: errorKinds, logarithmic: true },
  { id: 'ber', title: 'BER', words: 'bit error rate', unit: null, kinds: errorKinds, logarithmic: true },
  { id: 'rate', title: 'Rate', words: 'information rate', unit: 'bit/symbol', kinds: rateKinds, logarithmic: false },
]
export const quantityOf = (id: CurveQuantity): Quantity => quantities.find(quantity => quantity.id === id)!

/** Height of a value in the drawing; null where it has none, as the logarithm of 0. */
export function heightOf({ logarithmic }: Quantity, value: number): number | null {
  if (!logarithmic) return value
  return value > 0 ? Math.log10(value) : null
}

/** The value at a height of the drawing. */
export const valueAtHeight = ({ logarithmic }: Quantity, height: number): number => logarithmic ? 10 ** height : height

const bandOf = (low?: readonly number[], high?: readonly number[]): Band | undefined => low && high && { low, high }

/** An answer of the server as the overlay's lines. */
export function curvesOf(answer: CandidateCurves | BitErrorCurves | InformationCurves): Curves {
  const { esN0Db } = answer
  if ('serExact' in answer) {
    return { esN0Db, exact: answer.serExact, union: answer.serUnion, nearest: answer.serNearest, bands: { exact: bandOf(answer.serLow, answer.serHigh) } }
  }
  if ('berExact' in answer) return { esN0Db, exact: answer.berExact, union: answer.berAllPairs, nearest: answer.berNearest, bands: {} }
  return {
    esN0Db, exact: answer.mutualInformation, union: answer.bitMetricRate, nearest: [],
    bands: {
      exact: bandOf(answer.mutualInformationLow, answer.mutualInformationHigh),
      union: bandOf(answer.bitMetricRateLow, answer.bitMetricRateHigh),
    },
  }
}

/** Capacity of N real dimensions, bit per symbol (Shannon 1948). */
export const capacity = (dimensions: number, esN0Db: number): number =>
  dimensions / 2 * Math.log2(1 + 2 * 10 ** (esN0Db / 10) / dimensions)
