import { describe, expect, it } from 'vitest'
import { logQ, q, qInverse } from '../../../shared/modulation'
import { expNegative } from '../../../shared/modulation/exponential'

// mpmath 1.3 at 40 digits: ncdf(-x).
const values: [number, number][] = [
  [-5, 0.99999971334842812],
  [-3.2, 0.99931286206208415],
  [-1, 0.84134474606854295],
  [-0.5, 0.6914624612740131],
  [0.1, 0.46017216272297102],
  [0.6, 0.27425311775007359],
  [0.7, 0.24196365222307303],
  [1, 0.15865525393145705],
  [2, 0.022750131948179207],
  [3, 0.0013498980316300945],
  [4.5, 3.3976731247300604e-6],
  [5, 2.8665157187919391e-7],
  [5.6, 1.0717590258310929e-8],
  [5.7, 5.9903714010635282e-9],
  [6, 9.8658764503769814e-10],
  [8, 6.2209605742717841e-16],
  [12, 1.776482112077679e-33],
  [20, 2.7536241186062337e-89],
  [30, 4.9067139271481871e-198],
  [37, 5.7255712225245768e-300],
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
  it('follows far out', () => expect(logQ(400) / -80006.910409330215).toBeCloseTo(1, 14))
  it('takes negative arguments', () => expect(logQ(-2)).toBeCloseTo(-0.023012909328963488, 15))
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
