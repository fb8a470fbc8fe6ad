import { describe, expect, it } from 'vitest'
import {
  analyse, berExact, berPhaseErrorFloor, berWithPhaseError, createConstellation, familyLabels, fromDecibels, generate, naturalLabels,
  requiredSnr, requiredSnrWithPhaseError, serExact, serPhaseErrorFloor, serWithPhaseError,
} from '../../../shared/modulation'
import type { Constellation, FamilyId, FamilyParameters } from '../../../shared/modulation'
import { randomFrom } from './seeded'

const relative = (value: number, wanted: number) => Math.abs(value / wanted - 1)
const radians = (degrees: number) => degrees * Math.PI / 180
const labelled = (id: FamilyId, parameters: FamilyParameters) => analyse({ ...generate(id, parameters), labels: familyLabels(id, parameters) })
const qam16 = labelled('qam', { order: 16 })
const scattered = (seed: number, order: number) => {
  const random = randomFrom(seed)
  return createConstellation(Array.from({ length: order }, () => [random() * 2 - 1, random() * 2 - 1]), { labels: naturalLabels(order) })
}

describe('a phase error of nothing', () => {
  it('leaves the symbol error rate', () => expect(serWithPhaseError(qam16, 0.05, 0)).toBe(serExact(qam16, 0.05)))
  it('leaves the bit error rate', () => expect(berWithPhaseError(qam16, 0.05, 0)).toBe(berExact(qam16, 0.05)))
  it('has no floor', () => expect([serPhaseErrorFloor(qam16, 0), berPhaseErrorFloor(qam16, 0)]).toEqual([0, 0]))
  it('is the limit of small ones', () => {
    expect(relative(serWithPhaseError(qam16, 0.02, 1e-6), serExact(qam16, 0.02))).toBeLessThan(1e-8)
    expect(relative(berWithPhaseError(qam16, 0.02, 1e-6), berExact(qam16, 0.02))).toBeLessThan(1e-8)
  })
})

describe('a phase error', () => {
  it('does nothing to a point at the origin', () => {
    // The one point at 0 of two is missed with Q(½/√(N0/2)) whatever the angle, and the other is turned.
    const pair = analyse(createConstellation([[0, 0], [1, 0]], { probabilities: [1 - 1e-9, 1e-9] }))
    expect(relative(serWithPhaseError(pair, 0.1, 0.3), serExact(pair, 0.1))).toBeLessThan(1e-5)
  })
  it('counts every point with its probability', () => {
    const [even, odd] = [[0.4, 0.1, 0.4, 0.1], [0.1, 0.4, 0.1, 0.4]].map(probabilities =>
      serWithPhaseError(analyse(createConstellation([[1, 0], [0, 0.5], [-1, 0], [0, -0.5]], { probabilities })), 0.1, 0.2))
    const equal = serWithPhaseError(analyse(createConstellation([[1, 0], [0, 0.5], [-1, 0], [0, -0.5]])), 0.1, 0.2)
    expect(relative((even! + odd!) / 2, equal)).toBeLessThan(1e-9)
  })
  it('does the same to a constellation turned and mirrored', () => {
    const set = scattered(5, 12)
    const [c, s] = [Math.cos(1.1), Math.sin(1.1)]
    const moved = createConstellation(Array.from({ length: 12 }, (_, i) => {
      const [x, y] = [set.points[2 * i]!, -set.points[2 * i + 1]!]
      return [c * x - s * y, s * x + c * y]
    }))
    for (const n0 of [0.3, 0.01, 1e-4]) {
      expect(relative(serWithPhaseError(analyse(moved), n0, 0.1), serWithPhaseError(analyse(set), n0, 0.1))).toBeLessThan(1e-7)
    }
  })
  it.each([0.5, 3, 10, 40])('of %d° leads to the floor as noise vanishes', (degrees) => {
    const geometry = analyse(scattered(8, 16))
    const floor = serPhaseErrorFloor(geometry, radians(degrees))
    expect(relative(serWithPhaseError(geometry, 1e-11, radians(degrees)), floor)).toBeLessThan(1e-4)
    expect(relative(berWithPhaseError(geometry, 1e-11, radians(degrees)), berPhaseErrorFloor(geometry, radians(degrees)))).toBeLessThan(1e-4)
  })
  it('of 12° agrees with counted errors within five standard errors', () => {
    const set = scattered(3, 8)
    const { ser, ber, serError, berError } = counted(set, 0.05, radians(12), 200_000)
    const geometry = analyse(set)
    expect(Math.abs(ser - serWithPhaseError(geometry, 0.05, radians(12)))).toBeLessThan(5 * serError)
    expect(Math.abs(ber - berWithPhaseError(geometry, 0.05, radians(12)))).toBeLessThan(5 * berError)
  })
  it('of 200° agrees with counted errors: whole turns count', () => {
    const set = scattered(4, 8)
    const { ser, ber, serError, berError } = counted(set, 0.05, radians(200), 100_000)
    const geometry = analyse(set)
    expect(Math.abs(ser - serWithPhaseError(geometry, 0.05, radians(200)))).toBeLessThan(5 * serError)
    expect(Math.abs(ber - berWithPhaseError(geometry, 0.05, radians(200)))).toBeLessThan(5 * berError)
  })
  it('gives bit error rates between 1/k of the symbol error rate and all of it', () => {
    const geometry = analyse(scattered(6, 16))
    for (const n0 of [1, 0.05, 1e-3]) {
      const [ser, ber] = [serWithPhaseError(geometry, n0, 0.1), berWithPhaseError(geometry, n0, 0.1)]
      expect(ber).toBeGreaterThanOrEqual(ser / 4 * (1 - 1e-7))
      expect(ber).toBeLessThanOrEqual(ser * (1 + 1e-7))
    }
  })
})

