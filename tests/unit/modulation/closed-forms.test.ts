import { describe, expect, it } from 'vitest'
import { analyse, gaussLegendre, generate, pairwiseError, q, requiredEsN0Db, serExact, serNearest, serUnionBound } from '../../../shared/modulation'

const snrs = [-10, 0, 5, 10, 15, 20, 25]
const density = (esN0Db: number) => 10 ** (-esN0Db / 10)
const relative = (value: number, wanted: number) => Math.abs(value / wanted - 1)

describe('exact SER against closed forms', () => {
  // Proakis, Digital Communications: 1 − (1 − p)², p = 2(1 − 1/√M)·Q(√(3·Es/((M−1)·N0)))
  describe.each([4, 16, 64, 256])('%d-QAM', (order) => {
    const geometry = analyse(generate('qam', { order }))
    it.each(snrs)('at %d dB', (db) => {
      const p = 2 * (1 - 1 / Math.sqrt(order)) * q(Math.sqrt(3 / ((order - 1) * density(db))))
      expect(relative(serExact(geometry, density(db)), p * (2 - p))).toBeLessThan(1e-11)
    })
  })

  // Proakis: 2(1 − 1/M)·Q(√(6·Es/((M²−1)·N0))), in the convention of noise N0/2
  describe.each([2, 4, 8, 16])('%d-PAM', (order) => {
    const geometry = analyse(generate('pam', { order }))
    it.each(snrs)('at %d dB', (db) => {
      const wanted = 2 * (1 - 1 / order) * q(Math.sqrt(6 / ((order * order - 1) * density(db))))
      expect(relative(serExact(geometry, density(db)), wanted)).toBeLessThan(1e-12)
    })
  })

  // Craig 1991; Pawula, Rice, Roberts 1982: (1/π)·∫_0^{π(M−1)/M} exp(−(Es/N0)·sin²(π/M)/sin²θ) dθ
  describe.each([3, 4, 8, 16, 64])('%d-PSK', (order) => {
    const geometry = analyse(generate('psk', { order }))
    it.each(snrs)('at %d dB', (db) => {
      expect(relative(serExact(geometry, density(db)), craig(order, 1 / density(db)))).toBeLessThan(1e-11)
    })
  })

  it('two points of any plane are a pairwise error', () => {
    const geometry = analyse(generate('custom', { points: [[0.3, 1], [2, -1]] }))
    expect(relative(serExact(geometry, 0.2), pairwiseError(Math.hypot(1.7, 2), 0.2))).toBeLessThan(1e-14)
  })
})

describe('sums of pairwise errors', () => {
  const geometry = analyse(generate('qam', { order: 16 }))
  // 16-QAM: 48 directed neighbours at 2/√10
  it('union bound of 16-QAM is 3·Q', () => expect(relative(serUnionBound(geometry, 0.05), 3 * q(Math.sqrt(4)))).toBeLessThan(1e-12))
  it('approximation of 16-QAM is 3·Q', () => expect(relative(serNearest(geometry, 0.05), 3 * q(Math.sqrt(4)))).toBeLessThan(1e-12))
  it('may exceed 1', () => expect(serUnionBound(geometry, 1000)).toBeGreaterThan(1.4))
  it('pairwise error is Q(d/√(2·N0))', () => expect(pairwiseError(2, 0.5)).toBe(q(2)))
  it.each([0, -1, NaN, Infinity])('refuse N0 = %d', n0 => expect(() => serUnionBound(geometry, n0)).toThrow('The noise density N0 is a finite number above 0.'))
  it('exact refuses N0 = 0', () => expect(() => serExact(geometry, 0)).toThrow('The noise density N0 is a finite number above 0.'))
})

describe('required Es/N0 against published values', () => {
  // Ungerboeck 1982: uncoded 4-PSK needs 12.9 dB for SER 1e-5
  it('uncoded QPSK at 1e-5', () => {
    expect(requiredEsN0Db({ geometry: analyse(generate('psk', { order: 4 })), kind: 'serExact' }, 1e-5)).toBeCloseTo(12.9, 1)
  })
})

function craig(order: number, snr: number): number {
  const rule = gaussLegendre(40)
  const end = Math.PI * (order - 1) / order
  const panels = 200
  let sum = 0
  for (let panel = 0; panel < panels; panel++) {
    rule.nodes.forEach((node, n) => {
      const theta = end * (panel + node) / panels
      sum += rule.weights[n]! * Math.exp(-snr * Math.sin(Math.PI / order) ** 2 / Math.sin(theta) ** 2)
    })
  }
  return sum * end / panels / Math.PI
}
