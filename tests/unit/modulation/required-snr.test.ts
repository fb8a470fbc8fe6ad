import { describe, expect, it } from 'vitest'
import { ModulationError, analyse, generate, q, qInverse, requiredEsN0Db } from '../../../shared/modulation'

const qpsk = analyse(generate('psk', { order: 4 }))
const binary = analyse(generate('pam', { order: 2 }))

describe('required Es/N0', () => {
  // Q(√(2·Es/N0)) = 1e-6
  it('of binary antipodal signalling follows from the inverse of Q, to 1e-9 dB', () => {
    const wanted = 10 * Math.log10(qInverse(1e-6) ** 2 / 2)
    expect(Math.abs(requiredEsN0Db({ geometry: binary, kind: 'serExact' }, 1e-6) - wanted)).toBeLessThan(1e-9)
  })
  it.each([1e-15, 1e-30, 1e-100, 0.3, 0.48])('reaches a target of %d', (target) => {
    const wanted = 10 * Math.log10(qInverse(target) ** 2 / 2)
    expect(Math.abs(requiredEsN0Db({ geometry: binary, kind: 'serExact' }, target) - wanted)).toBeLessThan(1e-9)
  })
  it('of QPSK by all pairs lies above that by relevant neighbours', () => {
    const [pairs, union] = (['serAllPairs', 'serUnion'] as const).map(kind => requiredEsN0Db({ geometry: qpsk, kind }, 1e-2))
    expect(pairs! - union!).toBeGreaterThan(1e-4)
  })
  it('takes any function of N0', () => {
    expect(requiredEsN0Db({ rate: n0 => q(Math.sqrt(2 / n0)), meanEnergy: 1 }, 1e-6)).toBeCloseTo(requiredEsN0Db({ geometry: binary, kind: 'serExact' }, 1e-6), 9)
  })
  it('of a curve that rises again is where it stays below for good', () => {
    // Falls through 1e-3, comes back above it about 20 dB, and ends at 1e-9.
    const rate = (n0: number) => {
      const db = -10 * Math.log10(n0)
      return Math.max(10 ** (-db / 2), Math.abs(db - 20) < 2 ? 1e-2 * (1 - Math.abs(db - 20) / 2) : 0, 1e-9)
    }
    expect(requiredEsN0Db({ rate, meanEnergy: 1 }, 1e-3)).toBeCloseTo(21.8, 8)
  })
})

describe('refused targets', () => {
  const floor = { rate: () => 1e-4, meanEnergy: 1 }
  const cases: [string, () => number, string][] = [
    ['0', () => requiredEsN0Db({ geometry: qpsk, kind: 'serExact' }, 0), 'A target error rate is above 0 and below 1.'],
    ['1', () => requiredEsN0Db({ geometry: qpsk, kind: 'serExact' }, 1), 'A target error rate is above 0 and below 1.'],
    ['one below the floor', () => requiredEsN0Db(floor, 1e-6), 'The error rate stays above this target up to 90 dB Es/N0: enter a larger target.'],
    ['one that is always met', () => requiredEsN0Db({ geometry: qpsk, kind: 'serExact' }, 0.9), 'The error rate meets this target from −30 dB Es/N0 on: enter a smaller target.'],
    ['one above the floor', () => requiredEsN0Db(floor, 1e-3), 'The error rate meets this target from −30 dB Es/N0 on: enter a smaller target.'],
  ]
  it.each(cases)('%s', (_, call, message) => expect(call).toThrow(message))
  it('name their path', () => {
    try {
      requiredEsN0Db(floor, 1e-6)
      expect.unreachable()
    } catch (error) {
      expect((error as ModulationError).path).toEqual(['target'])
    }
  })
  it('are a ModulationError', () => expect(() => requiredEsN0Db(floor, 1e-6)).toThrow(ModulationError))
})
