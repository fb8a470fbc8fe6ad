import { describe, expect, it } from 'vitest'
import { analyse, generate, q, serExact } from '../../shared/modulation'
import { polygonError, rectangleError } from '../../shared/methods/checks/tools'
import table from './data/scipy-erfc-owens.json'

const relative = (value: number, reference: number) => Math.abs(value / reference - 1)

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
