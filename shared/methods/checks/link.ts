import { availableEsN0Db, capacity, ebN0Db, esN0ForCapacity, freeSpaceLossDb, noiseDensityDbmHz, ratesOf } from '../../modulation'
import { boltzmann } from '../../modulation/link'
import type { Check } from './check'

const freeSpace = (ghz: number, km: number): Check => ({
  method: 'linkBudget', what: `free-space loss, ${ghz} GHz over ${km} km: 32.4 + 20·log10 f + 20·log10 d`, unit: 'dB', within: 0.05, source: 'ituP525',
  published: () => 32.4 + 20 * Math.log10(ghz * 1000) + 20 * Math.log10(km), compute: () => freeSpaceLossDb(ghz, km),
})
const carrier = () => ratesOf({ heldConstant: 'symbolRate', value: 3.84e6 }, { netBits: 2, dimensions: 2, rollOff: 0.22, overhead: 0, dimensionsPerInterval: 2 })

/** Eb/N0 in dB at which capacity equals the net bits of two dimensions. */
const limit = (netBits: number, published: string): Check => ({
  method: 'capacity', what: `Eb/N0 at capacity, ${netBits} bit in two dimensions`, unit: 'dB', published, source: 'shannon',
  compute: () => ebN0Db(10 * Math.log10(esN0ForCapacity(netBits, 2)), netBits),
})

/** Link budgets, bandwidths and capacity. */
export const linkChecks: readonly Check[] = [
  freeSpace(0.1, 10), freeSpace(7.5, 38), freeSpace(30, 35786),
  { method: 'linkBudget', what: 'free-space loss, 1 GHz over 1 km', unit: 'dB', published: '92.45', source: 'commonPractice', compute: () => freeSpaceLossDb(1, 1) },
  { method: 'linkBudget', what: 'free-space loss, 12 GHz from the geostationary orbit', unit: 'dB', published: '205.1', source: 'commonPractice', compute: () => freeSpaceLossDb(12, 35786) },
  { method: 'linkBudget', what: 'Boltzmann’s constant', unit: 'dBW/(K·Hz)', published: '-228.6', source: 'codata', compute: () => 10 * Math.log10(boltzmann) },
  { method: 'linkBudget', what: 'thermal noise at 290 K', unit: 'dBm/Hz', published: '-174', source: 'ituP372', compute: () => noiseDensityDbmHz(0) },
  { method: 'linkBudget', what: 'a noise figure of 1 dB is 75.09 K above 290 K', unit: 'dBm/Hz', published: () => noiseDensityDbmHz(0, 290 + 75.09), within: 1e-3, source: 'commonPractice', compute: () => noiseDensityDbmHz(1) },
  { method: 'linkBudget', what: 'C/N0 of 70 dBHz at 1 Msymbol/s', unit: 'dB', published: '10', within: 1e-9, source: 'commonPractice', compute: () => availableEsN0Db(70, 1e6, 0) },
  { method: 'bandwidth', what: '3.84 Msymbol/s at roll-off 0.22', unit: 'MHz', published: '4.685', source: 'threeGppUtra', memory: true, compute: () => carrier().occupiedBandwidthHz / 1e6 },
  { method: 'bandwidth', what: 'QPSK at roll-off 0.22, 2/(1 + α)', unit: 'bit/s/Hz', published: () => 2 / 1.22, source: 'nyquist', compute: () => carrier().spectralEfficiency },
  { method: 'capacity', what: 'Es/N0 at capacity, 1 bit in two dimensions', published: '1', within: 1e-12, source: 'shannon', compute: () => esN0ForCapacity(1, 2) },
  { method: 'capacity', what: '10 bit take an SNR of 1023', unit: 'dB', published: '30.0988', source: 'shannon', compute: () => 10 * Math.log10(esN0ForCapacity(10, 2)) },
  { method: 'capacity', what: 'ultimate limit of Eb/N0, ln 2', unit: 'dB', published: '-1.59', source: 'shannon', compute: () => ebN0Db(10 * Math.log10(esN0ForCapacity(1e-9, 2)), 1e-9) },
  limit(1, '0.00'), limit(2, '1.76'), limit(4, '5.74'),
  { method: 'capacity', what: 'two dimensions: twice one with half of the energy', published: () => 2 * capacity(1, 3.5), within: { relative: 1e-13 }, source: 'shannon', compute: () => capacity(2, 7) },
]
