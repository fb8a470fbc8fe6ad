import { describe, expect, it } from 'vitest'
import { analyse, berExact, berMap, createConstellation, familyLabels, generate, naturalLabels, q, serMap } from '../../../shared/modulation'
import type { Constellation, FamilyId, FamilyParameters } from '../../../shared/modulation'
import { randomFrom } from './seeded'

const relative = (value: number, wanted: number) => Math.abs(value / wanted - 1)
const labelled = (id: FamilyId, parameters: FamilyParameters) => {
  const constellation = generate(id, parameters)
  return { ...constellation, labels: familyLabels(id, parameters) }
}

describe('BER of MAP decisions with equal probabilities is that of minimum distance', () => {
  it.each<[FamilyId, FamilyParameters]>([
    ['pam', { order: 8 }], ['psk', { order: 16 }], ['qam', { order: 64 }], ['apsk', { rings: [4, 12], ratios: [2.7] }], ['hexagonal', { order: 32 }],
  ])('for %s %o', (id, parameters) => {
    const constellation = labelled(id, parameters)
    for (const n0 of [10, 1, 0.1, 0.01, 0.003]) {
      expect(relative(berMap(constellation, n0), berExact(analyse(constellation), n0))).toBeLessThan(1e-9)
    }
  })
})

describe('BER of MAP decisions', () => {
  it('of two points is the symbol error rate', () => {
    const pair = createConstellation([[0.5, 0], [-1, 1]], { probabilities: [0.9, 0.1], labels: ['0', '1'] })
    for (const n0 of [0.02, 0.5, 1.6, 3, 20]) expect(relative(berMap(pair, n0), serMap(pair, n0))).toBeLessThan(1e-10)
  })
  it('of two points is it on a line', () => {
    const pair = createConstellation([[1], [-1]], { probabilities: [0.98, 0.02], labels: ['0', '1'] })
    for (const n0 of [0.02, 0.5, 1.6, 3, 20]) expect(relative(berMap(pair, n0), serMap(pair, n0))).toBeLessThan(1e-10)
  })
  // −3, −1, 1, 3 with rare inner points: at N0 = 4 only the outer cells are left, and meet at 0.
  it('on a line whose inner cells have vanished has its closed form', () => {
    const line = createConstellation([[-3], [-1], [1], [3]], { probabilities: [0.48, 0.02, 0.02, 0.48], labels: ['00', '01', '11', '10'] })
    const cross = (distance: number) => q(distance / Math.sqrt(2))
    // 00 → 10: one bit; 01 is read as 00, one bit wrong, or as 10, two.
    const wanted = (0.96 * cross(3) + 0.04 * (1 + cross(1))) / 2
    expect(relative(berMap(line, 4), wanted)).toBeLessThan(1e-10)
  })
  it('of a line is the same in the plane', () => {
    const probabilities = [0.4, 0.05, 0.15, 0.4]
    const labels = naturalLabels(4)
    const line = createConstellation([[-3], [-1], [1], [3]], { probabilities, labels })
    const plane = createConstellation([[-3, 0], [-1, 0], [1, 0], [3, 0]], { probabilities, labels })
    for (const n0 of [0.1, 1, 3, 10]) expect(relative(berMap(plane, n0), berMap(line, n0))).toBeLessThan(1e-9)
  })
  it('lies between 1/k of the symbol error rate and all of it', () => {
    const random = randomFrom(31)
    for (let n = 0; n < 40; n++) {
      const set = scattered(random, 8)
      for (const n0 of [0.01, 0.1, 0.7, 5]) {
        const [ber, ser] = [berMap(set, n0), serMap(set, n0)]
        expect(ber).toBeGreaterThanOrEqual(ser / 3 * (1 - 1e-8))
        expect(ber).toBeLessThanOrEqual(ser * (1 + 1e-8))
      }
    }
  })
  it.each([0.05, 0.3, 1.5])('agrees with counted bits within five standard errors at N0 = %d', (n0) => {
    const set = scattered(randomFrom(12), 8)
    const { mean, error } = counted(set, n0, 200_000)
    expect(Math.abs(mean - berMap(set, n0))).toBeLessThan(5 * error)
  })
  it('is refused without labels', () => {
    expect(() => berMap(generate('psk', { order: 4 }), 1)).toThrow('A bit error rate needs labels')
  })
})

function scattered(random: () => number, order: number): Constellation {
  const weights = Array.from({ length: order }, () => random() ** 3 + 2e-3)
  const total = weights.reduce((sum, w) => sum + w, 0)
  return createConstellation(weights.map(() => [random() * 2 - 1, random() * 2 - 1]),
    { probabilities: weights.map(w => w / total), labels: naturalLabels(order) })
}

/** Share of wrong bits among decisions by the largest p·exp(−r²/N0). */
function counted({ points, probabilities, labels, order, bitsPerSymbol }: Constellation, n0: number, count: number) {
  const random = randomFrom(77)
  let [sum, squares] = [0, 0]
  for (let n = 0; n < count; n++) {
    let rest = random()
    let sent = 0
    while (sent < order - 1 && rest >= probabilities![sent]!) rest -= probabilities![sent++]!
    const radius = Math.sqrt(-Math.log(1 - random()) * n0)
    const angle = 2 * Math.PI * random()
    const [x, y] = [points[2 * sent]! + radius * Math.cos(angle), points[2 * sent + 1]! + radius * Math.sin(angle)]
    const score = Array.from({ length: order }, (_, i) =>
      Math.log(probabilities![i]!) - ((x - points[2 * i]!) ** 2 + (y - points[2 * i + 1]!) ** 2) / n0)
    const decided = labels![score.indexOf(Math.max(...score))]!
    const wrong = [...labels![sent]!].filter((bit, b) => bit !== decided[b]).length / bitsPerSymbol
    sum += wrong
    squares += wrong * wrong
  }
  const mean = sum / count
  return { mean, error: Math.sqrt((squares / count - mean * mean) / count) }
}
