import { describe, expect, it } from 'vitest'
import { gaussLegendre } from '../../../shared/modulation'
import { PieceIntegral } from '../../../shared/modulation/symbol-error-edge'

const rule = gaussLegendre(60)
const logarithmic = (from: number, to: number, count: number) => Array.from({ length: count }, (_, n) => from * (to / from) ** (n / (count - 1)))

/** The same integral with 720 nodes in v and Math.exp. */
function slow(h: number, a: number, b: number): number {
  const from = Math.asinh(a / h)
  const span = Math.min(45, Math.asinh((b - a) * (b + a) / (b * Math.hypot(h, a) + a * Math.hypot(h, b))))
  let sum = 0
  for (let panel = 0; panel < 12; panel++) {
    rule.nodes.forEach((node, n) => {
      const cosh = Math.cosh(from + span * (panel + node) / 12)
      sum += rule.weights[n]! * Math.exp(-h * h * cosh * cosh) / cosh
    })
  }
  return sum * span / 12 / (2 * Math.PI)
}

describe('the error integral over a piece of an edge, N0 = 1', () => {
  const piece = new PieceIntegral()
  // h from a line almost through the point to an exponent near 600, pieces from tiny to clipped.
  it.each([0, 0.001, 0.03, 0.2, 0.7, 1.5, 3, 8])('is right to 2e-11 for pieces that begin at %d', (a) => {
    for (const h of logarithmic(1e-9, 24, 40)) {
      for (const fall of logarithmic(1e-4, 60, 40)) {
        const b = Math.sqrt(a * a + fall)
        piece.take(h, a, b)
        const wanted = slow(h, a, b)
        if (wanted > 1e-290) expect(Math.abs(piece.at(1) / wanted - 1), `h ${h}, b ${b}`).toBeLessThan(2e-11)
      }
    }
  })
  it('over half a line is Q/2', () => {
    piece.take(0.5, 0, Infinity)
    // Q(√2/2)/2, mpmath
    expect(piece.at(1)).toBeCloseTo(0.1198750305, 9)
  })
  it('over a half line cut at 1 adds up to the whole', () => {
    piece.take(0.5, 0, 1)
    const near = piece.at(1)
    piece.take(0.5, 1, Infinity)
    const far = piece.at(1)
    piece.take(0.5, 0, Infinity)
    expect(near + far).toBeCloseTo(piece.at(1), 13)
  })
})
