import { expNegative } from './exponential'
import { q } from './gaussian'
import { gaussLegendre } from './quadrature'
import type { Rule } from './quadrature'

/** Where the exponent has fallen by this much the rest of an edge is below 1e-18 of its beginning: methods §2. */
const clipping = 42

/** Beyond this length in v the weight 1/cosh v alone has fallen below 1e-13. */
const longest = 30

const rules = { 32: gaussLegendre(32) }

/**
 * Probability that noise carries a point across a piece of its cell's edge: the wedge from the point over the piece,
 * beyond the edge's line. (1/2π)·∫_a^b exp(−(h²+t²)/N0)·h/(h²+t²) dt by t = h·sinh v, which removes the pole at small h.
 * @param h distance from the point to the edge's line, above 0, signal units
 * @param a nearer end of the piece, from the foot of the perpendicular, at least 0
 * @param b farther end, above a, may be infinite
 * @param n0 noise density N0, signal units squared
 * @returns probability, relative error below 1e-11
 * @see methods §2; Craig 1991
 */
export function pieceError(h: number, a: number, b: number, n0: number): number {
  if (a === 0 && b === Infinity) return q(h * Math.sqrt(2 / n0)) / 2
  const end = Math.min(b, Math.sqrt(a * a + clipping * n0))
  const reachA = Math.hypot(h, a)
  // sinh of the difference of the ends' v, without subtracting them.
  const span = Math.min(longest, Math.asinh((end - a) * (end + a) / (end * reachA + a * Math.hypot(h, end))))
  const from = Math.asinh(a / h)
  const k = h * h / n0
  if (span <= 8) return integrate(rules[32], k, from, span) / (2 * Math.PI)
  return (integrate(rules[32], k, from, span / 2) + integrate(rules[32], k, from + span / 2, span / 2)) / (2 * Math.PI)
}

/** ∫ exp(−k·cosh²v)/cosh v dv over a range of v. */
function integrate({ nodes, weights }: Rule, k: number, from: number, span: number): number {
  let sum = 0
  for (let n = 0; n < nodes.length; n++) {
    const v = from + span * nodes[n]!
    const half = expNegative(-v)
    const cosh = (half + 1 / half) / 2
    sum += weights[n]! * expNegative(-k * cosh * cosh) / cosh
  }
  return sum * span
}
