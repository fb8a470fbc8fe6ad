import { expect, it } from 'vitest'
import { frameErrorRate } from '../../../shared/modulation'

it('a frame of one symbol errs as the symbol does', () => expect(frameErrorRate(0.25, 1)).toBeCloseTo(0.25, 15))
it('a frame of two symbols at ½ is right once in four times', () => expect(frameErrorRate(0.5, 2)).toBeCloseTo(0.75, 15))
it('rare errors add up without rounding', () => expect(frameErrorRate(1e-20, 1000) / 1e-17).toBeCloseTo(1, 14))
it('1,000 symbols at 1e-3 fail with 1 − 0.999^1000', () => expect(frameErrorRate(1e-3, 1000)).toBeCloseTo(0.632304575, 9))
it('a bound above 1 counts as certain', () => expect(frameErrorRate(1.7, 10)).toBe(1))
it('an empty frame is refused at its field', () => {
  expect(() => frameErrorRate(0.1, 0)).toThrow(expect.objectContaining({ path: ['frameSymbols'] }))
})
