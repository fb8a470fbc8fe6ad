import { expNegative } from './exponential'
import { q } from './gaussian'
import { gaussLegendre } from './quadrature'
import type { Rule } from './quadrature'
import { PieceIntegral } from './symbol-error-edge'

/** Where the exponent has fallen by this much, the rest of an edge is below 1e-11 of its beginning. */
const clipping = 26

const mostNodes = 40
const rules: Rule[] = Array.from({ length: mostNodes + 1 }, (_, n) => gaussLegendre(n))

/**
 * Nodes for 1e-10 relative, measured over edges and points of every shape (tests/unit/modulation/seen-edge.test.ts repeats it more coarsely).
 * Three things ask for nodes, and the most demanding rules: the pole at the point, by (distance to one end + to the other)/length,
 * which is the size of the ellipse about the edge that the pole leaves; how much the exponent falls from end to end; and length²/N0,
 * how much it bends.
 */
const nodesForShape: readonly (readonly [number, number])[] = [
  [50, 3], [20, 4], [10, 5], [6, 6], [4, 7], [3, 8], [2, 11], [1.7, 13], [1.4, 16], [1.2, 22], [1.1, 31], [1.05, mostNodes],
]
const nodesForFall: readonly (readonly [number, number])[] = [[0.01, 3], [0.25, 4], [1, 5], [2, 6], [4, 7], [8, 9], [16, 12], [Infinity, 15]]
const nodesForBend: readonly (readonly [number, number])[] = [
  [0.01, 3], [0.1, 4], [0.25, 5], [1, 6], [2, 7], [4, 9], [8, 10], [16, 13], [32, 18], [64, 25], [Infinity, 33],
]

/** Tables by x·32 up to 8 and by x beyond, up to 64. */
const fineSteps = 32
const fineEnd = 8
const coarseEnd = 64
const lookUp = (steps: readonly (readonly [number, number])[]) => {
  const at = (x: number) => steps.find(([limit]) => x < limit)![1]
  return {
    fine: Uint8Array.from({ length: fineSteps * fineEnd }, (_, n) => at((n + 1) / fineSteps * (1 - 1e-12))),
    coarse: Uint8Array.from({ length: coarseEnd + 1 }, (_, n) => at(n === coarseEnd ? 1e9 : (n + 1) * (1 - 1e-12))),
  }
}
const fallTable = lookUp(nodesForFall)
const bendTable = lookUp(nodesForBend)
const read = (table: { fine: Uint8Array, coarse: Uint8Array }, x: number): number =>
  x < fineEnd ? table.fine[(x * fineSteps) | 0]! : table.coarse[x < coarseEnd ? x | 0 : coarseEnd]!

/** Nodes for the pole; more than there are where the point is close to the edge for its length. */
function shapeNodes(shape: number): number {
  for (let n = 0; n < nodesForShape.length; n++) {
    if (shape >= nodesForShape[n]![0]) return nodesForShape[n]![1]
  }
  return mostNodes + 1
}

/** For points close to an edge for its length. */
const pieces = new PieceIntegral()

/**
 * (1/2π)·∫ exp(−(h²+t²)/N0)·h/(h²+t²) dt along an edge of any cell, seen from any point, for one edge and many noise densities:
 * the flow of the noise of that point through the edge. Directly in t, as a far edge is short; nodes do not depend on N0 and are kept.
 * @see methods §2, §3; Craig 1991; Szczecinski et al. 2003
 */
export class SeenEdge {
  private h = 1
  private t1 = 0
  private t2 = 1
  private shape = 0
  private edge = 0
  private readonly madeFor = new Int32Array(mostNodes + 1)
  private readonly squares = rules.map(rule => new Float64Array(rule.nodes.length))
  private readonly factors = rules.map(rule => new Float64Array(rule.nodes.length))

