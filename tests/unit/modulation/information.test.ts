import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { bitMetricRate, createConstellation, fromDecibels, generate, isInterval, lowOf, highOf, mutualInformation, rateCurves, valueOf } from '../../../shared/modulation'
import type { Constellation } from '../../../shared/modulation'
import { informationSources } from '../../../shared/modulation/information-source'
import { planeEquivocation } from '../../../shared/modulation/information-plane'
import { simulatedEquivocation } from '../../../shared/modulation/information-simulated'
import reference from '../../reference/data/scipy-information.json'
import { randomFrom } from './seeded'

const n0At = (constellation: Constellation, db: number) => constellation.meanEnergy / fromDecibels(db)
const words = (order: number) => Array.from({ length: order }, (_, i) => i.toString(2).padStart(Math.log2(order), '0'))
const scattered = (order: number, dimensions: number, seed: number) => {
  const random = randomFrom(seed)
  return Array.from({ length: order }, () => Array.from({ length: dimensions }, () => 2 * random() - 1))
}
const grid = (side: number) => Array.from({ length: side * side }, (_, n) => [2 * Math.floor(n / side) - side + 1, 2 * (n % side) - side + 1])

// made by tests/reference/data/make-information.py
describe(`rates as by ${reference.madeWith}`, () => {
  for (const { name, points, probabilities, labels, rates } of reference.cases) {
    const constellation = createConstellation(points, { probabilities, labels })
    it.each(rates)(`${name} at $db dB`, ({ db, mutualInformation: wanted, bitMetricRate: wantedOfBits }) => {
      expect(Math.abs(valueOf(mutualInformation(constellation, n0At(constellation, db))) - wanted)).toBeLessThan(1e-8)
      expect(Math.abs(valueOf(bitMetricRate(constellation, n0At(constellation, db))) - wantedOfBits)).toBeLessThan(1e-8)
    })
  }
})

/** Mean over each point's own noise by the midpoint rule, every node asking every point. */
function bruteForce(constellation: Constellation, n0: number): number {
  const { order, points, probabilities } = constellation
  const step = 1 / 16
  let lost = 0
  for (let i = 0; i < order; i++) {
    for (let u = -6 + step / 2; u < 6; u += step) {
      for (let v = -6 + step / 2; v < 6; v += step) {
        const [x, y] = [points[2 * i]! + u * Math.sqrt(n0), points[2 * i + 1]! + v * Math.sqrt(n0)]
        let all = 0
        for (let j = 0; j < order; j++) all += probabilities![j]! * Math.exp(u * u + v * v - ((x - points[2 * j]!) ** 2 + (y - points[2 * j + 1]!) ** 2) / n0)
        lost += probabilities![i]! * Math.exp(-u * u - v * v) * Math.log2(all / probabilities![i]!)
      }
    }
  }
  return constellation.entropy - lost * step * step / Math.PI
}

describe('mutual information', () => {
  it('is that of brute-force quadrature for random points, probabilities and noise', () => fc.assert(fc.property(
    fc.integer({ min: 2, max: 7 }), fc.integer({ min: 1, max: 1e6 }), fc.double({ min: -10, max: 25, noNaN: true }), (order, seed, db) => {
      const random = randomFrom(seed + 1)
      const weights = Array.from({ length: order }, () => 0.2 + random())
      const sum = weights.reduce((a, b) => a + b)
      const constellation = createConstellation(scattered(order, 2, seed), { probabilities: weights.map(w => w / sum) })
      const n0 = n0At(constellation, db)
      expect(Math.abs(valueOf(mutualInformation(constellation, n0)) - bruteForce(constellation, n0))).toBeLessThan(1e-7)
    }), { seed: 5, numRuns: 30 }))
  it('of a rectangular set by its factors is that of the whole plane', () => {
    const points = grid(8)
    const turned = points.map(([x, y]) => [0.6 * x! - 0.8 * y!, 0.8 * x! + 0.6 * y!])
    const [straight, oblique] = [createConstellation(points), createConstellation(turned)]
    expect(informationSources(straight, false).map(({ order }) => order)).toEqual([8, 8])
    expect(informationSources(oblique, false).map(({ order }) => order)).toEqual([64])
    for (const db of [-5, 5, 15, 20]) {
      const n0 = n0At(straight, db)
      expect(valueOf(mutualInformation(oblique, n0))).toBeCloseTo(valueOf(mutualInformation(straight, n0)), 8)
    }
  })
  it('of a rectangular set with probabilities that are no products takes the whole plane', () => {
    const constellation = createConstellation(grid(2), { probabilities: [0.4, 0.1, 0.1, 0.4] })
    expect(informationSources(constellation, false)).toHaveLength(1)
  })
  it('does not depend on where the nodes lie', () => {
    const constellation = createConstellation(scattered(32, 2, 3))
    const source = informationSources(constellation, false)[0]!
    for (const db of [5, 12, 18, 24]) {
      // The same set moved by a part of a step: all errors of the rule change.
      const moved = createConstellation(scattered(32, 2, 3).map(([x, y]) => [x! + 0.017, y! - 0.011]))
      const n0 = n0At(constellation, db)
      expect(planeEquivocation(informationSources(moved, false)[0]!, n0).symbol).toBeCloseTo(planeEquivocation(source, n0).symbol, 8)
    }
  })
  it('is the entropy at 90 dB, and 0 bit at −90 dB to nine digits', () => {
    const constellation = generate('psk', { order: 8 }, { probabilities: [0.3, 0.1, 0.1, 0.1, 0.1, 0.1, 0.1, 0.1] })
    expect(mutualInformation(constellation, 1e-9)).toBe(constellation.entropy)
    expect(mutualInformation(constellation, 1e9)).toBeCloseTo(0, 8)
  })
  it('grows as Es/N0·log2 e where noise prevails', () => {
    expect(valueOf(mutualInformation(generate('qam', { order: 16 }), 1e5)) / (1e-5 / Math.LN2)).toBeCloseTo(1, 4)
  })
  it('costs nothing for far points: one at 1e9 times the spacing of the others', () => {
    const constellation = createConstellation([[0, 0], [1, 0], [0, 1], [9e8, 0]])
    expect(valueOf(mutualInformation(constellation, 0.01))).toBeCloseTo(2, 8)
  })
  it('refuses a noise density of 0', () => {
    expect(() => mutualInformation(generate('psk', { order: 4 }), 0)).toThrow('The noise density N0 is a finite number above 0.')
  })
})

