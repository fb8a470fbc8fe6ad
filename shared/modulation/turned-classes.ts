import { probabilityOf } from './constellation'
import { requireEdges } from './geometry'
import type { Geometry } from './geometry'
import { turnedEdge } from './turned-point'
import type { TurnedEdge } from './turned-point'

/** Points whose cells look the same from the origin, turned or mirrored: a phase error of either sign does the same to all. */
export interface TurnedClass {
  /** distance from the origin */
  radius: number
  /** edges of the cell */
  edges: TurnedEdge[]
  /** Σ p_i of its points */
  weight: number
}

/** Lengths that differ by less than this part of d_min are equal: it moves no error rate above 1e-30 by 1e-9. */
const quantum = 1e-12

/** By geometry, as error rates are asked for at one N0 after another. */
const known = new WeakMap<Geometry, TurnedClass[]>()

/**
 * Classes of congruent points.
 * @param geometry of two dimensions
 * @throws ModulationError with path ['dimensions'] for more, where cells have no edges
 */
export function turnedClassesOf(geometry: Geometry): TurnedClass[] {
  const before = known.get(geometry)
  if (before) return before
  const { constellation } = geometry
  const classes = new Map<string, TurnedClass>()
  for (let i = 0; i < constellation.order; i++) {
    const radius = Math.hypot(constellation.points[2 * i]!, constellation.points[2 * i + 1]!)
    const edges = edgesOf(geometry, i)
    const key = keyOf(radius, edges, quantum * geometry.minimumDistance)
    const found = classes.get(key)
    if (found) found.weight += probabilityOf(constellation, i)
    else classes.set(key, { radius, edges, weight: probabilityOf(constellation, i) })
  }
  const result = [...classes.values()]
  known.set(geometry, result)
  return result
}

function edgesOf({ constellation, offsets, neighbours, distances, edges: given }: Geometry, i: number): TurnedEdge[] {
  const edges = requireEdges(given)
  const { points } = constellation
  return Array.from({ length: offsets[i + 1]! - offsets[i]! }, (_, n) => {
    const entry = offsets[i]! + n
    const [j, d] = [neighbours[entry]!, distances[entry]!]
    const [ux, uy] = [(points[2 * j]! - points[2 * i]!) / d, (points[2 * j + 1]! - points[2 * i + 1]!) / d]
    return turnedEdge(constellation, i, ux, uy, edges.h[entry]!, edges.t1[entry]!, edges.t2[entry]!)
  })
}

/** The same for congruent and for mirrored cells. */
function keyOf(radius: number, edges: TurnedEdge[], step: number): string {
  const whole = (length: number) => Math.round(length / step) + 0
  const rows = edges.map(({ h, t1, t2, delta }) => {
    const [along, across] = [whole(h * Math.cos(delta)), whole(h * Math.sin(delta))]
    const place = [whole(h), along].join(' ')
    return [[place, across, whole(t1), whole(t2)].join(' '), [place, -across + 0, whole(-t2), whole(-t1)].join(' ')] as const
  })
  const [cell, mirrored] = [rows.map(row => row[0]).sort().join(','), rows.map(row => row[1]).sort().join(',')]
  return `${whole(radius)}:${cell < mirrored ? cell : mirrored}`
}
