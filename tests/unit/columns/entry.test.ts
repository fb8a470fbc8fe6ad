import { describe, expect, it } from 'vitest'
import { choiceEntry, numberEntry, parseFraction, parseNumber } from '../../../shared/columns/entry'

describe('typed numbers', () => {
  it('reads decimals', () => expect(parseNumber(' 2.57 ')).toBe(2.57))
  it('reads powers of ten', () => expect(parseNumber('1e-6')).toBe(1e-6))
  it('reads a true minus sign, in the exponent too', () => expect(parseNumber('−1.2e−3')).toBe(-0.0012))
  it('reads a power of ten that is written out', () => expect(parseNumber('3·10^2')).toBe(300))
  it('refuses a decimal comma', () => expect(parseNumber('2,57')).toBeNull())
  it('refuses hexadecimal numbers', () => expect(parseNumber('0x10')).toBeNull())
  it('refuses words', () => expect(parseNumber('Infinity')).toBeNull())
  it('reads a fraction', () => expect(parseFraction('3/4')).toBe(0.75))
  it('refuses a fraction of nothing', () => expect(parseFraction('3/0')).toBeNull())
  it('clears a number with an empty text', () => expect(numberEntry('rollOff')('')).toEqual({ change: { rollOff: null } }))
  it('says what to type instead of a decimal comma', () => expect(numberEntry('rollOff')('−2,57'))
    .toEqual({ refused: '“−2,57” has a comma: enter −2.57, with a point.' }))
  it('names what is no number', () => expect(numberEntry('order')('many')).toEqual({ refused: '“many” is not a number.' }))
})

describe('typed choices', () => {
  const choices = [{ value: 'meanEnergy', title: 'mean energy' }, { value: 'peakEnergy', title: 'peak energy' }]
  it('reads a title in any case', () => expect(choiceEntry('normalisation', choices)('Peak Energy')).toEqual({ change: { normalisation: 'peakEnergy' } }))
  it('says what may be chosen', () => expect(choiceEntry('normalisation', choices)('none')).toEqual({ refused: 'Choose one of: mean energy, peak energy.' }))
  it('refuses an empty cell that needs a choice', () => expect(choiceEntry('normalisation', choices)('')).toHaveProperty('refused'))
  it('clears a cell that may be empty', () => expect(choiceEntry('role', choices, true)('')).toEqual({ change: { role: null } }))
})
