import type { Constellation } from './constellation'

/** A boundary of cells as a point on a circle about the origin meets it while it turns. */
export interface TurnedEdge {
  /** distance of the line from the point that has not turned, positive towards its direction */
  h: number
  /** ends along the line from the foot of that point */
  t1: number
  t2: number
  /** angle from the point's direction to that of the line's normal, −π to π */
  delta: number
}

/** Boundary layers reach this far to either side of a crossing, in standard deviations of the noise. */
const layer = 8

/** An edge met this near to its end, in radii, is met: the next edge may by rounding be missed there too. */
const slack = 1e-9

/** Signed distance of an edge's line from the point after a turn, without cancelling for small angles. */
export function turnedDistance({ h, delta }: TurnedEdge, radius: number, phi: number): number {
  return h - 2 * radius * Math.sin(delta - phi / 2) * Math.sin(phi / 2)
}

/** How far the foot on an edge's line has moved after a turn. */
export function turnedFoot({ delta }: TurnedEdge, radius: number, phi: number): number {
  return 2 * radius * Math.cos(delta - phi / 2) * Math.sin(phi / 2)
}

/** Angles from −π to π at which the turning point crosses an edge. */
export function crossingsOf(edge: TurnedEdge, radius: number): number[] {
  const cosine = (edge.h + radius * Math.cos(edge.delta)) / radius
  if (!(Math.abs(cosine) <= 1)) return []
  const half = Math.acos(cosine)
  return [edge.delta - half, edge.delta + half].map(wrapped).filter((phi) => {
    const foot = turnedFoot(edge, radius, phi)
    return foot >= edge.t1 - slack * radius && foot <= edge.t2 + slack * radius
  })
}

/** Over what angles a point turns, and in what noise. */
export interface TurnedRange {
  n0: number
  /** the angles run from −limit to limit */
  limit: number
  /** most of the phase error lies between −core and core */
  core: number
  /** breaks nearer to each other than this are one */
  spacing: number
}

/**
 * Angles between which the error probability of a turning point is smooth: crossings of edges with the layers in which the noise blurs
 * them, and places where it passes close to an edge or to a corner.
 * @returns rising, with both ends
 */
export function breaksOf(edges: readonly TurnedEdge[], radius: number, { n0, limit, core, spacing }: TurnedRange): number[] {
  const breaks = [-core, 0, core]
  const blur = layer * Math.sqrt(n0 / 2)
  for (const edge of edges) {
    const crossings = crossingsOf(edge, radius)
    for (const phi of crossings) {
      const width = blur / (radius * Math.abs(Math.sin(edge.delta - phi)))
      breaks.push(phi, phi - width, phi + width)
    }
    if (crossings.length === 0 && passesClose(edge, radius, blur)) breaks.push(edge.delta)
    for (const phi of cornersNear(edge, radius, blur)) breaks.push(phi, phi - blur / radius, phi + blur / radius)
  }
  const rising = breaks.filter(phi => Math.abs(phi) < limit).sort((a, b) => a - b)
  const kept = [-limit]
  for (const phi of rising) if (phi - kept[kept.length - 1]! > spacing) kept.push(phi)
  if (kept.length > 1 && limit - kept[kept.length - 1]! < spacing) kept.pop()
  return [...kept, limit]
}

/** Whether the point, where it is nearest to an edge that it never crosses, is within a distance of it. */
function passesClose(edge: TurnedEdge, radius: number, distance: number): boolean {
  const foot = turnedFoot(edge, radius, edge.delta)
  return Math.abs(turnedDistance(edge, radius, edge.delta)) < distance && foot > edge.t1 && foot < edge.t2
}

/** Angles at which the point passes an end of an edge within a distance. */
function cornersNear({ h, t1, t2, delta }: TurnedEdge, radius: number, distance: number): number[] {
  const along = h + radius * Math.cos(delta)
  return [t1, t2].flatMap((t) => {
    const aside = t - radius * Math.sin(delta)
    const near = radius > 0 && Math.abs(Math.hypot(along, aside) - radius) < distance
    return near ? [wrapped(Math.atan2(aside, along) + delta)] : []
  })
}

/** An edge as the turning point i meets it: its line at a distance h from the point in a direction (ux, uy), of unit length. */
export function turnedEdge({ points }: Constellation, i: number, ux: number, uy: number, h: number, t1: number, t2: number): TurnedEdge {
  const [x, y] = [points[2 * i]!, points[2 * i + 1]!]
  return { h, t1, t2, delta: Math.atan2(x * uy - y * ux, x * ux + y * uy) }
}

function wrapped(phi: number): number {
  return phi - 2 * Math.PI * Math.round(phi / (2 * Math.PI))
}
