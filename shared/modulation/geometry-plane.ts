import { triangulate } from './geometry-delaunay'
import type { Triangulation } from './geometry-delaunay'
import { turnsLeft } from './geometry-predicates'
import { facetIsLong } from './geometry-exact'
import type { Facets } from './geometry-facets'

/** A facet not longer than this part of the minimum distance is a touch in a corner: methods §1. */
export const shortestFacet = 1e-9

/** Rounding of one product of two differences, with room to spare. */
const rounding = 8 * Number.EPSILON

/**
 * A triangle no higher than this part of the largest coordinate has its apex on its longest side, as far as the coordinates
 * can say: rows of a turned lattice are straight only to rounding. The longest side would be a facet that begins some 1e15 away.
 */
export const flatness = 8 * Number.EPSILON

/**
 * Facets of the Voronoi cells of planar points: the Delaunay edges whose dual edge is longer than 1e-9 of d_min.
 * Along the bisector, measured to the left of i → j from the middle between them, the circumcentre of the triangle
 * with apex k lies at (d/2)·cot(angle at k): only differences of coordinates enter.
 * @param xy coordinates of M ≥ 2 different points
 * @see methods §1
 */
export function planeFacets(xy: Float64Array): Facets {
  const mesh = triangulate(xy)
  const { origin, next, previous } = mesh
  const shortest = shortestEdge(xy, mesh)
  const flat = flatness * xy.reduce((largest, x) => Math.max(largest, Math.abs(x)), 0)
  const first: number[] = []
  const second: number[] = []
  const distance: number[] = []
  const start: number[] = []
  const end: number[] = []
  for (let e = 0; e < origin.length; e += 2) {
    const i = origin[e]!
    if (i < 0) continue
    const j = origin[e + 1]!
    const left = origin[next[e]! ^ 1]!
    const right = origin[previous[e]! ^ 1]!
    const d = Math.hypot(xy[2 * j]! - xy[2 * i]!, xy[2 * j + 1]! - xy[2 * i + 1]!)
    const above = turnsLeft(xy, i, j, left) ? corner(xy, i, j, left, d) : open
    const below = turnsLeft(xy, j, i, right) ? corner(xy, j, i, right, d) : open
    if ((above.t < 0 && above.height <= flat) || (below.t < 0 && below.height <= flat)) continue
    const excess = above.t + below.t - shortestFacet * shortest.distance
    const doubt = above.error + below.error
    const long = Math.abs(excess) > doubt ? excess > 0 : facetIsLong(xy, i, j, left, right, shortest.ends)
    if (!long) continue
    first.push(i)
    second.push(j)
    distance.push(d)
    start.push(-below.t)
    // Rounding can turn round only a facet that the exact decision had to save.
    end.push(Math.max(above.t, -below.t))
  }
  return { minimumDistance: shortest.distance, first, second, distance, start, end }
}

/** Side of an edge without a triangle: the facet runs to infinity. */
const open: Corner = { t: Infinity, error: 0, height: Infinity }

interface Corner {
  /** position along the bisector of i and j of the circumcentre of i, j, k, to k's side */
  t: number
  /** what rounding may have done to it */
  error: number
  /** distance of k from the line through i and j */
  height: number
}

/** Corner of the cells of i, j and k, which turn left. */
function corner(xy: Float64Array, i: number, j: number, k: number, d: number): Corner {
  const ax = xy[2 * i]! - xy[2 * k]!
  const ay = xy[2 * i + 1]! - xy[2 * k + 1]!
  const bx = xy[2 * j]! - xy[2 * k]!
  const by = xy[2 * j + 1]! - xy[2 * k + 1]!
  const cx = xy[2 * j]! - xy[2 * i]!
  const cy = xy[2 * j + 1]! - xy[2 * i + 1]!
  const a = Math.hypot(ax, ay)
  const b = Math.hypot(bx, by)
  // Twice the area from the two shorter sides: the one choice that does not cancel when two of the points are close.
  const [area, product] = a >= b && a >= d
    ? [bx * -cy + by * cx, b * d]
    : b >= d ? [ax * -cy + ay * cx, a * d] : [ax * by - ay * bx, a * b]
  const cotangent = (ax * bx + ay * by) / Math.abs(area)
  const t = d / 2 * cotangent
  const error = rounding * (d / 2) * (a * b + Math.abs(cotangent) * product) / Math.abs(area)
  return { t, error: Number.isFinite(error) ? error : Infinity, height: Math.abs(area) / d }
}

/** The minimum distance is that of some Delaunay edge. */
function shortestEdge(xy: Float64Array, { origin }: Triangulation): { distance: number, ends: [number, number] } {
  let distance = Infinity
  let ends: [number, number] = [0, 1]
  for (let e = 0; e < origin.length; e += 2) {
    const i = origin[e]!
    if (i < 0) continue
    const j = origin[e + 1]!
    const d = Math.hypot(xy[2 * j]! - xy[2 * i]!, xy[2 * j + 1]! - xy[2 * i + 1]!)
    if (d < distance) {
      distance = d
      ends = [i, j]
    }
  }
  return { distance, ends }
}
