import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, generate, mapNotes, q, requiredEsN0Db, serExact, serMap, serMapByPoint, serMapUnion, serUnionBound } from '../../../shared/modulation'
import type { Constellation, FamilyId, FamilyParameters } from '../../../shared/modulation'
import { randomFrom } from './seeded'

const relative = (value: number, wanted: number) => Math.abs(value / wanted - 1)

/** A centre that is seldom sent between four likelier points; its cell vanishes from N0 = 1/ln 6 = 0.5581 on. */
const cross = createConstellation([[0, 0], [1, 0], [0, 1], [-1, 0], [0, -1]], { probabilities: [0.04, 0.24, 0.24, 0.24, 0.24] })

describe('SER of MAP decisions with equal probabilities is that of minimum distance', () => {
  it.each<[FamilyId, FamilyParameters]>([
    ['pam', { order: 4 }], ['psk', { order: 16 }], ['qam', { order: 64 }], ['apsk', { rings: [4, 12], ratios: [2.7] }], ['hexagonal', { order: 32 }],
  ])('for %s %o', (id, parameters) => {
    const constellation = generate(id, parameters)
    const geometry = analyse(constellation)
    for (const n0 of [10, 1, 0.1, 0.01, 0.003]) {
      expect(relative(serMap(constellation, n0), serExact(geometry, n0))).toBeLessThan(1e-10)
      expect(relative(serMapUnion(constellation, n0), serUnionBound(geometry, n0))).toBeLessThan(1e-12)
    }
  })
})

describe('SER of MAP decisions of two points', () => {
  const pair = (p: number) => createConstellation([[0.5, 0], [-1, 1]], { probabilities: [p, 1 - p] })
  const d = Math.hypot(1.5, 1)
  const closed = (p: number, n0: number) => {
    const shift = n0 / (2 * d) * Math.log(p / (1 - p))
    return p * q((d / 2 + shift) / Math.sqrt(n0 / 2)) + (1 - p) * q((d / 2 - shift) / Math.sqrt(n0 / 2))
  }
  // The last three noise densities leave the second point outside its cell.
  it.each([0.008, 0.02, 0.1, 0.5, 1.6, 3, 20])('is p·Q + (1 − p)·Q at N0 = %d', (n0) => {
    expect(relative(serMap(pair(0.9), n0), closed(0.9, n0))).toBeLessThan(1e-12)
  })
  it('tends to the lesser probability', () => expect(serMap(pair(0.9), 1e6)).toBeCloseTo(0.1, 6))
  it('is ½ for a point on its own boundary, given that it is sent', () => {
    // h = 0 exactly: d = 2, N0·ln 9 = 4
    const on = createConstellation([[0, 0], [2, 0]], { probabilities: [0.9, 0.1] })
    expect(serMapByPoint(on, 4 / Math.log(9))[1]).toBeCloseTo(0.5, 14)
  })
})

describe('SER of MAP decisions on a line', () => {
  const line = createConstellation([[-1], [0], [1]], { probabilities: [0.45, 0.1, 0.45] })
  it('of three points has its closed form', () => {
    const [n0, shift] = [0.2, 0.1 * Math.log(4.5)]
    const wanted = 0.9 * q((0.5 + shift) / Math.sqrt(n0 / 2)) + 0.2 * q((0.5 - shift) / Math.sqrt(n0 / 2))
    expect(relative(serMap(line, n0), wanted)).toBeLessThan(1e-12)
  })
  // The outer cells meet at 0 then: 0.1 + 0.9·Q(1/√(N0/2)).
  it('of three points whose middle cell has vanished', () => {
    expect(relative(serMap(line, 0.8), 0.1 + 0.9 * q(1 / Math.sqrt(0.4)))).toBeLessThan(1e-12)
  })
  it('is the same for the line in the plane', () => {
    const plane = createConstellation([[-1, 0], [0, 0], [1, 0]], { probabilities: [0.45, 0.1, 0.45] })
    for (const n0 of [0.05, 0.3, 0.66, 0.67, 2]) expect(relative(serMap(plane, n0), serMap(line, n0))).toBeLessThan(1e-11)
  })
})

describe('SER of MAP decisions with cells that vanish', () => {
  it('counts the point as always mistaken', () => expect(serMapByPoint(cross, 0.6)[0]).toBe(1))
  it('of a square around a vanished point is that of the square', () => {
    const miss = q(Math.SQRT1_2 / Math.sqrt(0.3))
    expect(relative(serMap(cross, 0.6), 0.04 + 0.96 * miss * (2 - miss))).toBeLessThan(1e-11)
  })
  it('goes on evenly where one vanishes', () => {
    const limit = 1 / Math.log(6)
    expect(relative(serMap(cross, limit * (1 + 1e-9)), serMap(cross, limit * (1 - 1e-9)))).toBeLessThan(1e-8)
  })
  it('bounds such a point by 1', () => {
    const [near, far] = [q(Math.SQRT1_2 / Math.sqrt(0.3)), 0.04]
    expect(relative(serMapUnion(cross, 0.6), far + 0.96 * 2 * near)).toBeLessThan(1e-12)
  })
})

