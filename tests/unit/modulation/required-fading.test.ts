import { describe, expect, it } from 'vitest'
import { analyse, berFading, decibels, familyLabels, fromDecibels, generate, naturalLabels, requiredEsN0Db, requiredFadingSnr, serFading } from '../../../shared/modulation'

const rayleigh = { kind: 'rayleigh', branches: 1 } as const
const pair = { kind: 'rayleigh', branches: 2 } as const
const qam = analyse(generate('qam', { order: 16 }, { labels: familyLabels('qam', { order: 16 }) }))
const odd = analyse(generate('hexagonal', { order: 16 }, { labels: naturalLabels(16) }))

describe('required SNR under fading', () => {
  it('of binary PSK over a Rayleigh channel is (1 − 2p)²/(1 − (1 − 2p)²)', () => {
    const square = (1 - 2e-4) ** 2
    expect(requiredFadingSnr(analyse(generate('psk', { order: 2 })), 'serExact', 1e-4, rayleigh).esN0Db).toBeCloseTo(decibels(square / (1 - square)), 7)
  })
  it.each([['16-QAM', qam], ['hexagonal 16', odd]] as const)('of %s meets the bit error target', (_, geometry) => {
    const { esN0Db, crossings } = requiredFadingSnr(geometry, 'berExact', 1e-4, pair)
    expect(berFading(geometry, 'berExact', 1 / fromDecibels(esN0Db), pair) / 1e-4).toBeCloseTo(1, 8)
    expect(crossings).toBe(1)
  })
  it.each(['serExact', 'serUnion', 'serNearest', 'serAllPairs'] as const)('by %s meets the symbol error target', (kind) => {
    const { esN0Db } = requiredFadingSnr(odd, kind, 1e-3, pair)
    expect(serFading(odd, kind, 1 / fromDecibels(esN0Db), pair) / 1e-3).toBeCloseTo(1, 8)
  })
  it('by the bound over all pairs is above the exact one', () => {
    expect(requiredFadingSnr(qam, 'berAllPairs', 1e-3, pair).esN0Db).toBeGreaterThan(requiredFadingSnr(qam, 'berExact', 1e-3, pair).esN0Db)
  })
  it('without fading is that of the Gaussian channel', () => {
    expect(requiredFadingSnr(qam, 'berExact', 1e-5, { kind: 'awgn' }).esN0Db).toBe(requiredEsN0Db({ geometry: qam, kind: 'berExact' }, 1e-5))
  })
  it('two branches bring a target within reach that one misses up to 90 dB', () => {
    expect(() => requiredFadingSnr(qam, 'serExact', 1e-10, rayleigh)).toThrow(expect.objectContaining({ path: ['target'] }))
    expect(requiredFadingSnr(qam, 'serExact', 1e-10, pair).esN0Db).toBeLessThan(70)
  })
  it.each(['serUnion', 'berExact'] as const)('of a target of 1 by %s is refused', (kind) => {
    expect(() => requiredFadingSnr(qam, kind, 1, rayleigh)).toThrow('above 0 and below 1')
  })
})
