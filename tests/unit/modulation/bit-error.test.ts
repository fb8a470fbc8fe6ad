import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import {
  analyse, berAllPairs, berExact, berExactCurve, berNearest, createConstellation, familyLabels, generate, naturalLabels, q, qInverse,
  requiredEsN0Db, serExact,
} from '../../../shared/modulation'
import { randomFrom } from './seeded'
import { pathOf } from './refusal'

// 30-digit values by tests/reference/data/make-ber.py: brute-force clipping and quadrature with mpmath.
interface Entry {
  name: string
  points: number[][]
  labels: string[]
  probabilities: number[] | null
  rates: { n0: number, berExact: string }[]
}
const table = JSON.parse(readFileSync(new URL('../../reference/data/ber-30-digits.json', import.meta.url), 'utf8')) as Entry[]

describe('the committed table of 30-digit bit error rates', () => {
  it('has at least 100 cases, from above 0.49 to below 1e-19', () => {
    const rates = table.flatMap(entry => entry.rates.map(rate => Number(rate.berExact)))
    expect(rates.length).toBeGreaterThanOrEqual(100)
    expect(Math.max(...rates)).toBeGreaterThan(0.49)
    expect(Math.min(...rates)).toBeLessThan(1e-19)
  })
})

describe.each(table)('exact BER of $name', ({ points, labels, probabilities, rates }) => {
  const geometry = analyse(createConstellation(points, { labels, probabilities }))
  it.each(rates)('at N0 = $n0', ({ n0, berExact: digits }) => {
    expect(Math.abs(berExact(geometry, n0) / Number(digits) - 1)).toBeLessThan(1e-8)
  })
})

/** M points at random in a square. */
const scattered = (seed: number, order: number) => {
  const random = randomFrom(seed)
  return Array.from({ length: order }, () => [2 * random() - 1, 2 * random() - 1])
}
const geometryOf = (points: number[][], labels = naturalLabels(points.length)) => analyse(createConstellation(points, { labels }))

describe('bit error rates', () => {
  const geometry = geometryOf(scattered(1, 64))
  const n0s = [10, 0.3, 0.02, 0.001]
  it('a curve has the values of its points, in the order asked for', () => {
    const curve = berExactCurve(geometry, [0.02, 10, 0.3, 0.001])
    expect([...curve].map((rate, n) => Math.abs(rate / berExact(geometry, [0.02, 10, 0.3, 0.001][n]!) - 1) < 1e-9)).toEqual([true, true, true, true])
  })
  it.each(n0s)('exact lies between a bit a symbol in error and all of them at N0 = %d', (n0) => {
    const ser = serExact(geometry, n0)
    expect(berExact(geometry, n0)).toBeGreaterThanOrEqual(ser / 6)
    expect(berExact(geometry, n0)).toBeLessThanOrEqual(ser)
  })
  it.each(n0s)('the all-pairs bound is no lower than exact and the neighbour approximation at N0 = %d', (n0) => {
    expect(berAllPairs(geometry.constellation, n0)).toBeGreaterThan(berExact(geometry, n0))
    expect(berAllPairs(geometry.constellation, n0)).toBeGreaterThanOrEqual(berNearest(geometry, n0))
  })
  it('of two points is the symbol error rate in every way', () => {
    const pair = geometryOf([[0, 0], [1, 2]])
    expect([berExact(pair, 0.4), berNearest(pair, 0.4), berAllPairs(pair.constellation, 0.4)]).toEqual(
      Array.from({ length: 3 }, () => expect.closeTo(q(Math.sqrt(5 / 0.8)), 13)))
  })
  it('the neighbour approximation of QPSK with natural labels counts 1.5 bits a neighbour', () => {
    const square = geometryOf([[1, 1], [-1, 1], [-1, -1], [1, -1]])
    expect(berNearest(square, 0.1) / q(2 / Math.sqrt(0.2))).toBeCloseTo(1.5, 12)
  })
  it('the bound goes over all pairs in eight dimensions', () => {
    const points = Array.from({ length: 4 }, (_, i) => Array.from({ length: 8 }, (_, n) => Number(n === i)))
    const bound = berAllPairs(createConstellation(points, { labels: naturalLabels(4) }), 0.1)
    // Distances √2; one neighbour at two bits and two at one, of two bits.
    expect(bound / q(Math.SQRT2 / Math.sqrt(0.2))).toBeCloseTo(2, 12)
  })
  it('turning and moving a constellation moves no exact rate by 1e-9', () => {
    const points = scattered(2, 32)
    const moved = points.map(([x, y]) => [0.6 * x! - 0.8 * y! + 3, 0.8 * x! + 0.6 * y! - 7])
    expect(Math.abs(berExact(geometryOf(moved), 0.05) / berExact(geometryOf(points), 0.05) - 1)).toBeLessThan(1e-9)
  })
  it('inverting one bit of every label changes nothing', () => {
    const points = scattered(3, 32)
    const inverted = naturalLabels(32)!.map(label => label.slice(0, 2) + (label[2] === '0' ? '1' : '0') + label.slice(3))
    expect(berExact(geometryOf(points, inverted), 0.05)).toBe(berExact(geometryOf(points), 0.05))
  })
  it('is 0 where the symbol error rate underflows', () => expect(berExact(geometry, 1e-9)).toBe(0))
})

