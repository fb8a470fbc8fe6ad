import { describe, expect, it } from 'vitest'
import {
  apskPresets, createConstellation, decibels, ebN0Db, esN0ForCapacity, familyLabels, gapToCapacityDb, generate,
  rateThresholdDb, shapedProbabilities, valueOf, withProbabilities,
} from '../../shared/modulation'
import type { Constellation, FamilyId, FamilyParameters, InformationRateKind } from '../../shared/modulation'

const labelled = (id: FamilyId, parameters: FamilyParameters) => generate(id, parameters, { labels: familyLabels(id, parameters) })
const qam = (order: number) => labelled('qam', { order })
const psk = (order: number) => labelled('psk', { order })
const pam = (order: number, labels: string[] | null = null) => generate('pam', { order }, { labels })
const threshold = (constellation: Constellation, netBits: number, kind: InformationRateKind = 'mutualInformation') =>
  valueOf(rateThresholdDb(constellation, kind, netBits))
const ratio = (rate: string) => Number(rate.split('/')[0]) / Number(rate.split('/')[1])

// W. E. Ryan and S. Lin, Channel Codes: Classical and Modern, table of limits of the binary-input Gaussian channel (from memory)
describe('Ryan and Lin, binary-input Gaussian channel', () => {
  it('is approached by real and by complex binary signals alike', () => {
    expect(threshold(pam(2), 0.5)).toBeCloseTo(threshold(psk(2), 0.5), 4)
  })
  // Without a limit of the signals a code of rate 1/2 needs 0 dB
  it('is 0.187 dB from the limit of Gaussian signals at code rate 1/2', () => {
    expect(gapToCapacityDb(threshold(pam(2), 0.5), 0.5, 1)).toBeCloseTo(0.187, 3)
  })
})

// G. Ungerboeck, "Channel coding with multilevel/phase signals", IEEE Trans. Inf. Theory 28 (1982)
describe('Ungerboeck 1982', () => {
  it('doubling the set is nearly all that there is to gain: 16-PSK reaches 2 bit less than 0.3 dB sooner than 8-PSK', () => {
    expect(threshold(psk(8), 2) - threshold(psk(16), 2)).toBeGreaterThan(0)
    expect(threshold(psk(8), 2) - threshold(psk(16), 2)).toBeLessThan(0.3)
  })
})

// ETSI EN 302 307-1 table 13, quasi-error-free Es/N0 of the normal frame (from memory)
describe('ETSI EN 302 307-1', () => {
  const apsk = (order: number, rate: string) => generate('apsk', apskPresets.find(({ title }) => title === `${order}-APSK ${rate}`)!)
  it.each([
    { what: 'QPSK 1/2', constellation: psk(4), netBits: 1, db: 1.00 },
    { what: '8-PSK 2/3', constellation: psk(8), netBits: 2, db: 6.62 },
    { what: '16-APSK 3/4', constellation: apsk(16, '3/4'), netBits: 3, db: 10.21 },
    { what: '32-APSK 4/5', constellation: apsk(32, '4/5'), netBits: 4, db: 13.64 },
  ])('$what is 0.6 to 1.5 dB above the threshold', ({ constellation, netBits, db }) => {
    const above = db - threshold(constellation, netBits)
    expect(above).toBeGreaterThan(0.6)
    expect(above).toBeLessThan(1.5)
  })
  it.each([
    ['QPSK', psk(4), { '1/4': -2.35, '1/3': -1.24, '2/5': -0.30, '3/5': 2.23, '2/3': 3.10, '3/4': 4.03, '4/5': 4.68, '5/6': 5.18, '8/9': 6.20, '9/10': 6.42 }],
    ['8-PSK', psk(8), { '3/5': 5.50, '3/4': 7.91, '5/6': 9.35, '8/9': 10.69, '9/10': 10.98 }],
  ] as const)('%s of every other code rate is 0.6 to 1.5 dB above too, to the last digit printed', (_, constellation, printed) => {
    for (const [rate, db] of Object.entries(printed)) {
      const above = db - threshold(constellation, constellation.bitsPerSymbol * ratio(rate))
      expect(above, rate).toBeGreaterThan(0.595)
      expect(above, rate).toBeLessThan(1.5)
    }
  })
  it.each([
    [16, { '2/3': 8.97, '4/5': 11.03, '5/6': 11.61, '8/9': 12.89, '9/10': 13.13 }],
    [32, { '3/4': 12.73, '5/6': 14.28, '8/9': 15.69, '9/10': 16.05 }],
  ] as const)('%d-APSK of every other code rate, with its own ring ratios, is 0.6 to 1.5 dB above too', (order, printed) => {
    for (const [rate, db] of Object.entries(printed)) {
      const above = db - threshold(apsk(order, rate), Math.log2(order) * ratio(rate))
      expect(above, rate).toBeGreaterThan(0.6)
      expect(above, rate).toBeLessThan(1.5)
    }
  })
})

// ETSI EN 302 755 (DVB-T2), annex of simulated C/N on the Gaussian channel (from memory); mutual information bounds every decoder
describe('ETSI EN 302 755', () => {
  it.each([
    [4, { '1/2': 1.0, '3/5': 2.3, '2/3': 3.1, '3/4': 4.1, '4/5': 4.7, '5/6': 5.2 }],
    [16, { '1/2': 6.0, '3/5': 7.6, '2/3': 8.9, '3/4': 10.0, '4/5': 10.8, '5/6': 11.4 }],
    [64, { '1/2': 9.9, '3/5': 12.0, '2/3': 13.5, '3/4': 15.1, '4/5': 16.1, '5/6': 16.8 }],
    [256, { '1/2': 13.2, '3/5': 16.1, '2/3': 17.8, '3/4': 20.0, '4/5': 21.3, '5/6': 22.0 }],
  ] as const)('%d-QAM is 0.6 to 1.0 dB above the threshold at every code rate', (order, printed) => {
    for (const [rate, db] of Object.entries(printed)) {
      const above = db - threshold(qam(order), Math.log2(order) * ratio(rate))
      expect(above, rate).toBeGreaterThan(0.6)
      expect(above, rate).toBeLessThan(1.0)
    }
  })
})

