import { requirePlane } from './geometry'
import type { Geometry } from './geometry'

/** Edges of one shape, on average, from which a set is regular. */
const sameShape = 4

/** The edges of all decision cells of the plane, each once, between points a, in the order of x, and b; seen from any of the points. */
export class DiagramView {
  readonly a: Int32Array
  readonly b: Int32Array
  /** the edge as the point that looked last sees it: distance of its line, and its ends along it from the foot, the nearer first */
  h = 1
  near = 0
  far = 1
  /** square of its least distance from the point */
  square = 0
  /** whether many edges have the same shape, as in a lattice or on a ring */
  readonly regular: boolean
  private readonly points: Float64Array
  /** unit vectors from a to b */
  private readonly ex: Float64Array
  private readonly ey: Float64Array
  private readonly half: Float64Array
  /** ends along the line, to the left of a → b from the middle between them */
  private readonly t1: Float64Array
  private readonly t2: Float64Array

  /** @param geometry decision regions of two dimensions */
  constructor(geometry: Geometry) {
    const { constellation: { points, order }, offsets, neighbours, distances, edges } = requirePlane(geometry)
    const byX = Int32Array.from({ length: order }, (_, i) => i).sort((i, j) => points[2 * i]! - points[2 * j]! || i - j)
    const rank = new Int32Array(order)
    byX.forEach((i, place) => rank[i] = place)
    const sides = [...byX].flatMap(i => Array.from({ length: offsets[i + 1]! - offsets[i]! }, (_, n) => ({ i, entry: offsets[i]! + n })))
      .filter(({ i, entry }) => rank[neighbours[entry]!]! > rank[i]!)
    const along = (i: number, entry: number, n: number) => (points[2 * neighbours[entry]! + n]! - points[2 * i + n]!) / distances[entry]!
    this.points = points
    this.a = Int32Array.from(sides, ({ i }) => i)
    this.b = Int32Array.from(sides, ({ entry }) => neighbours[entry]!)
    this.ex = Float64Array.from(sides, ({ i, entry }) => along(i, entry, 0))
    this.ey = Float64Array.from(sides, ({ i, entry }) => along(i, entry, 1))
    this.half = Float64Array.from(sides, ({ entry }) => distances[entry]! / 2)
    this.t1 = Float64Array.from(sides, ({ entry }) => edges.t1[entry]!)
    this.t2 = Float64Array.from(sides, ({ entry }) => edges.t2[entry]!)
    const shapes = new Set(sides.map(({ entry }) => [distances[entry]!, edges.t1[entry]!, edges.t2[entry]!].map(x => Math.fround(x)).join()))
    this.regular = shapes.size * sameShape <= sides.length
  }

  /**
   * The edges, from one up to before the other, among which are all that have a place near a point.
   * Every place of an edge is no farther from a than from any point, so that a is no farther from the point than twice as far as the place.
   * @param i the point
   * @param farthest square of the distance, signal units
   */
  within(i: number, farthest: number): [number, number] {
    const distance = 2 * Math.sqrt(farthest) * (1 + 1e-9)
    return [this.firstFrom(this.points[2 * i]! - distance), this.firstFrom(this.points[2 * i]! + distance)]
  }

  /**
   * Looks at an edge from a point.
   * @param i the point
   * @param e the edge
   * @param farthest square of the distance beyond which an edge does not matter
   * @returns 1 when the point is on a's side of the edge's line, −1 on b's, 0 when nothing of its noise that matters crosses the edge
   */
  see(i: number, e: number, farthest: number): number {
    const { points } = this
    const a = this.a[e]!
    const dx = points[2 * i]! - points[2 * a]!
    const dy = points[2 * i + 1]! - points[2 * a + 1]!
    const signed = this.half[e]! - (dx * this.ex[e]! + dy * this.ey[e]!)
    const h = Math.abs(signed)
    const foot = dy * this.ex[e]! - dx * this.ey[e]!
    const left = this.t2[e]! - foot
    const right = this.t1[e]! - foot
    const mirrored = left + right < 0
    const near = mirrored ? -left : right
    this.h = h
    this.near = near
    this.far = mirrored ? -right : left
    this.square = near > 0 ? h * h + near * near : h * h
    // On the edge's own line nothing flows through it.
    if (this.square > farthest || h === 0) return 0
    return signed > 0 ? 1 : -1
  }

  /** First edge whose a lies at x or beyond. */
  private firstFrom(x: number): number {
    let low = 0
    let high = this.a.length
    while (low < high) {
      const middle = (low + high) >> 1
      if (this.points[2 * this.a[middle]!]! < x) low = middle + 1
      else high = middle
    }
    return low
  }
}