describe('a product whose bits each depend on one factor', () => {
  const levels = [-3, -1, 1.5, 3]
  const points = levels.flatMap(x => levels.map(y => [x, 2 * y]))
  const natural = naturalLabels(4)!
  const labels = natural.flatMap(a => natural.map(b => a + b))
  /** Turned, it is no product in its own coordinates. */
  const turned = points.map(([x, y]) => [0.6 * x! - 0.8 * y!, 0.8 * x! + 0.6 * y!])
  it.each([20, 1, 0.1])('has the mean of their rates, as when it is turned, at N0 = %d', (n0) => {
    expect(Math.abs(berExact(geometryOf(points, labels), n0) / berExact(geometryOf(turned, labels), n0) - 1)).toBeLessThan(1e-9)
  })
  it('keeps unequal probabilities that are products', () => {
    const p = [0.1, 0.4, 0.3, 0.2]
    const probabilities = p.flatMap(a => p.map(b => a * b))
    const rates = [points, turned].map(set => berExact(analyse(createConstellation(set, { labels, probabilities })), 1))
    expect(Math.abs(rates[0]! / rates[1]! - 1)).toBeLessThan(1e-9)
  })
  // Energy Es/N in each coordinate: Q(√(2·Es/(N·N0)))
  it('a hypercube of eight dimensions has the rate of one binary coordinate', () => {
    const cube = analyse(generate('hypercube', { order: 256 }, { labels: familyLabels('hypercube', { order: 256 }) }))
    expect(Math.abs(berExact(cube, 0.05) / q(Math.sqrt(5)) - 1)).toBeLessThan(1e-12)
  })
  it('twice QPSK requires 3.01 dB more than once, at the same energy a bit', () => {
    const factors = [{ family: 'psk', order: 4 }, { family: 'psk', order: 4 }] as const
    const twice = analyse(generate('product', { factors }, { labels: familyLabels('product', { factors }) }))
    expect(requiredEsN0Db({ geometry: twice, kind: 'berExact' }, 1e-5)).toBeCloseTo(20 * Math.log10(qInverse(1e-5)) + 10 * Math.log10(2), 8)
  })
  it('a coordinate that is the same for all points counts nothing', () => {
    expect(berExact(geometryOf(levels.map(x => [x, 7]), natural), 0.4)).toBeCloseTo(berExact(geometryOf(levels.map(x => [x]), natural), 0.4), 14)
  })
})

describe('a seeded Monte Carlo agrees with the exact BER', () => {
  it('of 16 random points at 12 dB', () => {
    const random = randomFrom(99)
    const points = scattered(4, 16)
    const geometry = geometryOf(points)
    const n0 = geometry.constellation.meanEnergy / 10 ** 1.2
    const trials = 200_000
    let wrong = 0
    for (let n = 0; n < trials; n++) {
      const i = Math.floor(random() * 16)
      const radius = Math.sqrt(-n0 * Math.log(1 - random()))
      const angle = 2 * Math.PI * random()
      const [x, y] = [points[i]![0]! + radius * Math.cos(angle), points[i]![1]! + radius * Math.sin(angle)]
      let best = 0
      points.forEach(([u, v], j) => {
        if (Math.hypot(u! - x, v! - y) < Math.hypot(points[best]![0]! - x, points[best]![1]! - y)) best = j
      })
      wrong += (i ^ best).toString(2).replaceAll('0', '').length
    }
    const rate = berExact(geometry, n0)
    // At most four wrong bits a symbol, so the deviation of the mean is below √(4·BER/trials/4).
    expect(Math.abs(wrong / trials / 4 - rate)).toBeLessThan(4 * Math.sqrt(rate / trials))
  })
})

describe('refused', () => {
  const unlabelled = analyse(generate('psk', { order: 8 }))
  it.each([
    ['exact', () => berExact(unlabelled, 0.1)], ['neighbours', () => berNearest(unlabelled, 0.1)], ['all pairs', () => berAllPairs(unlabelled.constellation, 0.1)],
  ])('without labels: %s', (_, call) => expect(pathOf(call)).toEqual(['labels']))
  it('says the remedy', () => expect(() => berExact(unlabelled, 0.1)).toThrow('A bit error rate needs labels: give each of the 8 points a different word of 3 bits.'))
  it('says that the number of points is no power of two', () => {
    expect(() => berExact(analyse(generate('psk', { order: 6 })), 0.1)).toThrow('labels need a power of two of points, and there are 6.')
  })
  it('biorthogonal signals in four dimensions, which are no product', () => {
    const geometry = analyse(generate('biorthogonal', { order: 8 }, { labels: familyLabels('biorthogonal', { order: 8 }) }))
    expect(pathOf(() => berExact(geometry, 0.1))).toEqual(['dimensions'])
  })
  it('a noise density of 0', () => expect(pathOf(() => berExact(geometryOf(scattered(5, 4)), 0))).toEqual(['n0']))
})
