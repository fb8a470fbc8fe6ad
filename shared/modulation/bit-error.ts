import { berAllPairs, berNearest } from './bit-error-bounds'
import { berExact } from './bit-error-exact'
import type { Geometry } from './geometry'

/** The ways to a bit error rate, by the names of the evaluation's quantities. */
export const bitErrorRates = {
  berAllPairs: (geometry: Geometry, n0: number) => berAllPairs(geometry.constellation, n0),
  berNearest,
  berExact,
} as const

export type BitErrorKind = keyof typeof bitErrorRates
