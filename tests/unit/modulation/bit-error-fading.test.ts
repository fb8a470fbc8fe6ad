import { describe, expect, it } from 'vitest'
import {
  analyse, berAllPairs, berExact, berExactCurve, berFading, berFadingCurve, berNearest, createConstellation, familyLabels, gaussLegendre, generate, naturalLabels, serFading,
} from '../../../shared/modulation'
import type { Geometry } from '../../../shared/modulation'
import { randomFrom } from './seeded'

const relative = (value: number, wanted: number) => Math.abs(value / wanted - 1)
const rayleigh = { kind: 'rayleigh', branches: 1 } as const
const gray = (id: 'qam' | 'psk' | 'pam' | 'hexagonal', order: number) => analyse(generate(id, { order }, { labels: familyLabels(id, { order }) }))

/** Average of an error rate over the gain of two Rayleigh branches, g·exp(−g) at g = x²: composite Gauss–Legendre. */
function averaged(rates: (n0s: number[]) => Float64Array, n0: number, count = 40): number {
  const { nodes, weights } = gaussLegendre(count)
  const ends = [0, 1e-3, 1e-2, 0.03, 0.1, 0.3, 0.6, 1, 1.5, 2, 3, 4, 6]
  const places = ends.slice(1).flatMap((end, e) => [...nodes].map((node, i) => ({ x: ends[e]! + (end - ends[e]!) * node, weight: weights[i]! * (end - ends[e]!) })))
  const values = rates(places.map(({ x }) => n0 / (x * x)))
  return places.reduce((sum, { x, weight }, i) => sum + weight * 2 * x ** 3 * values[i]! * Math.exp(-x * x), 0)
}

describe('bit error rates under fading against averages of the Gaussian channel', () => {
  const random = randomFrom(8)
  const points = Array.from({ length: 16 }, () => [2 * random() - 1, 2 * random() - 1])
  const sets: [string, Geometry][] = [
    ['random points', analyse(createConstellation(points, { labels: naturalLabels(16) }))],
    ['hexagonal 32', gray('hexagonal', 32)],
    ['16-QAM', gray('qam', 16)],
    ['points on a line', analyse(createConstellation([[-1.3], [-0.2], [0.1], [1.6]], { labels: ['00', '11', '01', '10'] }))],
  ]
  const channel = { kind: 'rayleigh', branches: 2 } as const
  describe.each(sets)('%s', (_, geometry) => {
    it.each([0.5, 0.02, 0.0005])('at N0 = %d', (n0) => {
      expect(relative(berFading(geometry, 'berExact', n0, channel), averaged(n0s => berExactCurve(geometry, n0s), n0))).toBeLessThan(1e-8)
      expect(relative(berFading(geometry, 'berNearest', n0, channel), averaged(n0s => Float64Array.from(n0s, at => berNearest(geometry, at)), n0))).toBeLessThan(1e-9)
      expect(relative(berFading(geometry, 'berAllPairs', n0, channel), averaged(n0s => Float64Array.from(n0s, at => berAllPairs(geometry.constellation, at)), n0))).toBeLessThan(1e-9)
    })
  })
})

describe('bit error rates under fading', () => {
  it('Gray 4-PSK has that of binary PSK at half the SNR', () => {
    const snr = 20
    expect(relative(berFading(gray('psk', 4), 'berExact', 1 / snr, rayleigh), (1 - Math.sqrt(snr / 2 / (1 + snr / 2))) / 2)).toBeLessThan(1e-12)
  })

  // Cho and Yoon 2002: Gray 16-QAM is ¾·Q(x) + ½·Q(3x) − ¼·Q(5x), x² = Es/(5·N0); over Rayleigh fading E Q(√(2c·g)) = ½(1 − √(c/(1+c)))
  it('Gray 16-QAM over Rayleigh fading is Cho and Yoon’s sum averaged', () => {
    const pair = (c: number) => (1 - Math.sqrt(c / (1 + c))) / 2
    const c = 50 / 10
    expect(relative(berFading(gray('qam', 16), 'berExact', 1 / 50, rayleigh), 0.75 * pair(c) + 0.5 * pair(9 * c) - 0.25 * pair(25 * c))).toBeLessThan(1e-12)
  })

  it('it lies between the symbol error rate and its k-th part', () => {
    const geometry = gray('hexagonal', 16)
    const ser = serFading(geometry, 'serExact', 0.01, rayleigh)
    const ber = berFading(geometry, 'berExact', 0.01, rayleigh)
    expect(ber).toBeGreaterThan(ser / 4)
    expect(ber).toBeLessThan(ser)
  })

  it('256 random points, more than are held at a time, are averaged as well', () => {
    const random = randomFrom(3)
    const points = Array.from({ length: 256 }, () => [random(), random()])
    const geometry = analyse(createConstellation(points, { labels: naturalLabels(256) }))
    const channel = { kind: 'rayleigh', branches: 2 } as const
    expect(relative(berFading(geometry, 'berExact', 0.001, channel), averaged(n0s => berExactCurve(geometry, n0s), 0.001, 12))).toBeLessThan(1e-8)
  }, 60000)

  it('many noise densities at once are each alone', () => {
    const geometry = gray('qam', 16)
    expect(berFadingCurve(geometry, 'berExact', [0.3, 0.01], rayleigh)[1]).toBe(berFading(geometry, 'berExact', 0.01, rayleigh))
  })

  it('without fading it is that of the Gaussian channel', () => {
    const geometry = gray('qam', 16)
    expect(berFading(geometry, 'berExact', 0.1, { kind: 'awgn' })).toBe(berExact(geometry, 0.1))
  })

  it('without labels it is refused at the labels', () => {
    expect(() => berFading(analyse(generate('qam', { order: 16 })), 'berExact', 0.1, rayleigh)).toThrow(expect.objectContaining({ path: ['labels'] }))
  })
})
