import type { SpaceFacets } from './geometry-space'
import type { InformationSource } from './information-source'

type Pairs = SpaceFacets

/**
 * Relevant neighbours of a Cartesian product: points that differ in one factor alone, where they are neighbours.
 * @param points M·N coordinates
 * @param factors the sets that the points are all combinations of, of consecutive coordinates
 * @param facetsOf relevant neighbours of one factor
 */
export function productFacets(points: Float64Array, factors: readonly InformationSource[], facetsOf: (factor: InformationSource) => Pairs): Pairs {
  const dimensions = factors.reduce((sum, factor) => sum + factor.dimensions, 0)
  const order = points.length / dimensions
  const result: Pairs = { minimumDistance: Infinity, first: [], second: [], distance: [] }
  const places = placesOf(points, dimensions, factors)
  const pointAt = new Int32Array(order)
  const strides = factors.map((_, f) => factors.slice(f + 1).reduce((product, { order }) => product * order, 1))
  const codes = Int32Array.from({ length: order }, (_, i) => places.reduce((sum, of, f) => sum + of[i]! * strides[f]!, 0))
  codes.forEach((code, i) => pointAt[code] = i)
  factors.forEach((factor, f) => {
    // All points have the same coordinates here: nobody to be mistaken for.
    if (factor.order === 1) return
    const facets = facetsOf(factor)
    result.minimumDistance = Math.min(result.minimumDistance, facets.minimumDistance)
    const behind = Array.from({ length: factor.order }, (): number[] => [])
    facets.first.forEach((a, n) => behind[a]!.push(n))
    for (let i = 0; i < order; i++) {
      const own = places[f]![i]!
      for (const n of behind[own]!) {
        result.first.push(i)
        result.second.push(pointAt[codes[i]! + (facets.second[n]! - own) * strides[f]!]!)
        result.distance.push(facets.distance[n]!)
      }
    }
  })
  return result
}

/** For each factor, which of its points each point of the product has. */
function placesOf(points: Float64Array, dimensions: number, factors: readonly InformationSource[]): Uint16Array[] {
  const order = points.length / dimensions
  let from = 0
  return factors.map((factor) => {
    const known = new Map(Array.from({ length: factor.order }, (_, k) => [factor.points.subarray(k * factor.dimensions, (k + 1) * factor.dimensions).join(), k]))
    const places = Uint16Array.from({ length: order }, (_, i) =>
      known.get(points.subarray(i * dimensions + from, i * dimensions + from + factor.dimensions).join())!)
    from += factor.dimensions
    return places
  })
}