describe('floors of a phase error', () => {
  it('of Gray QPSK is a quarter turn with one wrong bit and a half turn with two', () => {
    const geometry = labelled('psk', { order: 4 })
    // At 30° σ the half turn begins at 4.5·σ: 2·(Q(1.5) − Q(4.5))·½ + 2·Q(4.5)·1
    expect(berPhaseErrorFloor(geometry, radians(30))).toBeCloseTo(0.0668072 + 3.3977e-6, 7)
  })
  // The corner of 16-QAM leaves its cell at acos(√2/3) − 45°, the twelve others later.
  it('of 16-QAM is that of its corners at first', () => {
    const floor = serPhaseErrorFloor(qam16, radians(4))
    // 4/16·2·Q(16.874494/4) = 0.5·1.23e-5
    expect(floor / 6.14e-6).toBeGreaterThan(0.95)
    expect(floor / 6.14e-6).toBeLessThan(1.3)
  })
})

describe('required Es/N0 under a phase error', () => {
  it('is where the symbol error rate meets the target', () => {
    const { esN0Db, crossings } = requiredSnrWithPhaseError(qam16, radians(3), 'ser', 1e-4)
    expect(relative(serWithPhaseError(qam16, 1 / fromDecibels(esN0Db), radians(3)), 1e-4)).toBeLessThan(1e-7)
    expect(crossings).toBe(1)
  })
  it('is where the bit error rate meets the target', () => {
    const { esN0Db, floor } = requiredSnrWithPhaseError(qam16, radians(3), 'ber', 1e-4)
    expect(relative(berWithPhaseError(qam16, 1 / fromDecibels(esN0Db), radians(3)), 1e-4)).toBeLessThan(1e-7)
    expect(floor).toBe(berPhaseErrorFloor(qam16, radians(3)))
  })
  it('is that of the plain search from above', () => {
    const psk = analyse(generate('psk', { order: 8 }))
    const plain = requiredSnr({ rate: n0 => serWithPhaseError(psk, n0, radians(4)), meanEnergy: 1, monotone: false }, 1e-3)
    expect(requiredSnrWithPhaseError(psk, radians(4), 'ser', 1e-3).esN0Db).toBeCloseTo(plain.esN0Db, 7)
  })
  it('grows with the phase error', () => {
    const required = [0.5, 1, 2, 3, 4].map(degrees => requiredSnrWithPhaseError(qam16, radians(degrees), 'ser', 1e-3).esN0Db)
    expect(required).toEqual([...required].sort((a, b) => a - b))
  })
  it.each([['ser', 'serExact'], ['ber', 'berExact']] as const)('of nothing is that of the %s without', (quantity, kind) => {
    expect(requiredSnrWithPhaseError(qam16, 0, quantity, 1e-4)).toEqual(requiredSnr({ geometry: qam16, kind }, 1e-4))
  })
  it('is refused below the floor, which it tells', () => {
    expect(() => requiredSnrWithPhaseError(qam16, radians(10), 'ser', 1e-3)).toThrow('which leaves 4.86e-2.')
  })
  it('is refused where every SNR will do', () => {
    expect(() => requiredSnrWithPhaseError(qam16, radians(3), 'ser', 0.95)).toThrow('from −30 dB Es/N0 on')
  })
})

describe('phase errors are refused', () => {
  it('for points on a line', () => {
    expect(() => serWithPhaseError(analyse(generate('pam', { order: 4 })), 0.1, 0.1)).toThrow('A carrier phase error turns points of two dimensions')
  })
  it.each([-0.1, NaN, Infinity])('of %d', (sigma) => {
    expect(() => serWithPhaseError(qam16, 0.1, sigma)).toThrow('The r.m.s. phase error is a finite angle of 0 or more.')
  })
  it('with N0 = 0', () => expect(() => serWithPhaseError(qam16, 0, 0.1)).toThrow('The noise density N0 is a finite number above 0.'))
  it('for bits without labels', () => {
    expect(() => berWithPhaseError(analyse(generate('psk', { order: 4 })), 0.1, 0.1)).toThrow('A bit error rate needs labels')
  })
})

/** Shares of wrong symbols and bits among seeded ones, with their standard errors. */
function counted({ points, labels, order, bitsPerSymbol }: Constellation, n0: number, sigma: number, count: number) {
  const random = randomFrom(21)
  let [symbols, bits, squares] = [0, 0, 0]
  for (let n = 0; n < count; n++) {
    const sent = Math.floor(random() * order)
    const phi = sigma * Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random())
    const radius = Math.sqrt(-Math.log(1 - random()) * n0)
    const angle = 2 * Math.PI * random()
    const [u, v] = [points[2 * sent]!, points[2 * sent + 1]!]
    const x = u * Math.cos(phi) - v * Math.sin(phi) + radius * Math.cos(angle)
    const y = u * Math.sin(phi) + v * Math.cos(phi) + radius * Math.sin(angle)
    const away = Array.from({ length: order }, (_, i) => (x - points[2 * i]!) ** 2 + (y - points[2 * i + 1]!) ** 2)
    const decided = away.indexOf(Math.min(...away))
    const wrong = [...labels![sent]!].filter((bit, b) => bit !== labels![decided]![b]).length / bitsPerSymbol
    if (decided !== sent) symbols++
    bits += wrong
    squares += wrong * wrong
  }
  const [ser, ber] = [symbols / count, bits / count]
  return { ser, ber, serError: Math.sqrt(ser * (1 - ser) / count), berError: Math.sqrt((squares / count - ber * ber) / count) }
}