describe('bit-metric rate', () => {
  it('refuses points without labels', () => {
    expect(() => bitMetricRate(createConstellation([[1], [-1]]), 0.1)).toThrow('A bit-metric rate needs labels')
  })
  it('of labels whose bits each depend on one coordinate is the sum over the coordinates', () => {
    const labels = grid(4).map((_, n) => words(4)[n >> 2]! + words(4)[n & 3]!)
    const mixed = labels.map(label => label[0]! + label[2]! + label[1]! + label[3]!)
    expect(informationSources(createConstellation(grid(4), { labels }), true)).toHaveLength(2)
    const [a, b] = [labels, mixed].map(labels => valueOf(bitMetricRate(createConstellation(grid(4), { labels }), 2)))
    expect(a).toBeCloseTo(b!, 12)
  })
  it('of labels that mix the coordinates takes the whole plane', () => {
    const labels = grid(2).map((_, n) => ['00', '11', '10', '01'][n]!)
    expect(informationSources(createConstellation(grid(2), { labels }), true)).toHaveLength(1)
  })
  it('is null in curves without labels', () => {
    expect(rateCurves(createConstellation([[1], [-1]]), [1, 0.1]).bitMetricRate).toBeNull()
  })
})

/** A labelled set of up to 16 points in the plane, now and then with unequal probabilities. */
const labelled = fc.tuple(fc.integer({ min: 1, max: 4 }), fc.integer({ min: 1, max: 1e6 }), fc.boolean()).map(([k, seed, equal]) => {
  const order = 2 ** k
  const random = randomFrom(seed + 9)
  const weights = Array.from({ length: order }, () => 0.1 + random())
  const sum = weights.reduce((a, b) => a + b)
  return createConstellation(scattered(order, 2, seed), { labels: words(order), probabilities: equal ? null : weights.map(w => w / sum) })
})
const db = fc.double({ min: -20, max: 50, noNaN: true })

describe('rates of any labelled points', () => {
  it('are ordered: 0, bit-metric rate, mutual information, entropy', () => fc.assert(fc.property(labelled, db, (constellation, at) => {
    const curves = rateCurves(constellation, [n0At(constellation, at)])
    const [symbol, bits] = [valueOf(curves.mutualInformation[0]!), valueOf(curves.bitMetricRate![0]!)]
    expect(bits).toBeGreaterThanOrEqual(0)
    expect(bits).toBeLessThanOrEqual(symbol + 1e-8)
    expect(symbol).toBeLessThanOrEqual(constellation.entropy)
  }), { seed: 11, numRuns: 200 }))
  it('never fall with the SNR', () => fc.assert(fc.property(labelled, db, (constellation, at) => {
    const curves = rateCurves(constellation, [at, at + 0.3].map(x => n0At(constellation, x)))
    for (const rates of [curves.mutualInformation, curves.bitMetricRate!]) expect(valueOf(rates[1]!)).toBeGreaterThan(valueOf(rates[0]!) - 1e-8)
  }), { seed: 12, numRuns: 200 }))
  it('do not exceed capacity', () => fc.assert(fc.property(labelled, db, (constellation, at) => {
    const rate = valueOf(mutualInformation(constellation, n0At(constellation, at)))
    expect(rate).toBeLessThanOrEqual(Math.log2(1 + fromDecibels(at)) + 1e-9)
  }), { seed: 13, numRuns: 200 }))
})

