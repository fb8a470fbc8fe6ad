import { q } from './gaussian'
import { gaussLegendre } from './quadrature'

/** Standard deviations about the middle of an integrand beyond which it is nothing. */
const span = 13
/** Step of the trapezoidal rule, whose error for entire functions that fall like a Gaussian is below rounding. */
const step = 1 / 8
const panel = 2
const rule = gaussLegendre(24)
const density = (z: number) => Math.exp(-z * z / 2) / Math.sqrt(2 * Math.PI)

/**
 * Symbol error rate of M points that are all equally far from each other: simplex and orthogonal signals, in complement form
 * ∫ φ(z)·[1 − (1 − Q(z + d/√N0))^{M−1}] dz.
 * @param distance d of any two points, signal units
 * @param n0 above 0, signal units squared
 * @see Proakis, Digital Communications, orthogonal and simplex signals
 */
export function simplexError(order: number, distance: number, n0: number): number {
  const a = distance / Math.sqrt(n0)
  let sum = 0
  for (let z = -a / 2 - span; z <= -a / 2 + span; z += step) sum += density(z) * atLeastOne(order - 1, q(z + a))
  return sum * step
}

/**
 * Symbol error rate of M points that come in opposite pairs at right angles: Q(b) + ∫ φ(z − b)·[1 − (1 − 2·Q(z))^{M/2−1}] dz from 0,
 * with b = d/√N0.
 * @param distance d of two points that are not opposite, signal units
 * @param n0 above 0, signal units squared
 * @see Proakis, Digital Communications, biorthogonal signals
 */
export function biorthogonalError(order: number, distance: number, n0: number): number {
  const b = distance / Math.sqrt(n0)
  let sum = 0
  for (let start = Math.max(0, b / 2 - span); start < b / 2 + span; start += panel) {
    rule.nodes.forEach((node, n) => {
      const z = start + panel * node
      sum += panel * rule.weights[n]! * density(z - b) * atLeastOne(order / 2 - 1, 2 * q(z))
    })
  }
  return q(b) + sum
}

/** 1 − (1 − p)ⁿ without loss where p is small. */
const atLeastOne = (n: number, p: number) => p < 1 ? -Math.expm1(n * Math.log1p(-p)) : 1
