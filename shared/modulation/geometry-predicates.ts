import { incircle, orient2d } from 'robust-predicates'
import { circleDeterminant } from './geometry-double'

/** Exact signs of the two decisions of a planar triangulation: Shewchuk, Discrete Comput. Geom. 18 (1997). */

/** True when a, b, c turn left, in a plane whose y axis points up. */
export function turnsLeft(xy: Float64Array, a: number, b: number, c: number): boolean {
  return orient2d(xy[2 * a]!, xy[2 * a + 1]!, xy[2 * b]!, xy[2 * b + 1]!, xy[2 * c]!, xy[2 * c + 1]!) < 0
}

/** Rounding of the determinant below, relative to the sum of its terms' sizes: Shewchuk's bound for plain doubles. */
const plainRounding = 10.1 * Number.EPSILON / 2
/** The same for twofold precision, with a thousandfold reserve. */
const twofoldRounding = 1e-28

/**
 * True when d lies strictly inside the circle through a, b, c, which turn left; exact.
 * Rings and lattices consist of near ties that only rounding of the coordinates breaks: plain doubles cannot tell them, twofold
 * precision nearly always can, and what is left takes arithmetic of any length.
 */
export function insideCircle(xy: Float64Array, a: number, b: number, c: number, d: number): boolean {
  const dx = xy[2 * d]!
  const dy = xy[2 * d + 1]!
  const ax = xy[2 * a]! - dx
  const ay = xy[2 * a + 1]! - dy
  const bx = xy[2 * b]! - dx
  const by = xy[2 * b + 1]! - dy
  const cx = xy[2 * c]! - dx
  const cy = xy[2 * c + 1]! - dy
  const squareA = ax * ax + ay * ay
  const squareB = bx * bx + by * by
  const squareC = cx * cx + cy * cy
  const determinant = squareA * (bx * cy - cx * by) + squareB * (cx * ay - ax * cy) + squareC * (ax * by - bx * ay)
  const sizes = squareA * (Math.abs(bx * cy) + Math.abs(cx * by))
    + squareB * (Math.abs(cx * ay) + Math.abs(ax * cy))
    + squareC * (Math.abs(ax * by) + Math.abs(bx * ay))
  if (Math.abs(determinant) > plainRounding * sizes) return determinant > 0
  const finer = circleDeterminant(
    xy[2 * a]!, xy[2 * a + 1]!, xy[2 * b]!, xy[2 * b + 1]!, xy[2 * c]!, xy[2 * c + 1]!, dx, dy,
  )
  if (Math.abs(finer) > twofoldRounding * sizes) return finer > 0
  return incircle(
    xy[2 * a]!, xy[2 * a + 1]!, xy[2 * b]!, xy[2 * b + 1]!, xy[2 * c]!, xy[2 * c + 1]!, dx, dy,
  ) > 0
}
