import {
  bitMetricRate, capacity, createConstellation, decibels, ebN0Db, fromDecibels, generate, mutualInformation, rateThresholdDb, shapedProbabilities, valueOf, withProbabilities,
} from '../../modulation'
import type { FamilyId, FamilyParameters, InformationRateKind } from '../../modulation'
import type { Check } from './check'
import { n0At, pointsOf, simpson } from './tools'

const threshold = (id: FamilyId, parameters: FamilyParameters, netBits: number, kind: InformationRateKind = 'mutualInformation') =>
  valueOf(rateThresholdDb(pointsOf(id, parameters), kind, netBits))

const binaryLimit = (rate: string, netBits: number, published: string): Check => ({
  method: 'rateThreshold', what: `binary input, rate ${rate}: limit of Eb/N0`, unit: 'dB', published, source: 'ryanLin', memory: true,
  compute: () => threshold('psk', { order: 2 }, netBits) - 10 * Math.log10(netBits),
})

/** A standard's quasi-error-free SNR lies above the ideal threshold by what its code loses. */
const codeLoss = (what: string, published: string, id: FamilyId, parameters: FamilyParameters, netBits: number): Check => ({
  method: 'rateThreshold', what: `${what}: quasi-error-free; the ideal threshold lies up to 1.5 dB below`, unit: 'dB', published, within: 1.5, source: 'etsi', memory: true,
  compute: () => threshold(id, parameters, netBits),
})

/** I = s − c·s² nats at an SNR of s = 1e-3: c. */
const curvature = (name: string, id: FamilyId, order: number, published: string): Check => ({
  method: 'informationRates', what: `${name} at low SNR s: I = s − c·s² nats, c`, published, within: 0.005, source: 'verdu',
  compute: () => {
    const s = 1e-3
    return (s - valueOf(mutualInformation(generate(id, { order }), 1 / s)) * Math.LN2) / s ** 2
  },
})

/** The slope of a binary signal's information over the SNR of one dimension, nats. */
const slope = (s: number): Check => ({
  method: 'informationRates', what: `binary signals at SNR ${s}: dI/ds = mmse/2, mmse = 1 − E tanh(s − √s·Z)`, unit: 'nat', source: 'guoShamaiVerdu', within: { relative: 1e-5 },
  published: () => (1 - simpson(z => Math.exp(-z * z / 2) / Math.sqrt(2 * Math.PI) * Math.tanh(s - Math.sqrt(s) * z), -10, 10, 2000)) / 2,
  compute: () => {
    const information = (snr: number) => valueOf(mutualInformation(generate('pam', { order: 2 }), 2 / snr)) * Math.LN2
    const step = 1e-3 * s
    return (information(s + step) - information(s - step)) / (2 * step)
  },
})

const line = (order: number) => createConstellation(Array.from({ length: order }, (_, n) => [2 * n + 1 - order]))

/** Energy saved against 2^bits equally likely points of the same spacing, dB. */
const shapingGain = (order: number, bits: number) =>
  decibels(line(2 ** bits).meanEnergy / withProbabilities(line(order), shapedProbabilities(line(order), bits)).meanEnergy)

/** Information rates and their thresholds. */
export const informationChecks: readonly Check[] = [
  binaryLimit('1/4', 1 / 4, '-0.794'), binaryLimit('1/3', 1 / 3, '-0.495'), binaryLimit('1/2', 1 / 2, '0.187'),
  binaryLimit('2/3', 2 / 3, '1.059'), binaryLimit('3/4', 3 / 4, '1.626'), binaryLimit('4/5', 4 / 5, '2.040'),
  { method: 'rateThreshold', what: '8-PSK reaches 2 bit (read from a plot)', unit: 'dB', published: '5.9', within: 0.15, source: 'ungerboeck', compute: () => threshold('psk', { order: 8 }, 2) },
  { method: 'rateThreshold', what: '16-QASK reaches 3 bit', unit: 'dB', published: '9.3', source: 'ungerboeck', memory: true, compute: () => threshold('qam', { order: 16 }, 3) },
  codeLoss('QPSK 1/2', '1.00', 'psk', { order: 4 }, 1), codeLoss('8-PSK 2/3', '6.62', 'psk', { order: 8 }, 2),
  codeLoss('16-APSK 3/4', '10.21', 'apsk', { rings: [4, 12], ratios: [2.85] }, 3),
  codeLoss('32-APSK 4/5', '13.64', 'apsk', { rings: [4, 12, 16], ratios: [2.72, 4.87], phases: [Math.PI / 4, Math.PI / 12, 0] }, 4),
  {
    method: 'informationRates', what: 'QPSK, Gray, at 2 dB: bit-metric rate and mutual information are the same', source: 'caireTariccoBiglieri', within: 1e-6,
    published: () => valueOf(mutualInformation(pointsOf('psk', { order: 4 }), n0At(2))), compute: () => valueOf(bitMetricRate(pointsOf('psk', { order: 4 }), n0At(2))),
  },
  {
    method: 'informationRates', what: 'QPSK at 2 dB: twice the binary rate of half of the energy', unit: 'bit', source: 'shannon', within: 2e-6,
    published: () => 2 * valueOf(mutualInformation(pointsOf('psk', { order: 2 }), 2 * n0At(2))), compute: () => valueOf(mutualInformation(pointsOf('psk', { order: 4 }), n0At(2))),
  },
  {
    method: 'informationRates', what: '16-QAM at −25 dB: capacity to first order, (Es/N0)/ln 2', unit: 'bit', source: 'shannon', within: { relative: 5e-3 },
    published: () => 1 / n0At(-25) / Math.LN2, compute: () => valueOf(mutualInformation(pointsOf('qam', { order: 16 }), n0At(-25))),
  },
  curvature('binary PSK', 'psk', 2, '1.0'), curvature('QPSK', 'psk', 4, '0.5'), curvature('8-PSK', 'psk', 8, '0.5'), curvature('16-QAM', 'qam', 16, '0.5'),
  slope(0.2), slope(3), slope(8),
  {
    method: 'informationRates', what: '4096-PAM at 50 dB: equal probabilities cost ½·log2(πe/6)', unit: 'bit', published: '0.255', within: 0.005, source: 'forneyUngerboeck',
    compute: () => capacity(1, fromDecibels(50)) - valueOf(mutualInformation(generate('pam', { order: 4096 }), n0At(50))),
  },
  {
    method: 'informationRates', what: '4-PAM, Gray: Eb/N0 for next to no bits, (5/4)·ln 2', unit: 'dB', published: () => decibels(Math.LN2 * 5 / 4), within: 0.01, source: 'stierstorferFischer', memory: true,
    compute: () => ebN0Db(threshold('pam', { order: 4 }, 0.002, 'bitMetricRate'), 0.002),
  },
  { method: 'shaping', what: '64-PAM that carries 4 bit: gain', unit: 'dB', published: '1.516', source: 'kschischang', memory: true, compute: () => shapingGain(64, 4) },
  { method: 'shaping', what: '8-PAM that carries 2 bit: gain', unit: 'dB', published: '1.25', source: 'kschischang', memory: true, compute: () => shapingGain(8, 2) },
  { method: 'informationRates', what: '16-QAM at 40 dB: all of its bits', unit: 'bit', published: '4', within: 1e-6, source: 'ungerboeck', compute: () => valueOf(mutualInformation(pointsOf('qam', { order: 16 }), n0At(40))) },
]
