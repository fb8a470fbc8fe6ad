import { analyse, createConstellation, ebN0Db, fromDecibels, q, serExact, serNearest, serUnionBound } from '../../modulation'
import type { Check } from './check'
import { geometryOf, n0At, requiredDb, simpson } from './tools'

const squareQam = (order: number, db: number): Check => ({
  method: 'exactSer', what: `${order}-QAM at ${db} dB: 1 − (1 − p)²`, source: 'proakis', within: { relative: 1e-10 },
  published: () => {
    const p = 2 * (1 - 1 / Math.sqrt(order)) * q(Math.sqrt(3 * fromDecibels(db) / (order - 1)))
    return 2 * p - p * p
  },
  compute: () => serExact(geometryOf('qam', { order }), n0At(db)),
})
const pam = (order: number, db: number): Check => ({
  method: 'exactSer', what: `${order}-PAM at ${db} dB: 2(M−1)/M·Q(√(6·Es/((M²−1)·N0)))`, source: 'simonAlouini', place: '§8.1', within: { relative: 1e-12 },
  published: () => 2 * (order - 1) / order * q(Math.sqrt(6 * fromDecibels(db) / (order * order - 1))),
  compute: () => serExact(geometryOf('pam', { order }), n0At(db)),
})
const psk = (order: number, db: number): Check => ({
  method: 'exactSer', what: `${order}-PSK at ${db} dB: (1/π)∫ exp(−(Es/N0)·sin²(π/M)/sin²θ) dθ`, source: db < 20 ? 'craig' : 'pawulaRiceRoberts',
  published: () => simpson(theta => theta === 0 ? 0 : Math.exp(-fromDecibels(db) * (Math.sin(Math.PI / order) / Math.sin(theta)) ** 2), 0, Math.PI * (order - 1) / order) / Math.PI,
  compute: () => serExact(geometryOf('psk', { order }), n0At(db)),
})
const twoBinary = (db: number) => {
  const p = q(Math.sqrt(2 * fromDecibels(ebN0Db(db, 2))))
  return 2 * p - p * p
}

/** Symbol error rates and the SNR that they ask for. */
export const symbolErrorChecks: readonly Check[] = [
  squareQam(4, 10), squareQam(16, 17), squareQam(64, 26), squareQam(256, 30), squareQam(1024, 20),
  pam(2, 8), pam(4, 14), pam(8, 22), pam(5, 15),
  psk(3, 6), psk(8, 14), psk(8, 0), psk(16, 22), psk(32, 30),
  {
    method: 'exactSer', what: 'QPSK at 12 dB as two binary channels', published: () => twoBinary(12), within: { relative: 1e-11 }, source: 'commonPractice',
    compute: () => serExact(geometryOf('qam', { order: 4 }), n0At(12)),
  },
  {
    method: 'exactSer', what: 'the same turned by 53.13°', published: () => twoBinary(12), within: { relative: 1e-11 }, source: 'commonPractice',
    compute: () => serExact(analyse(createConstellation([[0.6, 0.8], [-0.8, 0.6], [-0.6, -0.8], [0.8, -0.6]])), n0At(12)),
  },
  {
    method: 'unionBound', what: '16-PSK at 20 dB: 2·Q(√(2·Es/N0)·sin(π/M))', published: () => 2 * q(Math.sqrt(200) * Math.sin(Math.PI / 16)), within: { relative: 1e-12 }, source: 'proakis',
    compute: () => serUnionBound(geometryOf('psk', { order: 16 }), 0.01),
  },
  {
    method: 'unionBound', what: '16-QAM near 1e−6: bound over exact', published: '1', within: 1e-3, source: 'commonPractice',
    compute: () => serUnionBound(geometryOf('qam', { order: 16 }), n0At(20.92)) / serExact(geometryOf('qam', { order: 16 }), n0At(20.92)),
  },
  {
    method: 'nearestNeighbour', what: '8-PSK at 13 dB: the same as the bound', published: () => serUnionBound(geometryOf('psk', { order: 8 }), 0.05), within: { relative: 1e-12 }, source: 'commonPractice',
    compute: () => serNearest(geometryOf('psk', { order: 8 }), 0.05),
  },
  { method: 'requiredSnr', what: 'binary PSK, 1e−5', unit: 'dB', published: '9.6', source: 'proakis', memory: true, compute: () => requiredDb('psk', { order: 2 }, 1e-5) },
  { method: 'requiredSnr', what: 'binary PSK, 1e−6', unit: 'dB', published: '10.5', source: 'proakis', memory: true, compute: () => requiredDb('psk', { order: 2 }, 1e-6) },
  { method: 'requiredSnr', what: 'uncoded 4-PSK, 1e−5', unit: 'dB', published: '12.9', source: 'ungerboeck', compute: () => requiredDb('psk', { order: 4 }, 1e-5) },
  {
    method: 'requiredSnr', what: 'sixteen points of a triangular lattice over 16-QAM, 1e−6', unit: 'dB', published: '0.5', source: 'foschini', memory: true,
    compute: () => requiredDb('qam', { order: 16 }, 1e-6) - requiredDb('hexagonal', { order: 16 }, 1e-6),
  },
  {
    method: 'requiredSnr', what: 'large square QAM, 1e−5: normalised SNR', unit: 'dB', published: '8.4', source: 'forneyUngerboeck', memory: true,
    compute: () => requiredDb('qam', { order: 4096 }, 1e-5, 'serNearest') - 10 * Math.log10(4096 - 1),
  },
]
