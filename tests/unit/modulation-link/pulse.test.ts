import { describe, expect, it } from 'vitest'
import { rootRaisedCosine, tapsAt } from '../../../shared/modulation/pulse'

/** Sum of a tap's square, or of products with the taps some whole symbols later, over a fine grid in time. */
const correlation = (rollOff: number, shift: number) => {
  const steps = 16
  let sum = 0
  for (let n = -200 * steps; n <= 200 * steps; n++) sum += rootRaisedCosine(n / steps, rollOff) * rootRaisedCosine(n / steps + shift, rollOff)
  return sum / steps
}

describe('root-raised-cosine pulse', () => {
  it('has unit energy', () => expect(correlation(0.25, 0)).toBeCloseTo(1, 6))
  it('is orthogonal to itself one symbol later', () => expect(correlation(0.25, 1)).toBeCloseTo(0, 6))
  it('is orthogonal to itself seven symbols later', () => expect(correlation(0.5, 7)).toBeCloseTo(0, 6))
  it('peaks at 1 − α + 4α/π', () => expect(rootRaisedCosine(0, 0.25)).toBeCloseTo(1.0683098862, 9))
  it('is continuous where its denominator vanishes', () => {
    expect(rootRaisedCosine(1, 0.25)).toBeCloseTo(rootRaisedCosine(1 + 1e-6, 0.25), 5)
  })
  it('is a sinc at roll-off 0', () => expect(rootRaisedCosine(0.5, 0)).toBeCloseTo(2 / Math.PI, 14))
  it('is even', () => expect(rootRaisedCosine(-1.3, 0.35)).toBe(rootRaisedCosine(1.3, 0.35)))
})

describe('taps', () => {
  it('are as many as the symbols within reach', () => {
    const { strong, weak } = tapsAt(0.3, 0.25, 16, 0.05)
    expect(strong.length + weak.length).toBe(32)
  })
  it('hold the energy of the pulse on average over the offsets', () => {
    const energies = [0.0625, 0.1875, 0.3125, 0.4375].map((offset) => {
      const { strong, weak } = tapsAt(offset, 0.25, 16, 0.05)
      return [...strong, ...weak].reduce((sum, tap) => sum + tap * tap, 0)
    })
    expect(energies.reduce((sum, energy) => sum + energy, 0) / 4).toBeCloseTo(1, 4)
  })
})
