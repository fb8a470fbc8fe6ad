import { describe, expect, it } from 'vitest'
import { analyse, fromDecibels, generate, requiredEsN0Db, serExact, serFading } from '../../shared/modulation'
import type { FadingChannel } from '../../shared/modulation'

const relative = (value: number, reference: number) => Math.abs(value / reference - 1)
const binary = analyse(generate('psk', { order: 2 }))
const exact = (geometry: typeof binary, snr: number, channel: FadingChannel) => serFading(geometry, 'serExact', 1 / snr, channel)
const snrs = [-10, 0, 5, 10, 20].map(fromDecibels)

/** ((1−μ)/2)^n·Σ_{k<n} C(n−1+k, k)·((1+μ)/2)^k */
function combined(n: number, mu: number): number {
  let sum = 0
  let binomial = 1
  for (let k = 0; k < n; k++) {
    sum += binomial * ((1 + mu) / 2) ** k
    binomial *= (n + k) / (k + 1)
  }
  return ((1 - mu) / 2) ** n * sum
}

// J. G. Proakis, Digital Communications, on binary signalling over a Rayleigh channel: ½(1 − √(γ/(1+γ)))
describe('Proakis, binary PSK over Rayleigh fading', () => {
  it.each(snrs)('at a mean SNR of %f', (snr) => {
    expect(relative(exact(binary, snr, { kind: 'rayleigh', branches: 1 }), (1 - Math.sqrt(snr / (1 + snr))) / 2)).toBeLessThan(1e-13)
  })
  it('SER 1e-3 takes (1 − 2p)²/(1 − (1 − 2p)²), 23.97 dB', () => {
    const rate = (n0: number) => serFading(binary, 'serExact', n0, { kind: 'rayleigh', branches: 1 })
    const needed = requiredEsN0Db({ rate, meanEnergy: 1, monotone: true }, 1e-3)
    expect(needed).toBeCloseTo(10 * Math.log10(0.998 ** 2 / (1 - 0.998 ** 2)), 8)
    expect(needed).toBeCloseTo(23.97, 2)
  })
})

// J. G. Proakis, Digital Communications, on maximal-ratio combining: SNR per branch, μ = √(γ/(1+γ))
describe.each([2, 4, 8, 16])('Proakis, binary PSK, %d branches', (branches) => {
  it.each(snrs)('at a mean SNR of %f', (snr) => {
    expect(relative(exact(binary, snr, { kind: 'rayleigh', branches }), combined(branches, Math.sqrt(snr / (1 + snr))))).toBeLessThan(1e-12)
  })
})

// M. K. Simon and M.-S. Alouini, Digital Communication over Fading Channels, §5.1.4: whole m, μ = √(γ/(m+γ))
describe.each([2, 3, 10])('Simon and Alouini, binary PSK over Nakagami fading of m = %d', (m) => {
  it.each(snrs)('at a mean SNR of %f', (snr) => {
    expect(relative(exact(binary, snr, { kind: 'nakagami', branches: 1, m }), combined(m, Math.sqrt(snr / (m + snr))))).toBeLessThan(1e-12)
  })
  it('two branches of it are one of 2m at twice the SNR', () => {
    expect(relative(exact(binary, 5, { kind: 'nakagami', branches: 2, m }), exact(binary, 10, { kind: 'nakagami', branches: 1, m: 2 * m }))).toBeLessThan(1e-12)
  })
})

// M. K. Simon and M.-S. Alouini, §8.2.1.3: M-PSK over Rayleigh fading
describe.each([3, 8, 16, 64])('Simon and Alouini, %d-PSK over Rayleigh fading', (order) => {
  const geometry = analyse(generate('psk', { order }))
  it.each(snrs)('at a mean SNR of %f', (snr) => {
    const g = Math.sin(Math.PI / order) ** 2 * snr
    const root = Math.sqrt(g / (1 + g))
    const closed = (order - 1) / order * (1 - root * order / ((order - 1) * Math.PI) * (Math.PI / 2 + Math.atan(root / Math.tan(Math.PI / order))))
    expect(relative(exact(geometry, snr, { kind: 'rayleigh', branches: 1 }), closed)).toBeLessThan(1e-11)
  })
})

// M. K. Simon and M.-S. Alouini, §8.2.1.2: square QAM over Rayleigh fading
describe.each([4, 16, 64, 256])('Simon and Alouini, %d-QAM over Rayleigh fading', (order) => {
  const geometry = analyse(generate('qam', { order }))
  it.each(snrs)('at a mean SNR of %f', (snr) => {
    const side = 1 - 1 / Math.sqrt(order)
    const root = Math.sqrt(1.5 * snr / (order - 1 + 1.5 * snr))
    const closed = 2 * side * (1 - root) - side ** 2 * (1 - root * 4 / Math.PI * Math.atan(1 / root))
    expect(relative(exact(geometry, snr, { kind: 'rayleigh', branches: 1 }), closed)).toBeLessThan(1e-11)
  })
})

// M. K. Simon and M.-S. Alouini, §8.2.1.1: M-PAM over Rayleigh fading
describe.each([2, 4, 8])('Simon and Alouini, %d-PAM over Rayleigh fading', (order) => {
  it.each(snrs)('at a mean SNR of %f', (snr) => {
    const g = 3 * snr / (order * order - 1)
    const closed = (order - 1) / order * (1 - Math.sqrt(g / (1 + g)))
    expect(relative(exact(analyse(generate('pam', { order })), snr, { kind: 'rayleigh', branches: 1 }), closed)).toBeLessThan(1e-12)
  })
})

// M. K. Simon and M.-S. Alouini, §2.2: what the Rician and Nakagami densities become at their ends
describe.each([['8-PSK', analyse(generate('psk', { order: 8 }))], ['hexagonal 16', analyse(generate('hexagonal', { order: 16 }))]] as const)('%s', (_, geometry) => {
  const rayleigh = exact(geometry, 20, { kind: 'rayleigh', branches: 2 })
  it('Rician fading of K = 0 is Rayleigh fading', () => {
    expect(relative(exact(geometry, 20, { kind: 'rician', branches: 2, kFactor: 0 }), rayleigh)).toBeLessThan(1e-14)
  })
  it('Nakagami fading of m = 1 is Rayleigh fading', () => {
    expect(relative(exact(geometry, 20, { kind: 'nakagami', branches: 2, m: 1 }), rayleigh)).toBeLessThan(1e-14)
  })
  it('Rician fading of K = 1e9 is none', () => {
    expect(relative(exact(geometry, 20, { kind: 'rician', branches: 1, kFactor: 1e9 }), serExact(geometry, 1 / 20))).toBeLessThan(1e-6)
  })
  it('Nakagami fading of m = 1e9 is none', () => {
    expect(relative(exact(geometry, 20, { kind: 'nakagami', branches: 1, m: 1e9 }), serExact(geometry, 1 / 20))).toBeLessThan(1e-6)
  })
})
