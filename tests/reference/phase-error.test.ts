import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { analyse, berWithPhaseError, createConstellation, familyLabels, generate, q, serMap, serPhaseErrorFloor, serWithPhaseError } from '../../shared/modulation'

/** Made with SciPy and mpmath by ways of their own: data/make-phase-error.py. */
interface Table {
  psk: { order: number, esN0: number, degrees: number, ser: number }[]
  qam: { side: number, esN0: number, degrees: number, ser: number }[]
  qpskBits: { esN0: number, degrees: number, ber: number }[]
  mapPair: { d: number, p: number, n0: number, ser: number }[]
  mapGrid: { levels: number[], probabilities: number[], rates: { n0: number, ser: number }[] }
}
const table = JSON.parse(readFileSync(new URL('data/scipy-phase-error.json', import.meta.url), 'utf8')) as Table

const relative = (value: number, wanted: number) => Math.abs(value / wanted - 1)
const radians = (degrees: number) => degrees * Math.PI / 180

describe('SER under a carrier phase error, by Owen\'s T', () => {
  it.each(table.psk)('of $order-PSK at Es/N0 = $esN0 and $degrees°', ({ order, esN0, degrees, ser }) => {
    expect(relative(serWithPhaseError(analyse(generate('psk', { order })), 1 / esN0, radians(degrees)), ser)).toBeLessThan(1e-7)
  })
  it.each(table.qam)('of QAM of side $side at Es/N0 = $esN0 and $degrees°', ({ side, esN0, degrees, ser }) => {
    expect(relative(serWithPhaseError(analyse(generate('qam', { order: side * side })), 1 / esN0, radians(degrees)), ser)).toBeLessThan(1e-7)
  })
})

describe('BER under a carrier phase error', () => {
  const qpsk = analyse({ ...generate('psk', { order: 4 }), labels: familyLabels('psk', { order: 4 }) })
  it.each(table.qpskBits)('of Gray QPSK at Es/N0 = $esN0 and $degrees°', ({ esN0, degrees, ber }) => {
    expect(relative(berWithPhaseError(qpsk, 1 / esN0, radians(degrees)), ber)).toBeLessThan(1e-7)
  })
})

// Methods §6; a point of M-PSK leaves its sector without noise where the phase error exceeds π/M
describe('the floor that a phase error leaves to PSK', () => {
  it.each([[2, 20], [4, 10], [8, 4], [16, 3]])('of %d points at %d° is 2·Q(π/(M·σ)), but for whole turns', (order, degrees) => {
    const floor = serPhaseErrorFloor(analyse(generate('psk', { order })), radians(degrees))
    expect(relative(floor, 2 * q(Math.PI / order / radians(degrees)))).toBeLessThan(1e-11)
  })
})

describe('SER of MAP decisions, of 40 digits', () => {
  it.each(table.mapPair)('of two points $d apart with probability $p at N0 = $n0', ({ d, p, n0, ser }) => {
    const pair = createConstellation([[0.25, 0.5], [0.25 + d, 0.5]], { probabilities: [p, 1 - p] })
    expect(relative(serMap(pair, n0), ser)).toBeLessThan(1e-9)
  })
  const { levels, probabilities, rates } = table.mapGrid
  const grid = createConstellation(levels.flatMap(x => levels.map(y => [x, y])), { probabilities: probabilities.flatMap(p => probabilities.map(w => p * w)) })
  it.each(rates)('of a grid of two lines at N0 = $n0, where cells vanish at the end', ({ n0, ser }) => {
    expect(relative(serMap(grid, n0), ser)).toBeLessThan(1e-9)
  })
})
