import { describe, expect, it } from 'vitest'
import { analyse, berExact, berExactCurve, berNearest, ebN0Db, familyLabels, fromDecibels, generate, naturalLabels, q, requiredEsN0Db, serExact } from '../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../shared/modulation'

const relative = (value: number, reference: number) => Math.abs(value / reference - 1)
const geometryOf = (id: FamilyId, parameters: FamilyParameters, labels = familyLabels(id, parameters)) => analyse(generate(id, parameters, { labels }))
/** Es/N0 from −10 to 40 dB: rates from near 0.5 to far below 1e-20 for the smaller sets. */
const decibels = Array.from({ length: 26 }, (_, n) => 2 * n - 10)

/** Largest relative error over the rates above 1e-20. */
function worst(id: FamilyId, parameters: FamilyParameters, closed: (esN0: number) => number): number {
  const curve = berExactCurve(geometryOf(id, parameters), decibels.map(db => 1 / fromDecibels(db)))
  return decibels.reduce((most, db, n) => {
    const wanted = closed(fromDecibels(db))
    return wanted > 1e-20 ? Math.max(most, relative(curve[n]!, wanted)) : most
  }, 0)
}

/** Σ over the bits of one coordinate of 2^m levels, half distance over deviation a: Cho and Yoon's equation for bit k, with erfc(x) = 2·Q(√2·x). */
function axisBits(levels: number, a: number): number {
  let sum = 0
  for (let k = 1; 2 ** k <= levels; k++) {
    for (let i = 0; i < (1 - 2 ** -k) * levels; i++) {
      const part = i * 2 ** (k - 1) / levels
      sum += (Math.floor(part) % 2 === 0 ? 1 : -1) * (2 ** (k - 1) - Math.floor(part + 0.5)) * 2 * q((2 * i + 1) * a) / levels
    }
  }
  return sum
}

// K. Cho and D. Yoon, "On the general BER expression of one- and two-dimensional amplitude modulations", IEEE Trans. Commun. 50 (2002)
describe('Cho and Yoon 2002', () => {
  it.each([4, 16, 64, 256, 1024, 4096])('exact BER of Gray %d-QAM', (order) => {
    const closed = (esN0: number) => 2 * axisBits(Math.sqrt(order), Math.sqrt(3 * esN0 / (order - 1))) / Math.log2(order)
    expect(worst('qam', { order }, closed)).toBeLessThan(1e-8)
  })
  it.each([8, 32, 128, 512])('exact BER of Gray rectangular %d-QAM', (order) => {
    const [columns, rows] = [2 ** Math.ceil(Math.log2(order) / 2), 2 ** Math.floor(Math.log2(order) / 2)]
    const closed = (esN0: number) => {
      const a = Math.sqrt(6 * esN0 / (columns ** 2 + rows ** 2 - 2))
      return (axisBits(columns, a) + axisBits(rows, a)) / Math.log2(order)
    }
    expect(worst('qam', { order }, closed)).toBeLessThan(1e-8)
  })
  it.each([2, 4, 8, 16, 64])('exact BER of Gray %d-PAM', (order) => {
    expect(worst('pam', { order }, esN0 => axisBits(order, Math.sqrt(6 * esN0 / (order ** 2 - 1))) / Math.log2(order))).toBeLessThan(1e-10)
  })
})

// P. J. Lee, "Computation of the bit error rate of coherent M-ary PSK with Gray code bit mapping", IEEE Trans. Commun. 34 (1986): the
// boundaries of 8-PSK's bits are straight lines through the origin, which leaves products of Q (form from memory)
describe('Lee 1986', () => {
  it('exact BER of Gray 8-PSK', () => {
    const closed = (esN0: number) => {
      const [s, c] = [q(Math.sqrt(2 * esN0) * Math.sin(Math.PI / 8)), q(Math.sqrt(2 * esN0) * Math.cos(Math.PI / 8))]
      return 2 / 3 * (s + c - s * c)
    }
    expect(worst('psk', { order: 8 }, closed)).toBeLessThan(1e-9)
  })
})

// J. G. Proakis, Digital Communications: binary PSK, and QPSK as two of them
describe('Proakis', () => {
  it('binary PSK has Q(√(2·Eb/N0))', () => expect(worst('psk', { order: 2 }, esN0 => q(Math.sqrt(2 * esN0)))).toBeLessThan(1e-12))
  it('Gray QPSK has the same at the same Eb/N0', () => expect(worst('psk', { order: 4 }, esN0 => q(Math.sqrt(esN0)))).toBeLessThan(1e-9))
  it('at high SNR Gray labels lose one bit of k a symbol in error', () => {
    const geometry = geometryOf('psk', { order: 16 })
    expect(berExact(geometry, 1e-3) * 4 / serExact(geometry, 1e-3)).toBeCloseTo(1, 9)
  })
})

// Common textbook values (from memory): Eb/N0 for a bit error rate of 1e-5 or 1e-6, Gray labels
describe('textbook values of required Eb/N0', () => {
  it.each([
    ['psk', 2, 1e-5, 9.6], ['psk', 4, 1e-6, 10.5], ['psk', 8, 1e-6, 14.0], ['psk', 16, 1e-6, 18.4],
    ['qam', 16, 1e-6, 14.4], ['qam', 64, 1e-6, 18.8], ['qam', 16, 1e-5, 13.4], ['qam', 64, 1e-5, 17.8], ['qam', 256, 1e-5, 22.5],
  ] as [FamilyId, number, number, number][])('%s of %d points at %d: %d dB', (id, order, target, wanted) => {
    const required = requiredEsN0Db({ geometry: geometryOf(id, { order }), kind: 'berExact' }, target)
    expect(Math.abs(ebN0Db(required, Math.log2(order)) - wanted)).toBeLessThan(0.1)
  })
})

// E. Agrell, J. Lassing, E. G. Ström, T. Ottosson, "On the optimality of the binary reflected Gray code", IEEE Trans. Inf. Theory 50 (2004):
// natural binary 8-PSK differs from its neighbours in 2·(M−1)/M = 1.75 bits on average
describe('Agrell et al. 2004', () => {
  it('natural labels of 8-PSK cost 1.75 bits a neighbour', () => {
    const geometries = [naturalLabels(8), familyLabels('psk', { order: 8 })].map(labels => geometryOf('psk', { order: 8 }, labels))
    expect(berNearest(geometries[0]!, 0.05) / berNearest(geometries[1]!, 0.05)).toBeCloseTo(1.75, 12)
  })
})
