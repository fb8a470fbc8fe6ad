import { expNegative } from './exponential'
import { q } from './gaussian'
import { gaussLegendre } from './quadrature'
import type { Rule } from './quadrature'

/**
 * Where the exponent has fallen by this much, the rest of an edge is below 2e-14 of its beginning.
 * (Methods §2 allows 42; 32 already is a hundred times finer than what the nodes are chosen for.)
 */
const clipping = 32

/** Beyond this length in v the weight 1/cosh v alone has fallen below 1e-13. */
const longest = 30

/** Up to this length in v one rule serves; longer pieces, of lines almost through the point, take two. */
const oneRule = 8

const mostNodes = 40
const rules: Rule[] = Array.from({ length: mostNodes + 1 }, (_, n) => gaussLegendre(n))

/**
 * Nodes that give 3e-12 relative, as measured over lines from 0.001·√N0 to 40·√N0 away and pieces of every length
 * (tests/unit/modulation/edge.test.ts repeats the measurement on a coarser mesh).
 * @param span length in v, up to 8
 * @param fall how much the exponent falls along the piece, up to 32
 */
function nodesFor(span: number, fall: number): number {
  const forSpan = 5 + 2.8 * span
  if (fall <= 1.7) return Math.ceil(Math.max(forSpan, fall <= 0.15 ? 6 : fall <= 0.5 ? 7 : 8))
  const forFall = fall <= 5 ? 10 : fall <= 10 ? 12.5 : fall <= 17 ? 14 : 17
  return Math.ceil(Math.max(forSpan, forFall + 1.5 * span))
}

/**
 * Probability that noise carries a point across a piece of its cell's edge, for one piece and many noise densities:
 * (1/2π)·∫_a^b exp(−(h²+t²)/N0)·h/(h²+t²) dt. With t = h·sinh v it is (1/2π)·∫ exp(−h²·cosh²v/N0)/cosh v dv, without
 * the pole that the first form has near a small h. Nodes do not depend on N0 unless the piece is clipped, and are kept.
 * @see methods §2; Craig 1991
 */
export class PieceIntegral {
  private h = 1
  private a = 0
  private b = Infinity
  private from = 0
  private span = 0
  private piece = 0
  private readonly madeFor = new Int32Array(mostNodes + 1)
  private readonly squares = rules.map(rule => new Float64Array(rule.nodes.length))
  private readonly factors = rules.map(rule => new Float64Array(rule.nodes.length))

  /**
   * Takes up another piece.
   * @param h distance from the point to the edge's line, above 0, signal units
   * @param a nearer end of the piece, from the foot of the perpendicular, at least 0
   * @param b farther end, above a, may be infinite
   */
  take(h: number, a: number, b: number): void {
    this.h = h
    this.a = a
    this.b = b
    this.piece++
    this.from = Math.asinh(a / h)
    this.span = b === Infinity ? Infinity : spanOf(h, a, b)
  }

  /**
   * @param n0 noise density N0, signal units squared
   * @returns probability, relative error below 1e-11
   */
  at(n0: number): number {
    const { h, a, b } = this
    if (a === 0 && b === Infinity) return q(h * Math.sqrt(2 / n0)) / 2
    const fall = (b * b - a * a) / n0
    const k = h * h / n0
    if (fall > clipping) {
      return clipped(k, this.from, spanOf(h, a, Math.sqrt(a * a + clipping * n0))) / (2 * Math.PI)
    }
    if (this.span > oneRule) return clipped(k, this.from, this.span) / (2 * Math.PI)
    const n = nodesFor(this.span, fall)
    if (this.madeFor[n] !== this.piece) this.makeNodes(n)
    const squares = this.squares[n]!
    const factors = this.factors[n]!
    let sum = 0
    for (let i = 0; i < n; i++) sum += factors[i]! * expNegative(-k * squares[i]!)
    return sum
  }

  /** cosh²v at the nodes, and weight/(2π·cosh v). */
  private makeNodes(n: number): void {
    this.madeFor[n] = this.piece
    const { nodes, weights } = rules[n]!
    for (let i = 0; i < n; i++) {
      const cosh = coshOf(this.from + this.span * nodes[i]!)
      this.squares[n]![i] = cosh * cosh
      this.factors[n]![i] = weights[i]! * this.span / (2 * Math.PI * cosh)
    }
  }
}

/** Length in v of a piece, from the sinh of the difference of its ends, without subtracting them. */
export function spanOf(h: number, a: number, b: number): number {
  return Math.asinh((b - a) * (b + a) / (b * Math.hypot(h, a) + a * Math.hypot(h, b)))
}

/** cosh v for v ≥ 0. */
function coshOf(v: number): number {
  const half = expNegative(-v)
  return (half + 1 / half) / 2
}

/** ∫ exp(−k·cosh²v)/cosh v dv over a piece whose exponent falls by 32, or whose span is long. */
function clipped(k: number, from: number, span: number): number {
  if (span <= oneRule) return integrate(rules[nodesFor(span, clipping)]!, k, from, span)
  const half = Math.min(span, longest) / 2
  return integrate(rules[mostNodes]!, k, from, half) + integrate(rules[mostNodes]!, k, from + half, half)
}

function integrate({ nodes, weights }: Rule, k: number, from: number, span: number): number {
  let sum = 0
  for (let i = 0; i < nodes.length; i++) {
    const cosh = coshOf(from + span * nodes[i]!)
    sum += weights[i]! * expNegative(-k * cosh * cosh) / cosh
  }
  return sum * span
}
