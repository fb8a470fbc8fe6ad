import type { Geometry } from './geometry'
import { serAllPairs, serNearest, serUnionBound } from './symbol-error-bounds'
import { serExact } from './symbol-error-exact'

/** The ways to a symbol error rate, by the names of the evaluation's quantities. */
export const symbolErrorRates = {
  serUnion: serUnionBound,
  serAllPairs: (geometry: Geometry, n0: number) => serAllPairs(geometry.constellation, n0),
  serNearest,
  serExact,
} as const

export type SymbolErrorKind = keyof typeof symbolErrorRates
