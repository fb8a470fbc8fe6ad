import { describe, expect, it } from 'vitest'
import { integrateAdaptively } from '../../../shared/modulation/adaptive-quadrature'

const relative = (value: number, wanted: number) => Math.abs(value / wanted - 1)

describe('adaptive quadrature', () => {
  // Kronrod's extension of ten Gauss nodes is exact to degree 31.
  it.each([0, 7, 16, 31])('is exact for x^%d', degree => expect(relative(integrateAdaptively(x => x ** degree, [0, 2], 1e-8, 0), 2 ** (degree + 1) / (degree + 1))).toBeLessThan(1e-13))
  it('is right for a narrow peak between breaks', () => {
    expect(relative(integrateAdaptively(x => Math.exp(-((x / 1e-4) ** 2)), [-1, -1e-3, 1e-3, 1], 1e-8, 0), 1e-4 * Math.sqrt(Math.PI))).toBeLessThan(1e-8)
  })
  it('is right for a step smeared over a thousandth of the range', () => {
    // ∫ 1/(1 + exp(−1000·x)) from −1 to 1 is 1, by symmetry.
    expect(relative(integrateAdaptively(x => 1 / (1 + Math.exp(-1000 * x)), [-1, 1], 1e-8, 0), 1)).toBeLessThan(1e-9)
  })
  it('stops at an absolute error that is good enough', () => {
    let calls = 0
    integrateAdaptively((x) => {
      calls++
      return Math.sqrt(x)
    }, [0, 1], 0, 1)
    expect(calls).toBe(21)
  })
  it('of nothing is nothing', () => expect(integrateAdaptively(() => 0, [0, 1], 1e-8, 0)).toBe(0))
})
