import type { SpaceFacets } from './geometry-space'

/** Facets of all decision cells, each once, before they are gathered by point: list entry f lies between points first[f] and second[f]. */
export interface Facets extends SpaceFacets {
  /** the facet's ends along the bisector, left of first → second, from the middle between the points; may be infinite */
  start: number[]
  end: number[]
}

/** Facets of points on a line: each point and the next one. */
export function lineFacets(x: Float64Array): Facets {
  const sorted = Uint32Array.from(x.keys()).sort((a, b) => x[a]! - x[b]!)
  const first = [...sorted.subarray(0, -1)]
  const second = [...sorted.subarray(1)]
  const distance = first.map((i, f) => x[second[f]!]! - x[i]!)
  return {
    minimumDistance: distance.reduce((least, d) => Math.min(least, d), Infinity),
    first, second, distance,
    start: first.map(() => -Infinity),
    end: first.map(() => Infinity),
  }
}
