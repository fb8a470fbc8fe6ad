import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'
import { minimumDistanceOf } from './distance'
import { ModulationError, requireNoiseDensity } from './errors'
import type { CellEdges } from './geometry'
import { flatness, shortestFacet } from './geometry-plane'
import { PowerCell } from './power-cell'

/**
 * Decision regions of maximum a posteriori decisions at one noise density: the cells of a power diagram, which grow with the points'
 * probabilities. The edges of cell i are entries offsets[i] … offsets[i + 1] − 1 of the arrays "by entry".
 */
export interface MapCells {
  constellation: Constellation
  n0: number
  /** M + 1 offsets into the arrays by entry */
  offsets: Int32Array
  /** by entry: whose cell lies behind the edge, rising within a point */
  neighbours: Int32Array
  /** by entry: the edge relative to the point; h is negative where the point lies behind it */
  edges: CellEdges
  /** M flags: the point lies outside its own cell, which exists */
  outside: Uint8Array
  /** M flags: the cell has vanished, its point is never decided on */
  vanished: Uint8Array
}

/**
 * Cells of maximum a posteriori decisions: from s_i's side the boundary to s_j lies at d_ij/2 + (N0/(2·d_ij))·ln(p_i/p_j).
 * Each cell is cut by the other points in the order of their distance along one coordinate, and is done once no later one can reach it.
 * @param constellation points of one or two dimensions with their probabilities
 * @param n0 noise density N0 above 0, signal units squared
 * @throws ModulationError with path ['dimensions'] for more than two dimensions, ['n0'] when N0 is not positive and finite
 * @see methods §2; Aurenhammer, "Power diagrams", SIAM J. Comput. 16 (1987)
 */
export function mapCells(constellation: Constellation, n0: number): MapCells {
  requireNoiseDensity(n0)
  const { order, dimensions } = constellation
  if (dimensions > 2) throw new ModulationError('MAP decisions are offered for one and two dimensions.', ['dimensions'])
  const sweep = sweepOf(constellation)
  const shortest = shortestFacet * sweep.minimumDistance
  const cell = new PowerCell(order, dimensions === 1, sweep.flat)
  const offsets = new Int32Array(order + 1)
  const [neighbours, h, t1, t2] = [[] as number[], [] as number[], [] as number[], [] as number[]]
  const outside = new Uint8Array(order)
  const vanished = new Uint8Array(order)
  for (let i = 0; i < order; i++) {
    cutOut(cell, constellation, sweep, i, n0)
    for (const e of longEdges(cell, shortest)) {
      neighbours.push(cell.owner[e]!)
      h.push(cell.h[e]!)
      t1.push(cell.t1[e]!)
      t2.push(cell.t2[e]!)
      if (cell.h[e]! < 0) outside[i] = 1
    }
    offsets[i + 1] = neighbours.length
    if (offsets[i + 1] === offsets[i]) vanished[i] = 1
  }
  const edges = { h: Float64Array.from(h), t1: Float64Array.from(t1), t2: Float64Array.from(t2) }
  return { constellation, n0, offsets, neighbours: Int32Array.from(neighbours), edges, outside, vanished }
}

/** Points that maximum a posteriori decisions treat unlike minimum-distance ones, as lists of their indices. */
export interface MapNotes {
  /** points outside their own cells, which exist: mistaken even without noise */
  outside: number[]
  /** points whose cells have vanished: never decided on */
  vanished: number[]
}

/**
 * Points outside their own cells, and points without one, at one noise density.
 * @param constellation points of one or two dimensions with their probabilities
 * @param n0 noise density N0 above 0, signal units squared
 * @throws ModulationError as mapCells
 */
export function mapNotes(constellation: Constellation, n0: number): MapNotes {
  const { outside, vanished } = mapCells(constellation, n0)
  const flagged = (flags: Uint8Array) => [...flags.keys()].filter(i => flags[i] === 1)
  return { outside: flagged(outside), vanished: flagged(vanished) }
}

/** Points in the order of the coordinate along which they spread most. */
interface Sweep {
  minimumDistance: number
  flat: number
  /** that coordinate, in rising order */
  along: Float64Array
  sorted: Int32Array
  rank: Int32Array
  /** N0/2 times these differences shift the boundaries: ln p_i */
  logP: Float64Array
  mostLogP: number
}

/** By constellation, as cells are asked for at one N0 after another. */
const sweeps = new WeakMap<Constellation, Sweep>()

function sweepOf(constellation: Constellation): Sweep {
  const known = sweeps.get(constellation)
  if (known) return known
  const { order, dimensions, points } = constellation
  const coordinate = (n: number) => Float64Array.from({ length: order }, (_, i) => points[dimensions * i + n]!)
  const spread = (x: Float64Array) => x.reduce((most, a) => Math.max(most, a), -Infinity) - x.reduce((least, a) => Math.min(least, a), Infinity)
  const coordinates = Array.from({ length: dimensions }, (_, n) => coordinate(n))
  const along = coordinates.reduce((best, x) => spread(x) > spread(best) ? x : best)
  const sorted = Int32Array.from(along.keys()).sort((a, b) => along[a]! - along[b]!)
  const rank = new Int32Array(order)
  sorted.forEach((i, place) => rank[i] = place)
  const logP = Float64Array.from({ length: order }, (_, i) => Math.log(probabilityOf(constellation, i)))
  const sweep = {
    minimumDistance: minimumDistanceOf(constellation),
    flat: flatness * points.reduce((largest, x) => Math.max(largest, Math.abs(x)), 0),
    along: Float64Array.from(sorted, i => along[i]!), sorted, rank, logP,
    mostLogP: logP.reduce((most, a) => Math.max(most, a), -Infinity),
  }
  sweeps.set(constellation, sweep)
  return sweep
}

/** Cuts the cell of point i, by the others outwards on both sides of it. */
function cutOut(cell: PowerCell, { points, dimensions, order }: Constellation, sweep: Sweep, i: number, n0: number): void {
  const { along, sorted, rank, logP, mostLogP } = sweep
  const place = rank[i]!
  const favour = (mostLogP - logP[i]!) * n0 / 2
  let below = place - 1
  let above = place + 1
  cell.reset()
  while (!cell.empty) {
    const toBelow = below >= 0 ? along[place]! - along[below]! : Infinity
    const toAbove = above < order ? along[above]! - along[place]! : Infinity
    const least = Math.min(toBelow, toAbove)
    // Later points are at least this far away, and their boundaries at least that far towards the point.
    if (least === Infinity || least / 2 - favour / least >= cell.radius) return
    const j = toBelow <= toAbove ? sorted[below--]! : sorted[above++]!
    const dx = points[dimensions * j]! - points[dimensions * i]!
    const dy = dimensions === 1 ? 0 : points[2 * j + 1]! - points[2 * i + 1]!
    const distance = Math.hypot(dx, dy)
    cell.cut(j, dx / distance, dy / distance, distance, distance / 2 + n0 / (2 * distance) * (logP[i]! - logP[j]!))
  }
}

/** Edges longer than a touch in a corner, by their owners. */
function longEdges(cell: PowerCell, shortest: number): number[] {
  const edges: number[] = []
  for (let e = 0; e < cell.count; e++) if (cell.t2[e]! - cell.t1[e]! > shortest) edges.push(e)
  return edges.sort((a, b) => cell.owner[a]! - cell.owner[b]!)
}
