import { incircle, orient2d } from 'robust-predicates'

/** Exact signs of the two decisions of a planar triangulation: Shewchuk, Discrete Comput. Geom. 18 (1997). */

/** True when a, b, c turn left, in a plane whose y axis points up. */
export function turnsLeft(xy: Float64Array, a: number, b: number, c: number): boolean {
  return orient2d(xy[2 * a]!, xy[2 * a + 1]!, xy[2 * b]!, xy[2 * b + 1]!, xy[2 * c]!, xy[2 * c + 1]!) < 0
}

/** True when d lies strictly inside the circle through a, b, c, which turn left. */
export function insideCircle(xy: Float64Array, a: number, b: number, c: number, d: number): boolean {
  return incircle(
    xy[2 * a]!, xy[2 * a + 1]!, xy[2 * b]!, xy[2 * b + 1]!, xy[2 * c]!, xy[2 * c + 1]!, xy[2 * d]!, xy[2 * d + 1]!,
  ) > 0
}
