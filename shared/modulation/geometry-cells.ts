import { requirePlane } from './geometry'
import type { Geometry } from './geometry'

/** A rectangle of the plane, signal units. */
export interface Box {
  left: number
  right: number
  bottom: number
  top: number
}

/**
 * Decision cells as polygons clipped to a box, for drawing.
 * Points of one dimension lie on the horizontal axis; their cells are strips.
 * @throws ModulationError with path ['dimensions'] for more than two dimensions
 * @returns for each point the corners [x, y], counterclockwise; none where the cell lies outside the box
 */
export function decisionCells(geometry: Geometry, box: Box): number[][][] {
  requirePlane(geometry)
  const { constellation: { points, dimensions, order }, offsets, neighbours } = geometry
  const at = (i: number) => dimensions === 1 ? [points[i]!, 0] : [points[2 * i]!, points[2 * i + 1]!]
  return Array.from({ length: order }, (_, i) => {
    let cell = [[box.left, box.bottom], [box.right, box.bottom], [box.right, box.top], [box.left, box.top]]
    const [x, y] = at(i) as [number, number]
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      const [u, v] = at(neighbours[entry]!) as [number, number]
      cell = clip(cell, (u - x), (v - y), (x + u) / 2, (y + v) / 2)
    }
    return cell
  })
}

/** The part of a convex polygon with (p − m)·n ≤ 0: Sutherland and Hodgman 1974. */
function clip(polygon: number[][], nx: number, ny: number, mx: number, my: number): number[][] {
  const side = (p: number[]) => (p[0]! - mx) * nx + (p[1]! - my) * ny
  const result: number[][] = []
  polygon.forEach((p, n) => {
    const before = polygon[(n + polygon.length - 1) % polygon.length]!
    const [here, there] = [side(p), side(before)]
    if ((here > 0) !== (there > 0)) {
      const part = there / (there - here)
      result.push([before[0]! + part * (p[0]! - before[0]!), before[1]! + part * (p[1]! - before[1]!)])
    }
    if (here <= 0) result.push(p)
  })
  return result
}
