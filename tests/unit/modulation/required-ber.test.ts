import { describe, expect, it } from 'vitest'
import { analyse, berExact, createConstellation, familyLabels, fromDecibels, generate, naturalLabels, qInverse, requiredEsN0Db, requiredSnr } from '../../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../../shared/modulation'
import { randomFrom } from './seeded'
import { pathOf } from './refusal'

const geometryOf = (id: FamilyId, parameters: FamilyParameters) => analyse(generate(id, parameters, { labels: familyLabels(id, parameters) }))
const kinds = ['berExact', 'berNearest', 'berAllPairs'] as const

describe('required Es/N0 of a bit error rate', () => {
  // Gray QPSK: BER = Q(√(Es/N0))
  it.each([1e-3, 1e-6, 1e-12, 1e-20])('of QPSK at %d follows from the inverse of Q', (target) => {
    const wanted = 20 * Math.log10(qInverse(target))
    expect(Math.abs(requiredEsN0Db({ geometry: geometryOf('psk', { order: 4 }), kind: 'berExact' }, target) - wanted)).toBeLessThan(1e-9)
  })
  it.each(kinds)('of two points is that of the symbol error rate: %s', (kind) => {
    const geometry = geometryOf('psk', { order: 2 })
    expect(requiredEsN0Db({ geometry, kind }, 1e-5)).toBeCloseTo(requiredEsN0Db({ geometry, kind: 'serExact' }, 1e-5), 9)
  })
  it.each([0.4, 0.1, 1e-4, 1e-15])('of random points with natural labels meets the target of %d and nothing less does', (target) => {
    const random = randomFrom(7)
    const points = Array.from({ length: 32 }, () => [random(), random()])
    const geometry = analyse(createConstellation(points, { labels: naturalLabels(32) }))
    const db = requiredEsN0Db({ geometry, kind: 'berExact' }, target)
    const rate = (at: number) => berExact(geometry, geometry.constellation.meanEnergy / fromDecibels(at))
    expect([rate(db + 1e-7) < target, rate(db - 1e-7) > target]).toEqual([true, true])
  })
  it('by the bound is no less than exact', () => {
    const geometry = geometryOf('hexagonal', { order: 16 })
    expect(requiredEsN0Db({ geometry, kind: 'berAllPairs' }, 1e-3)).toBeGreaterThan(requiredEsN0Db({ geometry, kind: 'berExact' }, 1e-3))
  })
  it('of a target below 1/k of what is met at −30 dB is found', () => {
    expect(requiredEsN0Db({ geometry: geometryOf('qam', { order: 256 }), kind: 'berExact' }, 0.3)).toBeGreaterThan(0)
  })
})

describe('a bit error rate that rises before it falls', () => {
  // The middle point is sent almost always: strong noise takes it to an end, one bit away, middling noise to a neighbour, two or three.
  const points = [-41, -40, -1, 0, 1, 40, 41, 42].map(x => [x])
  const labels = ['001', '101', '111', '000', '110', '010', '011', '100']
  const probabilities = [0.001, 0.001, 0.001, 0.993, 0.001, 0.001, 0.001, 0.001]
  const geometry = analyse(createConstellation(points, { labels, probabilities }))
  const answer = requiredSnr({ geometry, kind: 'berExact' }, 0.5)
  const rate = (at: number) => berExact(geometry, geometry.constellation.meanEnergy / fromDecibels(at))

  it('crosses its target twice', () => expect(answer.crossings).toBe(2))
  it('requires the SNR from which it stays below', () => expect([rate(answer.esN0Db + 1e-6) < 0.5, rate(answer.esN0Db - 1e-6) > 0.5]).toEqual([true, true]))
  it('meets the target far below, too', () => expect(rate(-30)).toBeLessThan(0.5))
  it('has no floor', () => expect(answer.floor).toBeNull())
})

describe('crossings and floors of any curve', () => {
  const floored = { rate: (n0: number) => 1e-4 + Math.min(0.5, n0), meanEnergy: 1 }
  it('a floor below the target is told', () => expect(requiredSnr(floored, 1e-3)).toEqual({ esN0Db: expect.closeTo(10 * Math.log10(1 / 9e-4), 9), crossings: 1, floor: expect.closeTo(1e-4, 7) }))
  it('a floor above the target is told in the refusal', () => expect(() => requiredSnr(floored, 1e-5)).toThrow('enter a larger target. It has a floor at 1.00e-4.'))
  it('a curve that goes on falling has none', () => expect(requiredSnr({ rate: n0 => Math.min(0.5, n0), meanEnergy: 1 }, 1e-3).floor).toBeNull())
  it('three crossings are counted', () => {
    const rate = (n0: number) => {
      const db = -10 * Math.log10(n0)
      return 10 ** (-db / 2) * (Math.abs(db - 20) < 2 ? 1e9 : 1)
    }
    expect(requiredSnr({ rate, meanEnergy: 1 }, 1e-3).crossings).toBe(3)
  })
  it('a symbol error rate crosses once', () => expect(requiredSnr({ geometry: geometryOf('psk', { order: 8 }), kind: 'serExact' }, 1e-3)).toEqual({
    esN0Db: requiredEsN0Db({ geometry: geometryOf('psk', { order: 8 }), kind: 'serExact' }, 1e-3), crossings: 1, floor: null }))
})

describe('refused', () => {
  const labelled = geometryOf('psk', { order: 8 })
  it.each(kinds)('%s without labels', kind => expect(pathOf(() => requiredSnr({ geometry: analyse(generate('psk', { order: 8 })), kind }, 1e-3))).toEqual(['labels']))
  it('a target that is always met', () => {
    expect(() => requiredSnr({ geometry: labelled, kind: 'berExact' }, 0.6)).toThrow('The error rate meets this target from −30 dB Es/N0 on: enter a smaller target.')
  })
  it('a target out of reach', () => {
    const close = analyse(createConstellation([[1, 0], [1 + 1e-6, 0], [0, 1], [-1, 0]], { labels: naturalLabels(4) }))
    expect(() => requiredSnr({ geometry: close, kind: 'berExact' }, 1e-9)).toThrow('The error rate stays above this target up to 90 dB Es/N0: enter a larger target.')
  })
})
