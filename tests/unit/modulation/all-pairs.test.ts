import { describe, expect, it } from 'vitest'
import { createConstellation, generate, q, serAllPairs } from '../../../shared/modulation'
import type { Constellation } from '../../../shared/modulation'
import { pairDistancesOf } from '../../../shared/modulation/pair-distances'
import { randomFrom } from './seeded'

/** The sum pair by pair, small terms first. */
function pairByPair({ order, dimensions, points, probabilities }: Constellation, n0: number): number {
  const terms: number[] = []
  for (let i = 0; i < order; i++) {
    for (let j = 0; j < i; j++) {
      let square = 0
      for (let n = 0; n < dimensions; n++) square += (points[i * dimensions + n]! - points[j * dimensions + n]!) ** 2
      const weight = probabilities ? probabilities[i]! + probabilities[j]! : 2 / order
      terms.push(weight * q(Math.sqrt(square / (2 * n0))))
    }
  }
  return terms.sort((a, b) => a - b).reduce((sum, term) => sum + term, 0)
}

function scattered(order: number, dimensions: number, seed: number): Constellation {
  const random = randomFrom(seed)
  const points = Array.from({ length: order }, () => Array.from({ length: dimensions }, () => random() - 0.5))
  const raw = Array.from({ length: order }, () => 0.2 + random())
  const sum = raw.reduce((total, p) => total + p, 0)
  return createConstellation(points, { probabilities: raw.map(p => p / sum) })
}

describe.each<[string, Constellation]>([
  ['256-QAM', generate('qam', { order: 256 })],
  ['48-PSK', generate('psk', { order: 48 })],
  ['100 points of a hexagonal set', generate('hexagonal', { order: 100 })],
  ['1024-QAM', generate('qam', { order: 1024 })],
  ['1,000 scattered points of unequal probabilities', scattered(1000, 2, 3)],
  ['500 scattered points on a line', scattered(500, 1, 4)],
  ['300 scattered points of four coordinates', scattered(300, 4, 5)],
  ['800 points that all but coincide in pairs', createConstellation(Array.from({ length: 800 }, (_, i) => [Math.cos(i >> 1) + 1e-5 * (i & 1), Math.sin(i >> 1)]))],
])('the all-pairs sum of %s', (_, constellation) => {
  // From an error rate of many to one below 1e-30.
  const least = Math.sqrt(pairDistancesOf(constellation).least)
  it.each([0.01, 0.5, 1, 2, 4, 7, 11.4])('is the sum over its pairs to 1e-10, the least distance %d deviations', (deviations) => {
    const n0 = least * least / (2 * deviations * deviations)
    expect(Math.abs(serAllPairs(constellation, n0) / pairByPair(constellation, n0) - 1)).toBeLessThan(1e-10)
  })
})

describe('distances of all pairs', () => {
  it('weigh M − 1 together', () => {
    expect(pairDistancesOf(scattered(700, 2, 6)).weight.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(699, 9)
  })
  it('are few where they repeat: the sums of two squares in a grid of 32 by 32', () => {
    const sums = new Set(Array.from({ length: 1024 }, (_, n) => (n & 31) ** 2 + (n >> 5) ** 2))
    // Those that begin a bin may lie on either side of its beginning by rounding.
    expect(pairDistancesOf(generate('qam', { order: 1024 })).square.length).toBeLessThan(1.1 * sums.size)
  })
})
