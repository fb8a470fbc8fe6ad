import type { Fading } from './fading'
import { gaussLegendre } from './quadrature'
import type { Rule } from './quadrature'
import { spanOf } from './symbol-error-edge'

/**
 * Panels of an edge's angle. In v every singularity of the integrand lies on |Im v| = π/2 whatever the distance and the SNR, so that a
 * panel may be this long; where the logarithm of the integrand falls fast, panels are shorter. Together: 1e-12 relative, as measured by
 * tests/unit/modulation/fading.test.ts.
 */
const longestPanel = 2
const fallOfPanel = 8
const { nodes, weights } = gaussLegendre(16)

/** Up to this length over the distance and this fall of the logarithm a few nodes in t itself serve, without hyperbolic functions. */
const shortest = { length: 0.12, fall: 0.25, rule: gaussLegendre(5) }
const short = { length: 0.5, fall: 1, rule: gaussLegendre(8) }

/** What lies behind the last panel may be this part of the sum. */
const negligible = 1e-14

/**
 * Probability that noise carries a point across a piece of its cell's edge, averaged over a fading channel:
 * (1/2π)·∫ M(h²/(N0·sin²θ)) dθ over the piece's whole angle, M(s) = E exp(−s·g). With 1/sin θ = cosh v the angle's
 * measure becomes dv/cosh v, which takes lines almost through the point as well.
 * @param h distance from the point to the edge's line, above 0, signal units
 * @param a nearer end of the piece, from the foot of the perpendicular, at least 0
 * @param b farther end, above a, may be infinite
 * @param n0 noise density N0, signal units squared
 * @see methods §6; Simon and Alouini, Digital Communication over Fading Channels, §§5.4 and 8.2
 */
export function fadedPiece(fading: Fading, h: number, a: number, b: number, n0: number): number {
  const { moment, slope } = fading
  const square = h * h + a * a
  const length = b - a
  if (length * length <= short.length ** 2 * square) {
    const fall = slope(square / n0) * length * (b + a) / n0
    const few = fall <= shortest.fall && length * length <= shortest.length ** 2 * square
    if (fall <= short.fall) return shortPiece(moment, h, a, length, n0, few ? shortest.rule : short.rule)
  }
  const scale = h * h / n0
  const from = Math.asinh(a / h)
  const span = b === Infinity ? Infinity : spanOf(h, a, b)
  let sum = 0
  for (let begin = 0; begin < span;) {
    const cosh = Math.cosh(from + begin)
    const s = scale * cosh * cosh
    // ∫ of dv/cosh v from here on is at most 2/cosh v, and the moment falls.
    if (2 * moment(s) / cosh <= negligible * sum || moment(s) === 0) break
    const end = Math.min(span, begin + Math.min(longestPanel, panelOf(scale, s, fallOfPanel / slope(s))))
    let part = 0
    for (let n = 0; n < nodes.length; n++) {
      const c = Math.cosh(from + begin + (end - begin) * nodes[n]!)
      part += weights[n]! * moment(scale * c * c) / c
    }
    sum += part * (end - begin)
    begin = end
  }
  return sum / (2 * Math.PI)
}

function shortPiece(moment: Fading['moment'], h: number, a: number, length: number, n0: number, rule: Rule): number {
  let sum = 0
  for (let n = 0; n < rule.nodes.length; n++) {
    const t = a + length * rule.nodes[n]!
    const square = h * h + t * t
    sum += rule.weights[n]! * moment(square / n0) / square
  }
  return sum * h * length / (2 * Math.PI)
}

/** Length in v over which s = scale·cosh²v rises by a given amount, from the difference of the sinh of its ends. */
function panelOf(scale: number, s: number, rise: number): number {
  const ratio = s / scale
  const later = ratio + rise / scale
  const [near, far] = [Math.sqrt(Math.max(0, ratio - 1)), Math.sqrt(later - 1)]
  return Math.asinh((rise / scale) / (far * Math.sqrt(ratio) + near * Math.sqrt(later)))
}