describe('simulated rates', () => {
  const unequal = Array.from({ length: 16 }, (_, i) => (i + 1) / 136)
  it.each([
    { what: 'equal', probabilities: null, at: -10 }, { what: 'equal', probabilities: null, at: 5 }, { what: 'equal', probabilities: null, at: 12 },
    { what: 'equal', probabilities: null, at: 18 }, { what: 'equal', probabilities: null, at: 24 },
    { what: 'unequal', probabilities: unequal, at: -20 }, { what: 'unequal', probabilities: unequal, at: 8 }, { what: 'unequal', probabilities: unequal, at: 20 },
  ])('of $what probabilities at $at dB hold the exact ones within their intervals for at least 89 of 100 seeds', ({ probabilities, at }) => {
    const constellation = createConstellation(scattered(16, 2, 8), { labels: words(16), probabilities })
    const source = informationSources(constellation, true)[0]!
    const n0 = n0At(constellation, at)
    const exact = planeEquivocation(source, n0)
    let symbol = 0
    let bits = 0
    for (let seed = 1; seed <= 100; seed++) {
      const simulated = simulatedEquivocation(source, n0, { seed, draws: 2048 })
      if (lowOf(simulated.symbol) <= exact.symbol && exact.symbol <= highOf(simulated.symbol)) symbol++
      if (lowOf(simulated.bits) <= exact.bits && exact.bits <= highOf(simulated.bits)) bits++
    }
    expect(symbol).toBeGreaterThanOrEqual(89)
    expect(bits).toBeGreaterThanOrEqual(89)
  })
  it('of fewer draws than points are fair as well', () => {
    const constellation = createConstellation(scattered(128, 2, 8), { labels: words(128) })
    const source = informationSources(constellation, false)[0]!
    const exact = planeEquivocation(source, n0At(constellation, 12)).symbol
    const held = Array.from({ length: 100 }, (_, seed) => simulatedEquivocation(source, n0At(constellation, 12), { seed, draws: 101 }).symbol)
      .filter(estimate => lowOf(estimate) <= exact && exact <= highOf(estimate))
    expect(held.length).toBeGreaterThanOrEqual(89)
  })
  it('know what is lost to 5 % even where it is 1e-9 bit', () => {
    const source = informationSources(createConstellation([[1, 0, 0], [-1, 0, 0], [0, 1, 1]]), false)[0]!
    const { symbol } = simulatedEquivocation(source, 0.05, {})
    // Three points pairwise 2, √3 and √3 apart lose about what the pairs do: from the exact rate of two points √3 apart, twice.
    const pair = planeEquivocation({ ...informationSources(createConstellation([[0], [Math.sqrt(3)]]), false)[0]! }, 0.05).symbol
    expect(Math.abs(valueOf(symbol) / (pair * 4 / 3) - 1)).toBeLessThan(0.05)
    expect(valueOf(symbol)).toBeLessThan(1e-6)
  })
  it('are intervals for three dimensions, the same for the same seed', () => {
    const constellation = createConstellation(scattered(8, 3, 4), { labels: words(8) })
    const [a, b, c] = [1, 1, 2].map(seed => bitMetricRate(constellation, 0.1, { seed }))
    expect(isInterval(a!)).toBe(true)
    expect(a).toEqual(b)
    expect(valueOf(c!)).not.toBe(valueOf(a!))
  })
  it('are not needed for products: four dimensions of 16 points are four numbers', () => {
    const cube = Array.from({ length: 16 }, (_, n) => [n & 8, n & 4, n & 2, n & 1].map(bit => bit ? 1 : -1))
    const constellation = createConstellation(cube, { labels: words(16) })
    const one = valueOf(mutualInformation(createConstellation([[1], [-1]]), 0.8))
    expect(mutualInformation(constellation, 0.8)).toBeCloseTo(4 * one, 12)
    expect(bitMetricRate(constellation, 0.8)).toBeCloseTo(4 * one, 12)
  })
  it('of a product with one part that is none in three dimensions are intervals', () => {
    const part = scattered(4, 3, 4)
    const constellation = createConstellation(part.flatMap(point => [[...point, 1], [...point, -1]]))
    const rate = mutualInformation(constellation, 0.5)
    expect(isInterval(rate)).toBe(true)
    expect(lowOf(rate)).toBeLessThan(valueOf(rate))
    expect(valueOf(rate)).toBeLessThan(3)
  })
})
