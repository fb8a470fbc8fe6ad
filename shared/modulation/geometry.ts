import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'
import { ModulationError } from './errors'
import { lineFacets } from './geometry-facets'
import type { Facets } from './geometry-facets'
import { planeFacets } from './geometry-plane'
import { piecesOf } from './geometry-pieces'
import type { DistanceClasses, Pieces } from './geometry-pieces'

/**
 * Decision regions of a constellation under minimum-distance decisions: who can be mistaken for whom, and where.
 * The neighbours of point i are entries offsets[i] … offsets[i + 1] − 1 of the arrays "by entry".
 */
export interface Geometry {
  constellation: Constellation
  /** d_min, signal units */
  minimumDistance: number
  /** M + 1 offsets into the arrays by entry */
  offsets: Int32Array
  /** by entry: index of the relevant neighbour, rising within a point */
  neighbours: Int32Array
  /** by entry: its distance, signal units */
  distances: Float64Array
  /** by entry: the cell's edge that separates the two, relative to the point */
  edges: CellEdges
  /** M counts of neighbours within (1 + 1e-9)·d_min */
  nearestCounts: Int32Array
  /** Σ p_i·(number of relevant neighbours) */
  relevantMean: number
  /** Σ p_i·(number of nearest neighbours), Ā */
  nearestMean: number
  /** relevant neighbours' distances, equal ones together */
  distanceClasses: DistanceClasses
  /** cells' edges cut at the foot of the perpendicular, congruent ones together */
  pieces: Pieces
}

/** Edges of cells: signed distance h of the edge's line, and its ends t1 < t2 along the line from the foot; ends may be infinite. */
export interface CellEdges {
  h: Float64Array
  t1: Float64Array
  t2: Float64Array
}

/** Points within (1 + 1e-9)·d_min are nearest neighbours: methods §1. */
const nearestMargin = 1 + 1e-9

/**
 * Decision regions, relevant and nearest neighbours.
 * @param constellation points of one or two dimensions; they are different (createConstellation sees to that)
 * @throws ModulationError with path ['dimensions'] for more than two dimensions
 * @see methods §1
 */
export function analyse(constellation: Constellation): Geometry {
  if (constellation.dimensions > 2) {
    throw new ModulationError('Geometry is offered for one and two dimensions.', ['dimensions'])
  }
  const facets = constellation.dimensions === 1 ? lineFacets(constellation.points) : planeFacets(constellation.points)
  return gather(constellation, facets)
}

function gather(constellation: Constellation, facets: Facets): Geometry {
  const { order } = constellation
  const { offsets, neighbours, distances, edges } = byPoint(order, facets)
  const nearestCounts = new Int32Array(order)
  let relevantMean = 0
  let nearestMean = 0
  for (let i = 0; i < order; i++) {
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      if (distances[entry]! <= nearestMargin * facets.minimumDistance) nearestCounts[i]!++
    }
    const p = probabilityOf(constellation, i)
    relevantMean += p * (offsets[i + 1]! - offsets[i]!)
    nearestMean += p * nearestCounts[i]!
  }
  return {
    constellation, minimumDistance: facets.minimumDistance, offsets, neighbours, distances, edges,
    nearestCounts, relevantMean, nearestMean, ...piecesOf(constellation, facets),
  }
}

/** Facets from both of their sides, sorted by point and neighbour: two passes of a counting sort. */
function byPoint(order: number, { first, second, distance, start, end }: Facets) {
  const count = first.length
  const byNeighbour = countingSort(order, 2 * count, side => side < count ? second[side]! : first[side - count]!)
  const sides = countingSort(order, 2 * count, n => owner(byNeighbour.sorted[n]!))
  const neighbours = new Int32Array(2 * count)
  const distances = new Float64Array(2 * count)
  const edges: CellEdges = { h: new Float64Array(2 * count), t1: new Float64Array(2 * count), t2: new Float64Array(2 * count) }
  sides.sorted.forEach((n, entry) => {
    const side = byNeighbour.sorted[n]!
    const f = side % count
    neighbours[entry] = side < count ? second[f]! : first[f]!
    distances[entry] = distance[f]!
    edges.h[entry] = distance[f]! / 2
    // Seen from the other point, the same edge runs the other way.
    edges.t1[entry] = side < count ? start[f]! : -end[f]!
    edges.t2[entry] = side < count ? end[f]! : -start[f]!
  })
  return { offsets: sides.offsets, neighbours, distances, edges }

  function owner(side: number): number {
    return side < count ? first[side]! : second[side - count]!
  }
}

/** Stable order of items 0 … count − 1 by a key of 0 … keys − 1. */
function countingSort(keys: number, count: number, key: (item: number) => number) {
  const offsets = new Int32Array(keys + 1)
  for (let item = 0; item < count; item++) offsets[key(item) + 1]!++
  for (let k = 0; k < keys; k++) offsets[k + 1]! += offsets[k]!
  const place = offsets.slice()
  const sorted = new Int32Array(count)
  for (let item = 0; item < count; item++) sorted[place[key(item)]!++] = item
  return { offsets, sorted }
}
