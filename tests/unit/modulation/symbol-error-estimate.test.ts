import { describe, expect, it } from 'vitest'
import { analyse, generate, isInterval, requiredEsN0Db, requiredEsN0Estimate, serExact, serLowerBound, serUnionBound, symbolErrorRate } from '../../../shared/modulation'
import type { Geometry, Interval } from '../../../shared/modulation'
import { directionalEstimate, radialTail } from '../../../shared/modulation/symbol-error-directional'
import { bothBeyond } from '../../../shared/modulation/symbol-error-lower'
import { q } from '../../../shared/modulation/gaussian'

const square = analyse(generate('qam', { order: 16 }))
const product = analyse(generate('product', { factors: [{ family: 'hexagonal', order: 7 }, { family: 'psk', order: 4 }] }))
const space = analyse(generate('lattice', { lattice: 'D4', order: 24, offset: [0, 0, 0, 0] }))

describe('two events of Gaussian noise', () => {
  it.each([0.5, 2, 6, 11])('that do not depend on each other multiply, at %d', (h) => {
    expect(bothBeyond(h, 0.8 * h, 0, 2) / (q(h) * q(0.8 * h))).toBeCloseTo(1, 10)
  })
  it('of the same line are one', () => expect(bothBeyond(3, 3, 1, 2) / q(3)).toBeCloseTo(1, 12))
  it('of opposite lines exclude each other', () => expect(bothBeyond(3, 3, -1, 2)).toBe(0))
  // P(X > 0, Y > 0) = 1/4 + asin(ρ)/2π, Sheppard 1899; h must not be 0 here
  it('of lines almost through the point follow Sheppard', () => expect(bothBeyond(1e-9, 1e-9, 0.5, 2)).toBeCloseTo(0.25 + 1 / 12, 8))
  it.each([-0.7, 0.3, 0.9])('of correlation %d integrate to what one integral over the first gives', (rho) => {
    const [h, k] = [4, 3.5]
    const s = Math.sqrt(1 - rho * rho)
    let sum = 0
    for (let n = 0; n < 40000; n++) {
      const x = h + (n + 0.5) * 2.5e-4
      sum += Math.exp(-x * x / 2) / Math.sqrt(2 * Math.PI) * q((k - rho * x) / s) * 2.5e-4
    }
    expect(bothBeyond(h, k, rho, 2) / sum).toBeCloseTo(1, 6)
  })
})

describe('the lower bound', () => {
  it.each([0.5, 0.1, 0.02, 0.004])('is below the exact rate of 16-QAM, N0 %d', n0 => expect(serLowerBound(square, n0)).toBeLessThanOrEqual(serExact(square, n0)))
  it.each([0.5, 0.1, 0.02, 0.004])('is below the exact rate of a product in 4 dimensions, N0 %d', n0 => expect(serLowerBound(product, n0)).toBeLessThanOrEqual(serExact(product, n0)))
  it('is all of the rate of two points', () => {
    const pair = analyse(generate('pam', { order: 2 }))
    expect(serLowerBound(pair, 0.2)).toBe(serUnionBound(pair, 0.2))
  })
  it('meets the union bound at high SNR', () => expect(serLowerBound(space, 0.01) / serUnionBound(space, 0.01)).toBeGreaterThan(0.99))
  it('of fewer neighbours is lower', () => expect(serLowerBound(product, 0.1, { neighbours: 3 })).toBeLessThan(serLowerBound(product, 0.1)))
})

describe('the energy of noise', () => {
  it('of one dimension is above x with probability 2·Q(√2x)', () => expect(radialTail(1, 2)).toBe(2 * q(2)))
  it('of two dimensions is exponential', () => expect(radialTail(2, 3)).toBe(Math.exp(-3)))
  // DLMF 8.4.8 and 8.4.4 with 8.8.2: Γ(2, x)/Γ(2) = e^−x(1 + x); Γ(3/2, x)/Γ(3/2) = erfc √x + 2·√(x/π)·e^−x
  it('of four dimensions', () => expect(radialTail(4, 3) / (4 * Math.exp(-3))).toBeCloseTo(1, 14))
  it('of three dimensions', () => expect(radialTail(3, 3) / (2 * q(Math.sqrt(6)) + 2 * Math.sqrt(3 / Math.PI) * Math.exp(-3))).toBeCloseTo(1, 14))
})

describe('the directional estimate', () => {
  const inside = (geometry: Geometry, n0: number) => Array.from({ length: 100 }, (_, seed) => directionalEstimate(geometry, { seed, directions: 4000 })(n0))
    .filter(({ low, high }) => low <= serExact(geometry, n0) && serExact(geometry, n0) <= high).length
  it.each([[16, 0.3], [16, 0.05], [16, 0.015]])('of %d-QAM at N0 %d holds the exact rate for at least 89 of 100 seeds', (_, n0) => expect(inside(square, n0)).toBeGreaterThanOrEqual(89))
  it.each([0.5, 0.1, 0.04])('of a product in 4 dimensions at N0 %d holds the exact rate for at least 89 of 100 seeds', n0 => expect(inside(product, n0)).toBeGreaterThanOrEqual(89))
  it('is an interval between the bounds', () => {
    const { low, value, high } = symbolErrorRate(space, 0.1) as Interval
    expect([serLowerBound(space, 0.1) <= low, low <= value, value <= high, high <= serUnionBound(space, 0.1)]).toEqual([true, true, true, true])
  })
  it('is the same for the same seed', () => expect(symbolErrorRate(space, 0.1, { seed: 7 })).toEqual(directionalEstimate(space, { seed: 7 })(0.1)))
  it('is a number where the exact rate is known', () => expect(symbolErrorRate(product, 0.1)).toBe(serExact(product, 0.1)))
})

describe('required Es/N0', () => {
  it('is an interval in space', () => expect(isInterval(requiredEsN0Estimate(space, 1e-5))).toBe(true))
  it('lies between what the bounds need', () => {
    const { low, high } = requiredEsN0Estimate(space, 1e-3) as Interval
    const union = requiredEsN0Db({ geometry: space, kind: 'serUnion' }, 1e-3)
    expect([low <= high, high <= union + 1e-6, union - low < 0.3]).toEqual([true, true, true])
  })
  it('is a number where the exact rate is known', () => expect(requiredEsN0Estimate(product, 1e-4)).toBe(requiredEsN0Db({ geometry: product, kind: 'serExact' }, 1e-4)))
})
