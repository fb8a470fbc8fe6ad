import { createConstellation, generate, paprDb, qInverse } from '../../modulation'
import { shapedBackOffDb } from '../../modulation/waveform'
import type { FamilyId } from '../../modulation'
import type { Check } from './check'
import { energyAtUnitDistance, geometryOf } from './tools'

/** 1/√factor scales odd integers to unit mean energy. */
const oddIntegers = (id: FamilyId, order: number) => (2 / geometryOf(id, { order }).minimumDistance) ** 2

const factor = (order: number, published: string): Check => ({
  method: 'families', what: `${order}-QAM: mean energy of odd integers`, published, within: 1e-9, source: 'threeGppNr', compute: () => oddIntegers('qam', order),
})
const papr = (order: number, published: string): Check => ({
  method: 'model', what: `PAPR of ${order}-QAM, 3(√M−1)/(√M+1)`, unit: 'dB', published, source: 'commonPractice', compute: () => paprDb(generate('qam', { order })),
})
const cross = (order: number, published: string): Check => ({
  method: 'families', what: `cross set of ${order}: mean energy of odd integers`, published, within: 1e-9, source: 'smith', memory: true, compute: () => oddIntegers('cross-qam', order),
})
const hexagonal = (order: number, published: string): Check => ({
  method: 'families', what: `${order} hexagonal points: mean energy at d_min = 1`, published, source: 'grahamSloane', place: 'second moments; these by search',
  compute: () => energyAtUnitDistance('hexagonal', order),
})
const pam = (order: number): Check => ({
  method: 'families', what: `${order}-PAM: mean energy (M² − 1)/3 of odd integers`, published: () => (order * order - 1) / 3, source: 'proakis', compute: () => oddIntegers('pam', order),
})

/** Normal variables on a grid, as symbols of one or two dimensions. */
function gaussianSymbols(dimensions: 1 | 2) {
  const deviation = 4
  const axis = Array.from({ length: 41 }, (_, i) => i - 20)
  const weight = (x: number) => Math.exp(-x * x / (2 * deviation * deviation))
  const total = axis.reduce((sum, x) => sum + weight(x), 0)
  if (dimensions === 1) return createConstellation(axis.map(x => [x]), { probabilities: axis.map(x => weight(x) / total) })
  const pairs = axis.flatMap(x => axis.map(y => [x, y] as const))
  return createConstellation(pairs, { probabilities: pairs.map(([x, y]) => weight(x) * weight(y) / total ** 2) })
}
const backOff = (dimensions: 1 | 2) => shapedBackOffDb(gaussianSymbols(dimensions), { rollOff: 0, instants: 16384 }).backOffDb

/** What a normal law of the amplitudes saves against as many equally likely ones of the same entropy, dB. */
function shapingGain(): number {
  const amplitudes = Array.from({ length: 160 }, (_, i) => [i - 79.5])
  const deviation = 32 / Math.sqrt(2 * Math.PI * Math.E)
  const bell = amplitudes.map(([x]) => Math.exp(-x! * x! / (2 * deviation * deviation)))
  const total = bell.reduce((sum, p) => sum + p, 0)
  const shaped = createConstellation(amplitudes, { probabilities: bell.map(p => p / total) })
  return 10 * Math.log10(createConstellation(amplitudes.slice(64, 96)).meanEnergy / shaped.meanEnergy)
}

/** Energies, peaks, and the amplifier's back-off. */
export const energyChecks: readonly Check[] = [
  factor(4, '2'), factor(16, '10'), factor(64, '42'), factor(256, '170'),
  { method: 'families', what: 'BPSK: the two points are ±1, so apart', published: '2', within: 1e-12, source: 'ieee80211', compute: () => geometryOf('psk', { order: 2 }).minimumDistance },
  { method: 'families', what: '1024-QAM: K_MOD = 1/√', published: '682', within: 1e-9, source: 'ieee80211', memory: true, compute: () => oddIntegers('qam', 1024) },
  pam(4), pam(8),
  papr(16, '2.55'), papr(64, '3.68'), papr(256, '4.23'),
  cross(32, '20'), cross(128, '82'), cross(512, '330'),
  { method: 'model', what: 'PAPR of the cross set of 32, 34/20', unit: 'dB', published: '2.3045', source: 'smith', memory: true, compute: () => paprDb(generate('cross-qam', { order: 32 })) },
  {
    method: 'families', what: '16-APSK at γ = 2.85: R1² = 16/(4 + 12γ²)', published: () => 16 / (4 + 12 * 2.85 ** 2), source: 'etsi', place: '§5.4.3', memory: true,
    compute: () => {
      const { points } = generate('apsk', { rings: [4, 12], ratios: [2.85] })
      return points[0]! ** 2 + points[1]! ** 2
    },
  },
  {
    method: 'model', what: 'PAPR of 32-APSK of rate 4/5, 32γ2²/(4 + 12γ1² + 16γ2²)', unit: 'dB', published: () => 10 * Math.log10(32 * 4.87 ** 2 / (4 + 12 * 2.72 ** 2 + 16 * 4.87 ** 2)),
    source: 'etsi', place: '§5.4.4', memory: true, compute: () => paprDb(generate('apsk', { rings: [4, 12, 16], ratios: [2.72, 4.87] })),
  },
  hexagonal(4, '0.5'), hexagonal(8, '1.078125'), hexagonal(16, '2.1875'), hexagonal(32, '4.39746'), hexagonal(64, '8.8125'),
  {
    method: 'families', what: '7 hexagonal points: six around one, 6/7', published: () => 6 / 7, source: 'grahamSloane', compute: () => energyAtUnitDistance('hexagonal', 7),
  },
  {
    method: 'families', what: '4096-QAM: continuous approximation M/6', published: () => 4096 / 6, within: { relative: 3e-4 }, source: 'forneyWei', compute: () => energyAtUnitDistance('qam', 4096),
  },
  { method: 'shaping', what: 'ultimate shaping gain πe/6', unit: 'dB', published: '1.53', source: 'forneyWei', compute: shapingGain },
  {
    method: 'backOff', what: 'Gaussian symbols on a carrier exceed ln 1000 with 1e−3', unit: 'dB', published: () => 10 * Math.log10(Math.log(1000)), within: 0.06,
    source: 'rice', compute: () => backOff(2),
  },
  {
    method: 'backOff', what: 'a real Gaussian signal exceeds 3.2905 deviations with 1e−3', unit: 'dB', published: () => 20 * Math.log10(qInverse(0.0005)), within: 0.06,
    source: 'abramowitzStegun', place: 'table 26.5', compute: () => backOff(1),
  },
]
