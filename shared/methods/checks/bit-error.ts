import { berAllPairs, berExact, berFading, berNearest, fromDecibels, q, requiredEsN0Db } from '../../modulation'
import type { Check } from './check'
import { geometryOf, n0At, pointsOf, simpson } from './tools'

/** Cho and Yoon's equations 9 and 10: error rate of bit k of L Gray-labelled levels; `beyond` the probability of noise beyond an odd number of half steps. */
function levelBit(levels: number, k: number, beyond: (odd: number) => number): number {
  const half = 2 ** (k - 1)
  let sum = 0
  for (let i = 0; i < (1 - 2 ** -k) * levels; i++) {
    sum += (-1) ** Math.floor(i * half / levels) * (half - Math.floor(i * half / levels + 0.5)) * 2 * beyond(2 * i + 1)
  }
  return sum / levels
}

/** Bit error rate of a rectangular Gray set of I × J levels (J = 1 is PAM); `beyond` as a function of half the squared argument of Q. */
function rectangular(i: number, j: number, esN0: number, beyond = (s: number) => q(Math.sqrt(2 * s))): number {
  const step = 3 * esN0 / (i * i + j * j - 2)
  const [k, l] = [Math.log2(i), Math.log2(j)]
  const sumOf = (levels: number, bits: number) =>
    Array.from({ length: bits }, (_, b) => levelBit(levels, b + 1, odd => beyond(odd * odd * step))).reduce((sum, p) => sum + p, 0)
  return (sumOf(i, k) + sumOf(j, l)) / (k + l)
}

/** Mean of Q(√(2s)) where s fades as Rayleigh's law has it. */
const overRayleigh = (s: number) => 0.5 * (1 - Math.sqrt(s / (1 + s)))

const qamOverRayleigh = (order: number, db: number): Check => ({
  method: 'fading', what: `${order}-QAM, Gray, over Rayleigh fading at ${db} dB: bit error rate, each Q averaged`, source: 'choYoon', within: { relative: 1e-8 },
  published: () => rectangular(Math.sqrt(order), Math.sqrt(order), fromDecibels(db), overRayleigh),
  compute: () => berFading(geometryOf('qam', { order }), 'berExact', n0At(db), { kind: 'rayleigh', branches: 1 }),
})

const qam = (order: number, db: number): Check => ({
  method: 'exactBer', what: `${order}-QAM, Gray, at ${db} dB`, source: 'choYoon', within: { relative: 1e-9 },
  published: () => {
    const k = Math.log2(order)
    return rectangular(2 ** Math.ceil(k / 2), 2 ** Math.floor(k / 2), fromDecibels(db))
  },
  compute: () => berExact(geometryOf('qam', { order }), n0At(db)),
})
const pam = (order: number, db: number): Check => ({
  method: 'exactBer', what: `${order}-PAM, Gray, at ${db} dB`, source: 'choYoon', within: { relative: 1e-9 },
  published: () => rectangular(order, 1, fromDecibels(db)), compute: () => berExact(geometryOf('pam', { order }), n0At(db)),
})

/** Density of the received phase of a point at angle 0. */
const phaseDensity = (esN0: number) => (theta: number) =>
  Math.exp(-esN0) / (2 * Math.PI) + Math.sqrt(esN0 / Math.PI) * Math.cos(theta) * Math.exp(-esN0 * Math.sin(theta) ** 2) * q(-Math.sqrt(2 * esN0) * Math.cos(theta))

/** Mean distance in bits of reflected Gray words j places apart on a circle of M. */
function spectrum(order: number, j: number): number {
  const off = (x: number) => Math.abs(x - Math.round(x))
  let sum = 2 * off(j / order)
  for (let size = 4; size <= order; size *= 2) sum += 2 * off(j / size)
  return sum
}

const psk = (order: number, db: number): Check => ({
  method: 'exactBer', what: `${order}-PSK, Gray, at ${db} dB: Σ d̄(j)·P(j) over the sectors`, source: 'lassing', memory: true, within: { relative: 1e-8 },
  published: () => Array.from({ length: order - 1 }, (_, n) => n + 1).reduce((sum, j) =>
    sum + spectrum(order, j) * simpson(phaseDensity(fromDecibels(db)), (2 * j - 1) * Math.PI / order, (2 * j + 1) * Math.PI / order, 2000), 0) / Math.log2(order),
  compute: () => berExact(geometryOf('psk', { order }), n0At(db)),
})

const binary = (esN0: number) => q(Math.sqrt(2 * esN0))

/** Bit error rates. */
export const bitErrorChecks: readonly Check[] = [
  qam(16, 10), qam(16, 20), qam(64, 15), qam(64, 26), qam(256, 20), qam(256, 32), qam(32, 18), qam(1024, 10),
  pam(4, 12), pam(8, 20), pam(16, 5),
  qamOverRayleigh(4, 10), qamOverRayleigh(16, 20), qamOverRayleigh(64, 30),
  psk(8, 5), psk(8, 12), psk(16, 10), psk(32, 12),
  {
    method: 'exactBer', what: 'QPSK, Gray, at 10 dB: Q(√(2·Eb/N0))', published: () => binary(fromDecibels(10) / 2), within: { relative: 1e-10 }, source: 'proakis',
    compute: () => berExact(geometryOf('psk', { order: 4 }), n0At(10)),
  },
  {
    method: 'berBounds', what: '16-QAM, Gray, at 20 dB: approximation, (3/4)·Q(√(Es/(5·N0)))', published: () => 0.75 * q(Math.sqrt(fromDecibels(20) / 5)), within: { relative: 1e-10 },
    source: 'proakis', compute: () => berNearest(geometryOf('qam', { order: 16 }), n0At(20)),
  },
  {
    method: 'berBounds', what: 'QPSK, Gray, at 10 dB: bound over all pairs, Q(d/√(2·N0)) + Q(d/√N0)', published: () => q(Math.sqrt(10)) + q(Math.sqrt(20)), within: { relative: 1e-10 },
    source: 'proakis', compute: () => berAllPairs(pointsOf('psk', { order: 4 }), n0At(10)),
  },
  {
    method: 'requiredSnr', what: 'Eb/N0 of QPSK at a bit error rate of 1e−5', unit: 'dB', published: '9.59', source: 'commonPractice',
    compute: () => requiredEsN0Db({ rate: n0 => berExact(geometryOf('psk', { order: 4 }), n0), meanEnergy: 1, monotone: true }, 1e-5) - 10 * Math.log10(2),
  },
]
