import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { createConstellation, decibels, esN0ForCapacity, fromDecibels, generate, highOf, isInterval, lowOf, mutualInformation, rateThresholdDb, valueOf } from '../../../shared/modulation'
import { randomFrom } from './seeded'

const scattered = (order: number, dimensions: number, seed: number) => {
  const random = randomFrom(seed)
  return Array.from({ length: order }, () => Array.from({ length: dimensions }, () => 2 * random() - 1))
}

describe('rate threshold', () => {
  it('gives the rate back, and is not below the one of capacity', () => fc.assert(fc.property(
    fc.integer({ min: 2, max: 12 }), fc.integer({ min: 1, max: 1e6 }), fc.double({ min: 0.01, max: 0.99, noNaN: true }), (order, seed, part) => {
      const constellation = createConstellation(scattered(order, 2, seed))
      const netBits = part * constellation.entropy
      const db = valueOf(rateThresholdDb(constellation, 'mutualInformation', netBits))
      expect(valueOf(mutualInformation(constellation, constellation.meanEnergy / fromDecibels(db)))).toBeCloseTo(netBits, 6)
      expect(db).toBeGreaterThan(decibels(esN0ForCapacity(netBits, 2)) - 1e-6)
    }), { seed: 21, numRuns: 60 }))
  it('does not depend on the scale of the points', () => {
    const [small, large] = [1e-20, 1e20].map(scale => createConstellation([[scale, 0], [0, 2 * scale], [-scale, -scale]]))
    expect(valueOf(rateThresholdDb(small!, 'mutualInformation', 1))).toBeCloseTo(valueOf(rateThresholdDb(large!, 'mutualInformation', 1)), 6)
  })
  // Both by mpmath's quadrature to 30 digits of E log2(1 + exp(−2·(s + √s·Z))), s = 2·Es/N0
  it('has four digits after the point next to all bits: 1 − 1e-6 of a binary symbol', () => {
    expect(valueOf(rateThresholdDb(generate('psk', { order: 2 }), 'mutualInformation', 1 - 1e-6))).toBeCloseTo(11.0421832738, 6)
  })
  it('and next to none: 0.01 of a binary symbol', () => {
    expect(valueOf(rateThresholdDb(generate('psk', { order: 2 }), 'mutualInformation', 0.01))).toBeCloseTo(-21.5616057235, 6)
  })
  it('does not exist for all bits: an uncoded row has none', () => {
    expect(() => rateThresholdDb(generate('psk', { order: 8 }), 'mutualInformation', 3)).toThrow('A rate threshold needs a code rate below 1')
  })
  it('does not exist for more than the entropy of unequal probabilities', () => {
    const constellation = createConstellation([[1], [-1]], { probabilities: [0.9, 0.1] })
    expect(() => rateThresholdDb(constellation, 'mutualInformation', 0.5)).toThrow('A rate threshold needs a code rate below 1')
  })
  it.each([0, -1, Number.NaN])('does not exist for %d bit', (netBits) => {
    expect(() => rateThresholdDb(generate('psk', { order: 8 }), 'mutualInformation', netBits)).toThrow('Net bits per symbol are a number above 0.')
  })
  it('is not looked for below −30 dB', () => {
    expect(() => rateThresholdDb(generate('psk', { order: 8 }), 'mutualInformation', 1e-4)).toThrow('carried from −30 dB Es/N0 on')
  })
  it('is not looked for above 90 dB, where an offset takes nearly all energy', () => {
    const constellation = createConstellation([[1e6, 0], [1e6, 1e-3]])
    expect(() => rateThresholdDb(constellation, 'mutualInformation', 0.9)).toThrow('up to 90 dB Es/N0')
  })
  it('lies below −1.59 dB of Eb/N0 for no signals, but far above with an offset', () => {
    const constellation = createConstellation([[10, 0], [10, 1]])
    expect(valueOf(rateThresholdDb(constellation, 'mutualInformation', 0.5))).toBeGreaterThan(20)
  })
  it('by the bit-metric rate needs labels', () => {
    expect(() => rateThresholdDb(createConstellation([[1], [-1]]), 'bitMetricRate', 0.5)).toThrow('needs labels')
  })
})

describe('simulated rate threshold', () => {
  // A product that is turned out of its coordinates is none to the core: the simulation has an exact answer to meet.
  it('holds the exact one within its interval: a turned cube', () => {
    const [c, s] = [Math.cos(0.5), Math.sin(0.5)]
    const cube = Array.from({ length: 8 }, (_, n) => [n & 4, n & 2, n & 1].map(bit => bit ? 1 : -1))
    const turned = cube.map(([x, y, z]) => [c * x! - s * y!, c * (s * x! + c * y!) - s * z!, s * (s * x! + c * y!) + c * z!])
    const simulated = rateThresholdDb(createConstellation(turned), 'mutualInformation', 2, { draws: 8192 })
    const exact = valueOf(rateThresholdDb(createConstellation(cube), 'mutualInformation', 2))
    expect(isInterval(simulated)).toBe(true)
    expect(lowOf(simulated)).toBeLessThan(exact)
    expect(highOf(simulated)).toBeGreaterThan(exact)
    expect(highOf(simulated) - lowOf(simulated)).toBeLessThan(0.2)
  })
})
