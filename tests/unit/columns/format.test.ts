import { describe, expect, it } from 'vitest'
import { formatEnds, formatEstimate, formatNumber, plain, plainEstimate } from '../../../shared/columns/format'

describe('numbers as cells show them', () => {
  it('writes a true minus sign', () => expect(formatNumber(-1.76, '0.00')).toBe('−1.76'))
  it('writes a plus sign where the sign carries meaning', () => expect(formatNumber(1.5, '+0.00')).toBe('+1.50'))
  it('writes no minus sign before a zero', () => expect(formatNumber(-0.001, '0.00')).toBe('0.00'))
  it('rounds a margin down', () => expect(formatNumber(1.087, '+0.00', 'down')).toBe('+1.08'))
  it('rounds a negative margin down, away from zero', () => expect(formatNumber(-0.141, '+0.00', 'down')).toBe('−0.15'))
  it('keeps a margin that is a decimal but for rounding error', () => expect(formatNumber(1.1 - 1e-15, '+0.00', 'down')).toBe('+1.10'))
  it('rounds a threshold up', () => expect(formatNumber(-80.51, '0.0', 'up')).toBe('−80.5'))
  it('writes probabilities in powers of ten', () => expect(formatNumber(1.234e-6, '0.00e-0')).toBe('1.23e−6'))
  it('writes a positive power without a sign', () => expect(formatNumber(3, '0.00e-0')).toBe('3.00e0'))
  it('writes a code rate as a fraction', () => expect(formatNumber(0.9, 'fraction')).toBe('9/10'))
  it('writes code rate 1 as 1', () => expect(formatNumber(1, 'fraction')).toBe('1'))
  it('writes a code rate that is no small fraction in decimals', () => expect(formatNumber(0.7071, 'fraction')).toBe('0.7071'))
  it('writes infinity as a sign', () => expect(formatNumber(-Infinity, '0.00')).toBe('−∞'))
  it('writes nothing for what is no number', () => expect(formatNumber(NaN, '0.00')).toBe(''))
  it('keeps every digit of a copied value', () => expect(plain(-20.918273645)).toBe('−20.918273645'))
  it('rounds a probability down in its last digit', () => expect(formatNumber(1.239e-6, '0.00e-0', 'down')).toBe('1.23e−6'))
  it('carries a probability that rounds up to the next power', () => expect(formatNumber(9.991e-7, '0.00e-0', 'up')).toBe('1.00e−6'))
})

describe('an estimate', () => {
  const interval = { value: 20.8449, low: 20.7911, high: 20.9011 }
  it('has ends that are rounded outwards', () => expect(formatEnds(interval, '0.00')).toBe('20.79…20.91'))
  it('has its number last, below those of exact cells', () => expect(formatEstimate(interval, '0.00')).toBe('(20.79…20.91) 20.84'))
  it('rounds a margin down at both of its ends that could flatter', () => expect(formatEstimate({ value: 1.087, low: 1.029, high: 1.131 }, '+0.00', 'down')).toBe('(+1.02…+1.14) +1.08'))
  it('is a number where the digits shown do not tell its ends apart', () => expect(formatEstimate({ value: 3, low: 3 - 1e-14, high: 3 }, '0.000')).toBe('3.000'))
  it('is copied with all digits', () => expect(plainEstimate(interval)).toBe('20.8449 (20.7911…20.9011)'))
})
