import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'
import { ModulationError } from './errors'
import { lineFacets } from './geometry-facets'
import type { Facets } from './geometry-facets'
import { planeFacets } from './geometry-plane'
import { distanceClassesOf, piecesOf } from './geometry-pieces'
import type { DistanceClasses, Pieces } from './geometry-pieces'
import { productFacets } from './geometry-product'
import { spaceFacets } from './geometry-space'
import type { SpaceFacets } from './geometry-space'
import { informationSources } from './information-source'
import type { InformationSource } from './information-source'
import { inOwnSpace } from './subspace'

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
  /** by entry: the cell's edge that separates the two, relative to the point; null for more than two dimensions */
  edges: CellEdges | null
  /** M counts of neighbours within (1 + 1e-9)·d_min */
  nearestCounts: Int32Array
  /** Σ p_i·(number of relevant neighbours) */
  relevantMean: number
  /** Σ p_i·(number of nearest neighbours), Ā */
  nearestMean: number
  /** relevant neighbours' distances, equal ones together */
  distanceClasses: DistanceClasses
  /** cells' edges cut at the foot of the perpendicular, congruent ones together; null for more than two dimensions */
  pieces: Pieces | null
}

/** A geometry of one or two dimensions, whose cells have edges. */
export interface PlaneGeometry extends Geometry {
  edges: CellEdges
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
 * @param constellation points of up to eight dimensions; they are different (createConstellation sees to that)
 * @see methods §1
 */
export function analyse(constellation: Constellation): Geometry {
  const { dimensions, points } = constellation
  if (dimensions > 2) return gather(constellation, pairsOf(constellation), null)
  const facets = planarFacets(points, dimensions)
  return gather(constellation, facets, facets)
}

/**
 * A geometry whose cells have edges.
 * @throws ModulationError with path ['dimensions'] for more than two dimensions
 */
export function requirePlane(geometry: Geometry): PlaneGeometry {
  if (!isPlane(geometry)) throw new ModulationError(planeOnly, ['dimensions'])
  return geometry
}

/** Edges of cells, as requirePlane. */
export function requireEdges(edges: CellEdges | null): CellEdges {
  if (!edges) throw new ModulationError(planeOnly, ['dimensions'])
  return edges
}

const planeOnly = 'This is offered for one and two dimensions: take points of one or two coordinates.'

const isPlane = (geometry: Geometry): geometry is PlaneGeometry => geometry.edges !== null && geometry.pieces !== null

const planarFacets = (points: Float64Array, dimensions: number): Facets => dimensions === 1 ? lineFacets(points) : planeFacets(points)

/** Neighbours in three dimensions and more; a product has those of its factors. */
function pairsOf(constellation: Constellation): SpaceFacets {
  const factors = informationSources({ ...constellation, probabilities: null }, false)
  const facetsOf = (factor: InformationSource) => {
    const { points, dimensions } = inOwnSpace(factor.points, factor.dimensions)
    return dimensions > 2 ? spaceFacets(points, dimensions) : planarFacets(points, dimensions)
  }
  return factors.length === 1 ? facetsOf(factors[0]!) : productFacets(constellation.points, factors, facetsOf)
}

function gather(constellation: Constellation, pairs: SpaceFacets, facets: Facets | null): Geometry {
  const { order } = constellation
  const { offsets, neighbours, distances, edges } = byPoint(order, pairs, facets)
  const nearestCounts = new Int32Array(order)
  let relevantMean = 0
  let nearestMean = 0
  for (let i = 0; i < order; i++) {
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      if (distances[entry]! <= nearestMargin * pairs.minimumDistance) nearestCounts[i]!++
    }
    const p = probabilityOf(constellation, i)
    relevantMean += p * (offsets[i + 1]! - offsets[i]!)
    nearestMean += p * nearestCounts[i]!
  }
  return {
    constellation, minimumDistance: pairs.minimumDistance, offsets, neighbours, distances, edges, nearestCounts, relevantMean, nearestMean,
    distanceClasses: distanceClassesOf(constellation, pairs), pieces: facets && piecesOf(constellation, facets),
  }
}

/** Facets from both of their sides, sorted by point and neighbour: two passes of a counting sort. */
function byPoint(order: number, { first, second, distance }: SpaceFacets, facets: Facets | null) {
  const count = first.length
  const byNeighbour = countingSort(order, 2 * count, side => side < count ? second[side]! : first[side - count]!)
  const sides = countingSort(order, 2 * count, n => owner(byNeighbour.sorted[n]!))
  const neighbours = new Int32Array(2 * count)
  const distances = new Float64Array(2 * count)
  const edges: CellEdges | null = facets && { h: new Float64Array(2 * count), t1: new Float64Array(2 * count), t2: new Float64Array(2 * count) }
  sides.sorted.forEach((n, entry) => {
    const side = byNeighbour.sorted[n]!
    const f = side % count
    neighbours[entry] = side < count ? second[f]! : first[f]!
    distances[entry] = distance[f]!
    if (!edges) return
    const { start, end } = facets!
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
