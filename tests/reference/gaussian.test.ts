import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, generate, q, qInverse, serExact, serExactByPoint } from '../../shared/modulation'
import table from './data/scipy-erfc-owens.json'

const relative = (value: number, reference: number) => Math.abs(value / reference - 1)
/**
 * Error of a point amid k others on a circle, with h standard deviations to each of its cell's k edges.
 * The cell is a regular polygon, so this is 2k·T(h, tan(π/k)).
 */
const polygonError = (k: number, h: number) => {
  const circle = Array.from({ length: k }, (_, i) => [Math.cos(2 * Math.PI * i / k), Math.sin(2 * Math.PI * i / k)])
  return serExactByPoint(analyse(createConstellation([[0, 0], ...circle])), 0.5 / (h * h))[0]!
}
/** Error of the middle point of nine in a grid, with h1 and h2 standard deviations to its cell's edges. */
const rectangleError = (h1: number, h2: number) => {
  const grid = [-2 * h1, 0, 2 * h1].flatMap(x => [-2 * h2, 0, 2 * h2].map(y => [x, y]))
  return serExactByPoint(analyse(createConstellation(grid)), 2)[4]!
}

describe('Abramowitz and Stegun, Handbook of Mathematical Functions, table 26.1', () => {
  it('Q(1) = 0.15865 52539', () => expect(q(1)).toBeCloseTo(0.1586552539, 10))
  it('Q(2) = 0.02275 01319', () => expect(q(2)).toBeCloseTo(0.0227501319, 10))
  it('Q(3) = 0.00134 98980', () => expect(q(3)).toBeCloseTo(0.0013498980, 10))
  it('Q(5) = 2.866516e-7', () => expect(relative(q(5), 2.866516e-7)).toBeLessThan(2e-7))
})

describe('NIST Digital Library of Mathematical Functions, §7', () => {
  // 7.4.2: erfc(−z) = 2 − erfc(z)
  it('Q(−1.7) and Q(1.7) add to 1', () => expect(q(-1.7) + q(1.7)).toBeCloseTo(1, 15))
  // 7.12.1: erfc z ~ exp(−z²)/(z√π)·(1 − 1/(2z²) + 3/(4z⁴) − 15/(8z⁶) …), here at z = 20/√2
  it('Q(20) follows the asymptotic expansion', () => {
    const series = Math.exp(-200) / (20 * Math.sqrt(2 * Math.PI)) * (1 - 1 / 400 + 3 / 160000 - 15 / 64e6)
    expect(relative(q(20), series)).toBeLessThan(1e-8)
  })
  // 7.17: the inverse; the 97.5 % point of the normal distribution (Abramowitz and Stegun 26.2, common practice)
  it('Q is 0.025 at 1.959963985', () => expect(qInverse(0.025)).toBeCloseTo(1.959963985, 9))
})

// D. B. Owen, "Tables for computing bivariate normal probabilities", Ann. Math. Statist. 27 (1956)
describe('Owen 1956', () => {
  it('T(h, 1) = ½·Φ(h)·(1 − Φ(h)) at h = 1', () => expect(polygonError(4, 1) / 8).toBeCloseTo(0.5 * 0.8413447461 * 0.1586552539, 10))
  it('T(h, 1) = ½·Φ(h)·(1 − Φ(h)) at h = 4', () => expect(relative(polygonError(4, 4) / 8, 0.5 * (1 - q(4)) * q(4))).toBeLessThan(1e-11))
  // 2k·arctan(tan(π/k))/2π = 1: with hardly any signal every decision is wrong but for a cell of no size
  it('T(0, a) = arctan(a)/2π, reached as h falls to 1e-5', () => expect(polygonError(5, 1e-5)).toBeCloseTo(1, 9))
  it('T(h, ∞) = ½·Q(h)', () => expect(serExact(analyse(createConstellation([[0, 0], [3, 0]])), 2)).toBeCloseTo(2 * 0.0334036006, 9))
  it('T(h, a) + T(ah, 1/a) = ½·Φ(h) + ½·Φ(ah) − Φ(h)·Φ(ah)', () => {
    const [phi, psi] = [1 - q(0.8), 1 - q(2)]
    expect(rectangleError(0.8, 2) / 4).toBeCloseTo(phi / 2 + psi / 2 - phi * psi, 13)
  })
})

// Table made with SciPy 1.10.1 of Debian 12 by data/make-scipy.py
describe('SciPy\'s erfc and owens_t', () => {
  it.each(table.q)('Q($x)', ({ x, q: reference }) => expect(relative(q(x), reference)).toBeLessThan(1e-12))
  it.each(table.polygon)('error of a cell of $k equal edges $h standard deviations away', ({ k, h, error }) => {
    expect(relative(polygonError(k, h), error)).toBeLessThan(1e-10)
  })
  it.each(table.psk)('SER of $order-PSK at Es/N0 = $esN0', ({ order, esN0, ser }) => {
    expect(relative(serExact(analyse(generate('psk', { order })), 1 / esN0), ser)).toBeLessThan(1e-10)
  })
  it.each(table.rectangle)('error of a rectangular cell of half sides $h1 and $h2', ({ h1, h2, error }) => {
    expect(relative(rectangleError(h1, h2), error)).toBeLessThan(1e-10)
  })
})
