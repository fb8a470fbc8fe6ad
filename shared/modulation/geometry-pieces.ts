import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'
import type { Facets } from './geometry-facets'
import type { SpaceFacets } from './geometry-space'

/** Distances of relevant neighbours, rising, with what the pairs of each weigh: Σ (p_i + p_j). */
export interface DistanceClasses {
  distance: Float64Array
  weight: Float64Array
}

/**
 * Pieces of cell edges: from a to b (0 ≤ a < b ≤ ∞) on one side of the foot, on a line at distance h.
 * Sorted by the square of their least distance from the point, which rules how fast their error probability falls.
 */
export interface Pieces {
  h: Float64Array
  a: Float64Array
  b: Float64Array
  /** h² + a² */
  reach: Float64Array
  /** Σ (p_i + p_j) over the edges that share the piece */
  weight: Float64Array
  /** Σ of the weights from here to the end */
  remaining: Float64Array
}

/** Lengths that differ by less than this part of d_min are equal: it moves no error rate above 1e-30 by 1e-10. */
export const quantum = 1e-13

/** Congruence classes of cut edges. Both sides of a facet see it at the same distance, so that each is taken once with both probabilities. */
export function piecesOf(constellation: Constellation, facets: Facets): Pieces {
  const { distance, start, end } = facets
  const weights = weightsOf(constellation, facets)
  const rows: Row[] = []
  distance.forEach((d, f) => {
    const h = d / 2
    const weight = weights[f]!
    if (end[f]! <= 0) rows.push({ h, a: -end[f]!, b: -start[f]!, weight })
    else if (start[f]! >= 0) rows.push({ h, a: start[f]!, b: end[f]!, weight })
    else rows.push({ h, a: 0, b: end[f]!, weight }, { h, a: 0, b: -start[f]!, weight })
  })
  return packed(merged(rows, quantum * facets.minimumDistance))
}

/** A piece of an edge at distance h, from a to b along the line from the foot of the perpendicular. */
export interface Row { h: number, a: number, b: number, weight: number }

/** Classes of equal distances of relevant neighbours. */
export function distanceClassesOf(constellation: Constellation, facets: SpaceFacets): DistanceClasses {
  const weights = weightsOf(constellation, facets)
  const classes = merged(facets.distance.map((h, f) => ({ h, a: 0, b: 0, weight: weights[f]! })), quantum * facets.minimumDistance)
  return { distance: Float64Array.from(classes, row => row.h), weight: Float64Array.from(classes, row => row.weight) }
}

const weightsOf = (constellation: Constellation, { first, second }: SpaceFacets) =>
  first.map((i, f) => probabilityOf(constellation, i) + probabilityOf(constellation, second[f]!))

/** Rows whose three lengths agree to a step, together; in rising order of h, a and b. */
export function merged(rows: Row[], step: number): Row[] {
  const key = (length: number) => length === Infinity ? Infinity : Math.round(length / step)
  const h = Float64Array.from(rows, row => key(row.h))
  const a = Float64Array.from(rows, row => key(row.a))
  const b = Float64Array.from(rows, row => key(row.b))
  const sorted = Uint32Array.from(rows.keys()).sort((x, y) =>
    h[x]! - h[y]! || a[x]! - a[y]! || (b[x] === b[y] ? 0 : b[x]! - b[y]!))
  const result: Row[] = []
  sorted.forEach((m, n) => {
    const before = sorted[n - 1]
    if (before !== undefined && h[before] === h[m] && a[before] === a[m] && b[before] === b[m]) {
      result[result.length - 1]!.weight += rows[m]!.weight
    } else {
      result.push(rows[m]!)
    }
  })
  return result
}

function packed(rows: Row[]): Pieces {
  const reach = (row: Row) => row.h * row.h + row.a * row.a
  rows.sort((x, y) => reach(x) - reach(y))
  const remaining = new Float64Array(rows.length + 1)
  for (let n = rows.length - 1; n >= 0; n--) remaining[n] = remaining[n + 1]! + rows[n]!.weight
  return {
    h: Float64Array.from(rows, row => row.h),
    a: Float64Array.from(rows, row => row.a),
    b: Float64Array.from(rows, row => row.b),
    reach: Float64Array.from(rows, reach),
    weight: Float64Array.from(rows, row => row.weight),
    remaining,
  }
}
