import { describe, expect, it } from 'vitest'
import { logQ, q, qInverse } from '../../../shared/modulation'
import { expNegative } from '../../../shared/modulation/exponential'

// mpmath 1.3 at 40 digits: ncdf(-x).
const values: [number, number][] = [
  [-5, 0.9999997133484281],
  [-3.2, 0.9993128620620841],
  [-1, 0.8413447460685429],
  [-0.5, 0.6914624612740131],
  [0.1, 0.460172162722971],
  [0.6, 0.2742531177500736],
  [0.7, 0.24196365222307303],
  [1, 0.15865525393145705],
  [2, 0.02275013194817921],
  [3, 0.0013498980316300946],
  [4.5, 0.0000033976731247300603],
  [5, 2.866515718791939e-7],
  [5.6, 1.071759025831093e-8],
  [5.7, 5.990371401063528e-9],
  [6, 9.86587645037698e-10],
  [8, 6.220960574271784e-16],
  [12, 1.776482112077679e-33],
  [20, 2.7536241186062337e-89],
  [30, 4.906713927148187e-198],
  [37, 5.725571222524577e-300],
]

describe('Q', () => {
  it.each(values)('Q(%d) to 1e-12', (x, value) => expect(Math.abs(q(x) / value - 1)).toBeLessThan(1e-12))
  it('is 1/2 at 0', () => expect(q(0)).toBe(0.5))
  it('is 0 where a double underflows', () => expect(q(40)).toBe(0))
  it('passes NaN on', () => expect(q(NaN)).toBeNaN())
})

describe('ln Q', () => {
  // mpmath: log(ncdf(-50)), log(ncdf(-400)), log(ncdf(2))
  it('is finite where Q underflows', () => expect(logQ(50)).toBeCloseTo(-1254.8313611394199, 9))
  it('follows far out', () => expect(logQ(400) / -80006.91040933022).toBeCloseTo(1, 14))
  it('takes negative arguments', () => expect(logQ(-2)).toBeCloseTo(-0.023012909328963486, 15))
})

describe('the inverse of Q', () => {
  it.each([1e-300, 1e-30, 1e-6, 0.02, 0.4, 0.6, 0.999])('gives back %d', p => expect(Math.abs(q(qInverse(p)) / p - 1)).toBeLessThan(1e-11))
  it('is 0 at 1/2', () => expect(qInverse(0.5)).toBe(0))
  it.each([0, 1, -1, NaN])('refuses %d', p => expect(() => qInverse(p)).toThrow('A probability is above 0 and below 1.'))
})

describe('the fast exponential', () => {
  it.each([0, -1e-12, -0.3, -1, -13.7, -69, -400, -707])('equals Math.exp to 1e-15 at %d', (x) => {
    expect(Math.abs(expNegative(x) / Math.exp(x) - 1)).toBeLessThan(1e-15)
  })
  it('is 0 below the least normal double', () => expect(expNegative(-800)).toBe(0))
  it('passes NaN on', () => expect(expNegative(NaN)).toBeNaN())
})