  /**
   * Takes up another edge.
   * @param h distance from the point to the edge's line, above 0, signal units
   * @param t1 nearer or equally near end, from the foot of the perpendicular; with t1 + t2 ≥ 0
   * @param t2 the other end, above t1; ends may be infinite
   */
  take(h: number, t1: number, t2: number): void {
    this.h = h
    this.t1 = t1
    this.t2 = t2
    this.edge++
    this.shape = 0
  }

  /**
   * Adds the flow, times a factor, to a sum for each noise density.
   * @param factor of either sign
   * @param densities noise densities N0, signal units squared
   * @param count how many of them, from the first on
   * @param sums one for each; what is added is off by less than 2e-10 of itself
   */
  addTo(sums: Float64Array, factor: number, densities: Float64Array, count: number): void {
    const { h, t1, t2 } = this
    if (t2 === Infinity && (t1 === -Infinity || t1 === 0)) {
      const part = t1 === 0 ? factor / 2 : factor
      for (let s = 0; s < count; s++) sums[s]! += part * q(h * Math.sqrt(2 / densities[s]!))
      return
    }
    const length = t2 - t1
    const fall = length * (t1 + t2)
    const bend = length * length
    const range = t2 * t2 - (t1 > 0 ? t1 * t1 : 0)
    for (let s = 0; s < count; s++) {
      const n0 = densities[s]!
      const scale = 1 / n0
      if (range * scale > clipping) {
        sums[s]! += factor * this.clipped(n0)
        continue
      }
      if (this.shape === 0) this.shape = shapeNodes((Math.sqrt(h * h + t1 * t1) + Math.sqrt(h * h + t2 * t2)) / length)
      const n = Math.max(this.shape, read(fallTable, fall * scale), read(bendTable, bend * scale))
      if (n > mostNodes) {
        sums[s]! += factor * inPieces(h, t1, t2, n0)
        continue
      }
      if (this.madeFor[n] !== this.edge) this.makeNodes(n)
      const squares = this.squares[n]!
      const factors = this.factors[n]!
      let sum = 0
      for (let i = 0; i < n; i++) sum += factors[i]! * expNegative(-squares[i]! * scale)
      sums[s]! += factor * sum
    }
  }

  /** h² + t² at the nodes, and weight·h/(2π·(h²+t²)). */
  private makeNodes(n: number): void {
    this.madeFor[n] = this.edge
    const { nodes, weights } = rules[n]!
    const { h, t1, t2 } = this
    const length = t2 - t1
    const factor = h * length / (2 * Math.PI)
    const squares = this.squares[n]!
    const factors = this.factors[n]!
    for (let i = 0; i < n; i++) {
      const t = t1 + length * nodes[i]!
      const square = h * h + t * t
      squares[i] = square
      factors[i] = factor * weights[i]! / square
    }
  }

  /** An edge whose far end, or both, the noise hardly reaches. */
  private clipped(n0: number): number {
    const { h } = this
    const a = Math.max(this.t1, -Math.sqrt(clipping * n0))
    const b = Math.sqrt((a > 0 ? a * a : 0) + clipping * n0)
    const length = b - a
    const shape = shapeNodes((Math.sqrt(h * h + a * a) + Math.sqrt(h * h + b * b)) / length)
    const n = Math.max(shape, read(fallTable, length * (a + b) / n0), read(bendTable, length * length / n0))
    if (n > mostNodes) return inPieces(h, a, b, n0)
    const { nodes, weights } = rules[n]!
    let sum = 0
    for (let i = 0; i < n; i++) {
      const t = a + length * nodes[i]!
      const square = h * h + t * t
      sum += weights[i]! * expNegative(-square / n0) / square
    }
    return sum * h * length / (2 * Math.PI)
  }
}

/** Cut at the foot, with the pole taken out. */
function inPieces(h: number, a: number, b: number, n0: number): number {
  if (a >= 0) return piece(h, a, b, n0)
  return piece(h, 0, b, n0) + piece(h, 0, -a, n0)
}

function piece(h: number, a: number, b: number, n0: number): number {
  pieces.take(h, a, b)
  return pieces.at(n0)
}