// C. E. Shannon 1948: no signals carry more than (N/2)·log2(1 + 2·Es/(N·N0)); at R → 0 all zero-mean ones take Eb/N0 = ln 2
describe('Shannon 1948', () => {
  it.each([['binary PSK', psk(2)], ['8-PSK', psk(8)], ['16-QAM', qam(16)]] as const)('%s needs −1.59 dB for next to no bits a symbol', (_, constellation) => {
    expect(ebN0Db(threshold(constellation, 0.002), 0.002)).toBeCloseTo(-1.59, 2)
  })
  it('QPSK of code rate 1/2 needs 0.187 dB more than capacity of one bit in two dimensions', () => {
    expect(threshold(psk(4), 1) - decibels(esN0ForCapacity(1, 2))).toBeCloseTo(0.187, 3)
  })
})

// G. Caire, G. Taricco and E. Biglieri, "Bit-interleaved coded modulation", IEEE Trans. Inf. Theory 44 (1998)
describe('Caire, Taricco and Biglieri 1998', () => {
  it('with Gray labels next to nothing is lost: 8-PSK at 2 bit and 16-QAM at 3 bit need less than 0.1 dB more', () => {
    expect(threshold(psk(8), 2, 'bitMetricRate') - threshold(psk(8), 2)).toBeLessThan(0.1)
    expect(threshold(qam(16), 3, 'bitMetricRate') - threshold(qam(16), 3)).toBeLessThan(0.1)
  })
  it('with natural labels 8-PSK at 2 bit needs over 1 dB more', () => {
    const natural = generate('psk', { order: 8 }, { labels: Array.from({ length: 8 }, (_, n) => n.toString(2).padStart(3, '0')) })
    expect(threshold(natural, 2, 'bitMetricRate') - threshold(natural, 2)).toBeGreaterThan(1)
  })
})

// C. Stierstorfer and R. F. H. Fischer, "Asymptotically optimal mappings for BICM with M-PAM and M²-QAM", Electronics Letters 45 (2009);
// E. Agrell and A. Alvarado, "Optimal alphabets and binary labelings for BICM at low SNR", IEEE Trans. Inf. Theory 57 (2011) (from memory)
describe('Stierstorfer and Fischer 2009, Agrell and Alvarado 2011', () => {
  const limit = (labels: string[]) => ebN0Db(threshold(pam(4, labels), 0.002, 'bitMetricRate'), 0.002)
  it('natural labels of 4-PAM need −1.59 dB for next to no bits', () => expect(limit(['00', '01', '10', '11'])).toBeCloseTo(-1.59, 1))
})

// G. D. Forney and G. Ungerboeck, "Modulation and coding for linear Gaussian channels", IEEE Trans. Inf. Theory 44 (1998): equal
// probabilities cost up to ½·log2(πe/6) = 0.255 bit a dimension, or πe/6 = 1.53 dB
describe('Forney and Ungerboeck 1998', () => {
  it('the gap of 4096-QAM nears 1.53 dB from below', () => {
    const gap = gapToCapacityDb(threshold(qam(4096), 9), 9, 2)
    expect(gap).toBeGreaterThan(1.3)
    expect(gap).toBeLessThan(1.53)
  })
})

// F. R. Kschischang and S. Pasupathy, "Optimal nonuniform signaling for Gaussian channels", IEEE Trans. Inf. Theory 39 (1993)
describe('Kschischang and Pasupathy 1993', () => {
  const line = (order: number) => createConstellation(Array.from({ length: order }, (_, n) => [2 * n + 1 - order]))
  /** dB of energy saved against 2^bits equally likely points of the same spacing. */
  const gain = (order: number, bits: number) => {
    const shaped = withProbabilities(line(order), shapedProbabilities(line(order), bits))
    return decibels(line(2 ** bits).meanEnergy / shaped.meanEnergy)
  }
  it('never more', () => expect(gain(512, 6)).toBeLessThan(decibels(Math.PI * Math.E / 6)))
})

// G. Böcherer, F. Steiner and P. Schulte, "Bandwidth efficient and rate-matched low-density parity-check coded modulation", IEEE Trans. Commun. 63
// (2015): shaped square QAM with bit metrics comes within about 0.1 dB of capacity
describe('Böcherer, Steiner and Schulte 2015', () => {
  const shaped = (entropy: number) => {
    const probabilities = shapedProbabilities(generate('qam', { order: 64 }), entropy)
    return generate('qam', { order: 64 }, { probabilities, labels: familyLabels('qam', { order: 64 }) })
  }
  it('64-QAM of entropy 5.2 bit carries 4 bit 0.09 dB from capacity', () => {
    expect(gapToCapacityDb(threshold(shaped(5.2), 4, 'bitMetricRate'), 4, 2)).toBeLessThan(0.1)
  })
  it('with equal probabilities it stays 0.9 dB away', () => {
    expect(gapToCapacityDb(threshold(qam(64), 4, 'bitMetricRate'), 4, 2)).toBeGreaterThan(0.9)
  })
})
