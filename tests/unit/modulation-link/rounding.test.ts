import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { ceilToDigits, floorToDigits, nearestOfDigits } from '../../../shared/modulation/rounding'

describe('numbers rounded down for show', () => {
  it('1.1 stays 1.1', () => expect(floorToDigits(1.1, 2)).toBe(1.1))
  it('1.15, whose hundredfold is below 115, stays 1.15', () => expect(floorToDigits(1.15, 2)).toBe(1.15))
  it('0.7 − 0.4, which is below 0.3, shows as 0.3', () => expect(floorToDigits(0.7 - 0.4, 2)).toBe(0.3))
  it('1.099 shows as 1.09', () => expect(floorToDigits(1.099, 2)).toBe(1.09))
  it('0.9999999 shows as 0.99', () => expect(floorToDigits(0.9999999, 2)).toBe(0.99))
  it('−1.1 stays −1.1', () => expect(floorToDigits(-1.1, 2)).toBe(-1.1))
  it('−0.001 shows as −0.01', () => expect(floorToDigits(-0.001, 2)).toBe(-0.01))
  it('a rounding error below zero shows as plain 0', () => expect(Object.is(floorToDigits(-1e-15, 2), 0)).toBe(true))
  it('−0 shows as plain 0', () => expect(Object.is(floorToDigits(-0, 2), 0)).toBe(true))
  it('1e300 comes back as it is', () => expect(floorToDigits(1e300, 2)).toBe(1e300))
  it('−∞ comes back as it is', () => expect(floorToDigits(-Infinity, 2)).toBe(-Infinity))
  it('NaN comes back as it is', () => expect(floorToDigits(NaN, 2)).toBeNaN())
  it('every decimal of two digits stays itself', () => {
    fc.assert(fc.property(fc.integer({ min: -1e6, max: 1e6 }), n => floorToDigits(n / 100, 2) === (n === 0 ? 0 : n / 100)), { seed: 7, numRuns: 2000 })
  })
  it('nothing shows above itself by more than rounding error', () => {
    fc.assert(fc.property(fc.double({ min: -1e4, max: 1e4, noNaN: true }), x => floorToDigits(x, 2) <= x + 1e-8 && floorToDigits(x, 2) > x - 0.01 - 1e-8), { seed: 8, numRuns: 2000 })
  })
})

describe('numbers rounded up for show', () => {
  it('0.001 shows as 0.01', () => expect(ceilToDigits(0.001, 2)).toBe(0.01))
  it('0.3 + 1e-16 shows as 0.3', () => expect(ceilToDigits(0.1 + 0.2, 2)).toBe(0.3))
  it('−0.009 shows as plain 0', () => expect(Object.is(ceilToDigits(-0.009, 2), 0)).toBe(true))
})

describe('numbers rounded to the nearest for show', () => {
  it('15.96 shows as 16', () => expect(nearestOfDigits(15.96, 1)).toBe(16))
  it('−0.04 shows as plain 0', () => expect(Object.is(nearestOfDigits(-0.04, 1), 0)).toBe(true))
  it('∞ comes back as it is', () => expect(nearestOfDigits(Infinity, 1)).toBe(Infinity))
})
