import { describe, expect, it } from 'vitest'
import {
  availableEsN0Db, capacity, createConstellation, ebN0Db, esN0ForCapacity, evmPercentAt, freeSpaceLossDb, noiseDensityDbmHz, ratesOf, shapedBackOffDb,
} from '../../shared/modulation'
import { boltzmann } from '../../shared/modulation/link'

// Recommendation ITU-R P.525-4: L = 32.4 + 20·log10 f + 20·log10 d with f in MHz and d in km
describe('ITU-R P.525', () => {
  it.each([{ ghz: 0.1, km: 10 }, { ghz: 7.5, km: 38 }, { ghz: 30, km: 35786 }])('$ghz GHz over $km km', ({ ghz, km }) => {
    expect(Math.abs(freeSpaceLossDb(ghz, km) - (32.4 + 20 * Math.log10(ghz * 1000) + 20 * Math.log10(km)))).toBeLessThan(0.05)
  })
  // the form in GHz and km, 92.45, as in textbooks (common practice)
  it('1 GHz over 1 km loses 92.45 dB', () => expect(freeSpaceLossDb(1, 1)).toBeCloseTo(92.45, 2))
  // common practice: a geostationary link at 12 GHz loses about 205 dB
  it('12 GHz from the geostationary orbit loses 205.1 dB', () => expect(freeSpaceLossDb(12, 35786)).toBeCloseTo(205.1, 1))
})

// CODATA 2018 and the SI since 2019: k = 1.380649e-23 J/K exactly; −228.6 dBW/(K·Hz) in link budgets (common practice)
describe('CODATA', () => {
  it('k is −228.6 dBW/(K·Hz)', () => expect(10 * Math.log10(boltzmann)).toBeCloseTo(-228.6, 1))
})

// IEEE standard noise temperature 290 K; Recommendation ITU-R P.372: k·t0 is −204 dBW/Hz, so −174 dBm/Hz
describe('IEEE, ITU-R P.372', () => {
  it('thermal noise at 290 K is −174 dBm/Hz', () => expect(noiseDensityDbmHz(0)).toBeCloseTo(-174, 1))
  it('is −173.975 dBm/Hz to three digits', () => expect(noiseDensityDbmHz(0)).toBeCloseTo(-173.975, 3))
  // common practice: 1 dB of noise figure is 75 K above 290 K
  it('a noise figure of 1 dB is a source of 365 K', () => expect(noiseDensityDbmHz(1)).toBeCloseTo(noiseDensityDbmHz(0, 290 + 75.09), 3))
})

// C. E. Shannon, "A mathematical theory of communication", 1948
describe('Shannon 1948', () => {
  it('one bit per two-dimensional symbol takes Es/N0 = 0 dB', () => expect(esN0ForCapacity(1, 2)).toBeCloseTo(1, 14))
  it('W·log2(1 + P/N): 10 bit take an SNR of 30.1 dB', () => expect(10 * Math.log10(esN0ForCapacity(10, 2))).toBeCloseTo(30.0988, 4))
  it('the ultimate limit of Eb/N0 is ln 2 = −1.59 dB', () => {
    expect(ebN0Db(10 * Math.log10(esN0ForCapacity(1e-9, 2)), 1e-9)).toBeCloseTo(-1.59, 2)
  })
  it('capacity of two dimensions is twice that of one with half of the energy', () => expect(capacity(2, 7)).toBeCloseTo(2 * capacity(1, 3.5), 14))
})

// H. Nyquist 1928; J. G. Proakis, Digital Communications: a raised-cosine band pass signal occupies Rs·(1 + α)
describe('Nyquist band', () => {
  const rates = ratesOf({ heldConstant: 'symbolRate', value: 3.84e6 }, { netBits: 2, dimensions: 2, rollOff: 0.22, overhead: 0, dimensionsPerInterval: 2 })
  // 3GPP TS 25.104 (from memory): 3.84 Mchip/s at roll-off 0.22 for a nominal 5 MHz spacing
  it('3.84 Msymbol/s at roll-off 0.22 occupy 4.685 MHz', () => expect(rates.occupiedBandwidthHz).toBeCloseTo(4.6848e6, 3))
  it('QPSK carries 2/(1 + α) bit/s/Hz', () => expect(rates.spectralEfficiency).toBeCloseTo(1.6393, 4))
})

// Common practice: SNR = −20·log10(EVM), so 10 % is 20 dB and 3.16 % is 30 dB
describe('error vector magnitude', () => {
  it('of 30 dB is 3.16 %', () => expect(evmPercentAt(30, 2)).toBeCloseTo(3.162, 3))
})

// CCSDS and textbooks (common practice): Es/N0 = C/N0 − 10·log10 Rs
describe('C/N0', () => {
  it('70 dBHz at 1 Msymbol/s are 10 dB', () => expect(availableEsN0Db(70, 1e6, 0)).toBeCloseTo(10, 12))
})

// S. O. Rice, "Mathematical analysis of random noise", Bell Syst. Tech. J. 1944/45: the power of a Gaussian band-pass
// signal exceeds x times its mean with probability exp(−x), so 1e-3 is reached at 10·log10(ln 1000) = 8.39 dB.
// Without roll-off, for with it the mean power moves within the symbol interval.
describe('Rice 1944', () => {
  const deviation = 4
  const axis = Array.from({ length: 41 }, (_, i) => i - 20)
  const weight = (x: number) => Math.exp(-x * x / (2 * deviation * deviation))
  const total = axis.reduce((sum, x) => sum + weight(x), 0)
  it('Gaussian symbols on a carrier back off by 8.39 dB', () => {
    const pairs = axis.flatMap(x => axis.map(y => [x, y]))
    const probabilities = pairs.map(([x, y]) => weight(x!) * weight(y!) / total ** 2)
    const { backOffDb } = shapedBackOffDb(createConstellation(pairs, { probabilities }), { rollOff: 0, instants: 16384 })
    expect(Math.abs(backOffDb - 8.393)).toBeLessThan(0.06)
  })
  // Abramowitz and Stegun, table 26.5: a normal variable exceeds 3.2905 standard deviations on either side with 1e-3
  it('a real Gaussian signal backs off by 20·log10 3.2905 = 10.345 dB', () => {
    const real = createConstellation(axis.map(x => [x]), { probabilities: axis.map(x => weight(x) / total) })
    expect(Math.abs(shapedBackOffDb(real, { rollOff: 0, instants: 16384 }).backOffDb - 10.345)).toBeLessThan(0.06)
  })
})
