import { createConstellation, frameErrorRate, fromDecibels, q, serFading, serMap } from '../../modulation'
import type { Channel, FamilyId } from '../../modulation'
import type { Check } from './check'
import { geometryOf, n0At, simpson } from './tools'

const rayleigh: Channel = { kind: 'rayleigh', branches: 1 }

/** Two antipodal points of unequal probabilities: closed form with the threshold moved by N0/(4·√Es)·ln(p/(1 − p)). */
const unequal = (p: number, db: number): Check => ({
  method: 'mapDecisions', what: `antipodal points sent with ${p} and ${Number((1 - p).toFixed(3))} at ${db} dB`, source: 'proakis', within: { relative: 1e-9 },
  published: () => {
    const n0 = n0At(db)
    const shift = n0 / 4 * Math.log(p / (1 - p))
    return p * q((1 + shift) / Math.sqrt(n0 / 2)) + (1 - p) * q((1 - shift) / Math.sqrt(n0 / 2))
  },
  compute: () => serMap(createConstellation([[1, 0], [-1, 0]], { probabilities: [p, 1 - p] }), n0At(db)),
})

const faded = (what: string, id: FamilyId, order: number, db: number, channel: Channel, published: (snr: number) => number, source: Check['source']): Check => ({
  method: 'fading', what: `${what} at ${db} dB a branch`, source, within: { relative: 1e-8 },
  published: () => published(fromDecibels(db)), compute: () => serFading(geometryOf(id, { order }), 'serExact', n0At(db), channel),
})

/** Binary PSK with combining of l like Rayleigh branches. */
function combined(l: number, snr: number): number {
  const mu = Math.sqrt(snr / (1 + snr))
  let [sum, term] = [0, 1]
  for (let k = 0; k < l; k++) {
    sum += term
    term *= (l + k) / (k + 1) * (1 + mu) / 2
  }
  return ((1 - mu) / 2) ** l * sum
}

function pskOverRayleigh(order: number, snr: number): number {
  const g = Math.sin(Math.PI / order) ** 2 * snr
  const root = Math.sqrt(g / (1 + g))
  return (order - 1) / order * (1 - root * order / ((order - 1) * Math.PI) * (Math.PI / 2 + Math.atan(root / Math.tan(Math.PI / order))))
}

function qamOverRayleigh(order: number, snr: number): number {
  const share = 1 - 1 / Math.sqrt(order)
  const root = Math.sqrt(1.5 * snr / (order - 1 + 1.5 * snr))
  return 2 * share * (1 - root) - share ** 2 * (1 - root * 4 / Math.PI * Math.atan(1 / root))
}

const ricianBinary = (k: number) => (snr: number) => simpson((theta) => {
  const s = theta === 0 ? Infinity : 1 / Math.sin(theta) ** 2
  return theta === 0 ? 0 : (1 + k) / (1 + k + s * snr) * Math.exp(-k * s * snr / (1 + k + s * snr))
}, 0, Math.PI / 2, 2000) / Math.PI

/** Fading, unequal probabilities, frames. */
export const channelChecks: readonly Check[] = [
  unequal(0.9, 5), unequal(0.7, 10), unequal(0.9, -5),
  {
    method: 'mapDecisions', what: 'hardly any signal: the most likely of 0.5, 0.3, 0.2 is always chosen', published: '0.5', within: 1e-6, source: 'commonPractice',
    compute: () => serMap(createConstellation([[1, 0], [-1, 0], [0, 1]], { probabilities: [0.5, 0.3, 0.2] }), 1e4),
  },
  faded('binary PSK over Rayleigh fading: ½(1 − √(γ/(1 + γ)))', 'psk', 2, 10, rayleigh, snr => 0.5 * (1 - Math.sqrt(snr / (1 + snr))), 'proakis'),
  faded('the same', 'psk', 2, 40, rayleigh, snr => 0.5 * (1 - Math.sqrt(snr / (1 + snr))), 'simonAlouini'),
  faded('binary PSK, two Rayleigh branches', 'psk', 2, 12, { kind: 'rayleigh', branches: 2 }, snr => combined(2, snr), 'proakis'),
  faded('binary PSK, four Rayleigh branches', 'psk', 2, 8, { kind: 'rayleigh', branches: 4 }, snr => combined(4, snr), 'proakis'),
  faded('binary PSK, Nakagami m = 3: as three branches of a third each', 'psk', 2, 12, { kind: 'nakagami', branches: 1, m: 3 }, snr => combined(3, snr / 3), 'simonAlouini'),
  faded('8-PSK over Rayleigh fading', 'psk', 8, 20, rayleigh, snr => pskOverRayleigh(8, snr), 'simonAlouini'),
  faded('16-QAM over Rayleigh fading', 'qam', 16, 20, rayleigh, snr => qamOverRayleigh(16, snr), 'simonAlouini'),
  faded('64-QAM over Rayleigh fading', 'qam', 64, 30, rayleigh, snr => qamOverRayleigh(64, snr), 'simonAlouini'),
  faded('4-PAM over Rayleigh fading', 'pam', 4, 20, rayleigh, snr => 0.75 * (1 - Math.sqrt(3 * snr / (15 + 3 * snr))), 'simonAlouini'),
  faded('binary PSK over Rician fading, K = 5', 'psk', 2, 10, { kind: 'rician', branches: 1, kFactor: 5 }, ricianBinary(5), 'simonAlouini'),
  {
    method: 'frameError', what: '1000 symbols of 1e−3: 1 − 0.999¹⁰⁰⁰', published: () => 1 - 0.999 ** 1000, within: 1e-12, source: 'commonPractice', compute: () => frameErrorRate(1e-3, 1000),
  },
]
