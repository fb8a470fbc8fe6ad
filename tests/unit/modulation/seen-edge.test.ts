import { describe, expect, it } from 'vitest'
import { gaussLegendre, q } from '../../../shared/modulation'
import { SeenEdge } from '../../../shared/modulation/symbol-error-seen-edge'

const rule = gaussLegendre(40)
const edge = new SeenEdge()

/** The flow through an edge at N0 = 1. */
function flow(h: number, t1: number, t2: number): number {
  const sums = new Float64Array(1)
  edge.take(h, t1, t2)
  edge.addTo(sums, 1, Float64Array.of(1), 1)
  return sums[0]!
}

/** The same by 40 nodes on each of many parts that shrink towards the foot; what lies beyond an exponent of 60 is left out. */
function dense(h: number, t1: number, t2: number): number {
  const least = t1 > 0 ? t1 * t1 : 0
  const end = Math.sqrt(least + 60)
  const ends = [0, ...Array.from({ length: 60 }, (_, n) => h * 1.4 ** (n - 12))].flatMap(t => [t, -t])
  const near = Array.from({ length: 16 }, (_, n) => Math.max(t1, 0) + (Math.min(t2, end) - Math.max(t1, 0)) * n / 16)
  const [from, to] = [Math.max(t1, -end), Math.min(t2, end)]
  const cuts = [...new Set([from, ...ends, ...near, to])].filter(t => t >= from && t <= to).sort((a, b) => a - b)
  let sum = 0
  for (let c = 1; c < cuts.length; c++) {
    const [a, length] = [cuts[c - 1]!, cuts[c]! - cuts[c - 1]!]
    rule.nodes.forEach((node, i) => {
      const square = h * h + (a + length * node) ** 2
      sum += rule.weights[i]! * length * Math.exp(-square) * h / square
    })
  }
  return sum / (2 * Math.PI)
}

/** Lengths from 0.001 to 100, in units of √N0. */
const lengths = Array.from({ length: 21 }, (_, n) => 0.001 * 10 ** (n / 4))

describe('the flow through an edge seen from any point', () => {
  it.each(lengths)('is right to 2e-10 for edges of length %d', (length) => {
    let worst = 0
    // The point at places of ellipses about the edge, from close to it for its length to far away.
    for (const size of [1.001, 1.04, 1.06, 1.15, 1.3, 1.5, 1.8, 2.5, 3.5, 5, 8, 15, 30, 100, 1000]) {
      for (let turn = 0.02; turn < 1; turn += 0.07) {
        const middle = size * length / 2 * Math.cos(turn * Math.PI / 2)
        const h = Math.sqrt(size * size - 1) * length / 2 * Math.sin(turn * Math.PI / 2)
        const [t1, t2] = [middle - length / 2, middle + length / 2]
        if (h * h + (t1 > 0 ? t1 * t1 : 0) > 60) continue
        worst = Math.max(worst, Math.abs(flow(h, t1, t2) / dense(h, t1, t2) - 1))
      }
    }
    expect(worst).toBeLessThan(2e-10)
  })
  it.each([0.001, 0.1, 1, 4])('is right to 2e-10 for half lines at distance %d', (h) => {
    const errors = [-3, -0.5, 0.01, 1, 3].map(t1 => Math.abs(flow(h, t1, Infinity) / dense(h, t1, Infinity) - 1))
    expect(Math.max(...errors)).toBeLessThan(2e-10)
  })
  it('is Q for a whole line', () => expect(flow(1.3, -Infinity, Infinity)).toBeCloseTo(q(1.3 * Math.SQRT2), 15))
  it('is half of Q from the foot on', () => expect(flow(1.3, 0, Infinity)).toBeCloseTo(q(1.3 * Math.SQRT2) / 2, 15))
})
