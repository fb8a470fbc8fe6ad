import { describe, expect, it } from 'vitest'
import { createConstellation, familyLabels, generate, naturalLabels } from '../../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../../shared/modulation'

const members: [FamilyId, FamilyParameters][] = [
  ['pam', { order: 16 }], ['psk', { order: 64 }], ['qam', { order: 8 }], ['qam', { order: 512 }], ['qam', { order: 4096 }],
  ['cross-qam', { order: 32 }], ['cross-qam', { order: 128 }], ['cross-qam', { order: 512 }],
  ['apsk', { rings: [4, 12], ratios: [2.6] }], ['apsk', { rings: [4, 12, 16], ratios: [2.5, 4.3] }],
  ['apsk', { rings: [1, 7], ratios: [] }], ['apsk', { rings: [8, 16, 20, 20], ratios: [2, 3, 4] }],
  ['hexagonal', { order: 2 }], ['hexagonal', { order: 64 }], ['hexagonal', { order: 256 }],
  ['orthogonal', { order: 8 }], ['biorthogonal', { order: 8 }], ['simplex', { order: 4 }], ['hypercube', { order: 32 }],
  ['lattice', { lattice: 'D4', order: 64 }], ['lattice', { lattice: 'E8', order: 128 }],
  ['product', { factors: [{ family: 'psk', order: 4 }, { family: 'apsk', rings: [4, 12], ratios: [2.85] }] }],
]

describe.each(members)('labels of %s %j', (id, parameters) => {
  const labels = familyLabels(id, parameters)!
  it('are words that a constellation takes', () => expect(generate(id, parameters, { labels }).labels).toEqual(labels))
  it('are the same every time', () => expect(familyLabels(id, { ...parameters })).toEqual(labels))
})

describe('Gray labels', () => {
  /** Mean number of bits in which points of the least distance differ. */
  const meanOfNearest = (id: FamilyId, parameters: FamilyParameters) => {
    const { points, order, dimensions, labels } = generate(id, parameters, { labels: familyLabels(id, parameters) })
    const pairs: { square: number, bits: number }[] = []
    for (let i = 1; i < order; i++) {
      for (let j = 0; j < i; j++) {
        let square = 0
        for (let n = 0; n < dimensions; n++) square += (points[i * dimensions + n]! - points[j * dimensions + n]!) ** 2
        pairs.push({ square, bits: [...labels![i]!].filter((bit, n) => bit !== labels![j]![n]).length })
      }
    }
    const least = pairs.reduce((smallest, pair) => Math.min(smallest, pair.square), Infinity)
    const nearest = pairs.filter(pair => pair.square < least * 1.0001)
    return nearest.reduce((sum, pair) => sum + pair.bits, 0) / nearest.length
  }
  it.each([
    ['pam', { order: 64 }], ['psk', { order: 32 }], ['qam', { order: 32 }], ['qam', { order: 256 }],
    ['apsk', { rings: [4, 12], ratios: [2.85] }], ['apsk', { rings: [4, 12, 16], ratios: [2.84, 5.27] }],
    ['hypercube', { order: 64 }], ['product', { factors: [{ family: 'psk', order: 8 }, { family: 'psk', order: 8 }] }],
  ] as [FamilyId, FamilyParameters][])('of %s %j differ in one bit between nearest points', (id, parameters) => expect(meanOfNearest(id, parameters)).toBe(1))
  // 1.1538 = 60/52: Smith's folded rectangle has no better neighbour by exchange of two labels.
  it.each([
    ['cross-qam', { order: 32 }, 1.154], ['cross-qam', { order: 128 }, 1.11], ['cross-qam', { order: 512 }, 1.1],
    ['lattice', { lattice: 'D4', order: 64 }, 2], ['hexagonal', { order: 16 }, 1.34], ['hexagonal', { order: 64 }, 1.41], ['hexagonal', { order: 256 }, 1.54],
  ] as [FamilyId, FamilyParameters, number][])('of %s %j differ in few more', (id, parameters, most) => expect(meanOfNearest(id, parameters)).toBeLessThan(most))
})

describe('labels of a product', () => {
  const factors = [{ family: 'psk', order: 4 }, { family: 'custom', points: [[0], [1]] }] as const
  it('are those of its factors one after another, custom factors counted naturally', () => {
    expect(familyLabels('product', { factors })).toEqual(['000', '001', '100', '101', '110', '111', '010', '011'])
  })
})

describe('opposite biorthogonal points', () => {
  it('differ in every bit', () => {
    const labels = familyLabels('biorthogonal', { order: 8 })!
    const { points } = generate('biorthogonal', { order: 8 })
    const opposite = labels.map((label, i) => labels.find((_, j) => [0, 1, 2, 3].every(n => points[4 * j + n] === -points[4 * i + n]!))!)
    expect(opposite.every((other, i) => [...other].every((bit, n) => bit !== labels[i]![n]))).toBe(true)
  })
})

describe('labels do not depend on what leaves the order of points', () => {
  it('ratios of 4+12 rings', () => expect(familyLabels('apsk', { rings: [4, 12], ratios: [2] })).toEqual(familyLabels('apsk', { rings: [4, 12], ratios: [4] })))
  it('ratios of 5+11 rings', () => expect(familyLabels('apsk', { rings: [5, 11], ratios: [2] })).toEqual(familyLabels('apsk', { rings: [5, 11], ratios: [4] })))
})

describe('no labels', () => {
  it.each([
    ['psk', { order: 6 }], ['hexagonal', { order: 7 }], ['apsk', { rings: [5, 6], ratios: [2] }], ['custom', { points: [[0], [1]] }], ['qam', { order: 5 }],
    ['product', { factors: [{ family: 'psk', order: 4 }, { family: 'psk', order: 3 }] }], ['lattice', { lattice: 'D4', order: 25 }],
  ] as [FamilyId, FamilyParameters][])('of %s %j', (id, parameters) => expect(familyLabels(id, parameters)).toBeNull())
  it('in natural order of twelve points', () => expect(naturalLabels(12)).toBeNull())
})

describe('natural labels', () => {
  it('count upwards', () => expect(naturalLabels(4)).toEqual(['00', '01', '10', '11']))
  it('are different', () => expect(createConstellation(Array.from({ length: 64 }, (_, i) => [i]), { labels: naturalLabels(64) }).labels).toHaveLength(64))
})