describe('SER of MAP decisions against counted errors', () => {
  const rare = createConstellation(
    [[0.1, 0.2], [1, 0], [0.2, 1.1], [-1, 0.1], [0, -1], [1.4, 1.3], [-1.2, -1.1]],
    { probabilities: [0.02, 0.25, 0.2, 0.2, 0.2, 0.1, 0.03] })
  it('has a vanished cell and a point outside its cell', () => {
    // The last point's boundary towards (0, −1): 1.204/2 − 0.8/(2·1.204)·ln(0.2/0.03) = −0.03.
    expect(mapNotes(rare, 0.8)).toEqual({ outside: [6], vanished: [0] })
  })
  it('agrees within five standard errors of 400,000 symbols', () => {
    const ser = serMap(rare, 0.8)
    const [errors, count] = [countErrors(rare, 0.8, 400_000), 400_000]
    expect(Math.abs(errors / count - ser)).toBeLessThan(5 * Math.sqrt(ser * (1 - ser) / count))
  })
  it.each([0.1, 0.3, 2])('and without one, at N0 = %d', (n0) => {
    const ser = serMap(rare, n0)
    expect(Math.abs(countErrors(rare, n0, 100_000) / 100_000 - ser)).toBeLessThan(5 * Math.sqrt(ser * (1 - ser) / 100_000))
  })
})

describe('SER of MAP decisions, for 60 sets at random', () => {
  const random = randomFrom(5)
  const sets = Array.from({ length: 60 }, (_, n) => {
    const weights = Array.from({ length: 2 + n % 14 }, () => random() ** 2 + 1e-4)
    const total = weights.reduce((sum, w) => sum + w, 0)
    return createConstellation(weights.map(() => [random() * 2 - 1, random() * 2 - 1]), { probabilities: weights.map(w => w / total) })
  })
  const densities = [1e-3, 0.01, 0.1, 0.5, 2, 30]
  it('does not exceed that of minimum distance', () => {
    for (const set of sets) {
      const geometry = analyse(set)
      for (const n0 of densities) expect(serMap(set, n0)).toBeLessThanOrEqual(serExact(geometry, n0) * (1 + 1e-12))
    }
  })
  it('does not exceed its union bound', () => {
    for (const set of sets) {
      for (const n0 of densities) expect(serMap(set, n0)).toBeLessThanOrEqual(serMapUnion(set, n0) * (1 + 1e-12))
    }
  })
  it('does not exceed the chance of guessing the likeliest point', () => {
    for (const set of sets) expect(serMap(set, 50)).toBeLessThanOrEqual(1 - Math.max(...set.probabilities!) + 1e-12)
  })
  it('rises with the noise', () => {
    for (const set of sets) {
      const rates = Array.from({ length: 30 }, (_, n) => serMap(set, 0.01 * 1.3 ** n))
      rates.slice(1).forEach((rate, n) => expect(rate).toBeGreaterThanOrEqual(rates[n]! * (1 - 1e-11)))
    }
  })
})

describe('required Es/N0 of MAP decisions', () => {
  it('is less than that of minimum distance where probabilities differ much', () => {
    const pair = createConstellation([[1], [-1]], { probabilities: [0.99, 0.01] })
    const map = requiredEsN0Db({ rate: n0 => serMap(pair, n0), meanEnergy: 1, monotone: true }, 1e-3)
    // Found by bisection of the closed form in mpmath 1.3; minimum distance takes 6.7896 dB (Q(√(2·Es/N0)) = 1e-3).
    expect(map).toBeCloseTo(4.7746537940, 9)
  })
})

/** Symbols decided wrongly by the largest p·exp(−r²/N0). */
function countErrors({ points, probabilities, order }: Constellation, n0: number, count: number): number {
  const random = randomFrom(9)
  let errors = 0
  for (let n = 0; n < count; n++) {
    let rest = random()
    let sent = 0
    while (sent < order - 1 && rest >= probabilities![sent]!) rest -= probabilities![sent++]!
    const radius = Math.sqrt(-Math.log(1 - random()) * n0)
    const angle = 2 * Math.PI * random()
    const [x, y] = [points[2 * sent]! + radius * Math.cos(angle), points[2 * sent + 1]! + radius * Math.sin(angle)]
    let best = 0
    let score = -Infinity
    for (let i = 0; i < order; i++) {
      const value = Math.log(probabilities![i]!) - ((x - points[2 * i]!) ** 2 + (y - points[2 * i + 1]!) ** 2) / n0
      if (value > score) [best, score] = [i, value]
    }
    if (best !== sent) errors++
  }
  return errors
}
