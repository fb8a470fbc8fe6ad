import { describe, expect, it } from 'vitest'
import { createConstellation, scaled } from '../../../shared/modulation/constellation'
import { generate } from '../../../shared/modulation/families'
import { shapedBackOffDb } from '../../../shared/modulation/waveform'

const apsk = (rings: number[], ratios: number[]) => generate('apsk', { rings, ratios })
const qam16 = generate('qam', { order: 16 })
const psk8 = generate('psk', { order: 8 })
const shaped = { rollOff: 0.25 }

/** Rows of the demonstration: back-off stated for them, and that of a plain simulation of 8.4 million symbols in NumPy (± 0.002 dB). */
const rows = [
  { name: '5+11 at 2.2', constellation: apsk([5, 11], [2.2]), stated: 4.89, long: 4.889 },
  { name: 'hexagonal 16', constellation: generate('hexagonal', { order: 16 }), stated: 5.31, long: 5.312 },
  { name: '1+5+10 at 1.95', constellation: apsk([1, 5, 10], [1.95]), stated: 5.06, long: 5.060 },
  { name: '4+12 at 2.57', constellation: apsk([4, 12], [2.57]), stated: 4.77, long: 4.775 },
  { name: '16-QAM', constellation: qam16, stated: 5.47, long: 5.482 },
  { name: '4+12 at 3.15', constellation: apsk([4, 12], [3.15]), stated: 4.83, long: 4.835 },
  { name: '16-PSK', constellation: generate('psk', { order: 16 }), stated: 4.04, long: 4.043 },
  { name: 'cross 32', constellation: generate('cross-qam', { order: 32 }), stated: 5.29, long: 5.282 },
  { name: '8-PSK', constellation: psk8, stated: 4.03, long: 4.040 },
]

describe('back-off of the demonstration\'s rows', () => {
  it.each(rows)('$name needs the stated $stated dB within 0.05', ({ constellation, stated }) => {
    expect(Math.abs(shapedBackOffDb(constellation, shaped).backOffDb - stated)).toBeLessThan(0.05)
  })
  it.each(rows)('$name agrees with the long simulation\'s $long dB within three standard errors', ({ constellation, long }) => {
    const { backOffDb, standardErrorDb } = shapedBackOffDb(constellation, shaped)
    expect(Math.abs(backOffDb - long)).toBeLessThan(3 * standardErrorDb + 0.006)
  })
  it.each(rows)('$name has a standard error below 0.02 dB', ({ constellation }) => {
    expect(shapedBackOffDb(constellation, shaped).standardErrorDb).toBeLessThan(0.02)
  })
})

describe('back-off elsewhere, against plain simulations of 1.6 to 2.6 million symbols in NumPy', () => {
  const binary = createConstellation([[-1], [1]])
  const pam4 = generate('pam', { order: 4 })
  const offset = createConstellation([[0, 0], [1, 0], [2, 1]])
  const grid = [-3, -1, 1, 3].flatMap(x => [-3, -1, 1, 3].map(y => [x, y]))
  const boltzmann = grid.map(([x, y]) => Math.exp(-0.08 * (x! * x! + y! * y!)))
  const total = boltzmann.reduce((sum, p) => sum + p, 0)
  const bell = createConstellation(grid, { probabilities: boltzmann.map(p => p / total) })
  it.each([
    { name: 'binary real signal', constellation: binary, options: shaped, value: 4.823 },
    { name: '4-PAM', constellation: pam4, options: shaped, value: 6.661 },
    { name: '4-PAM at exceedance 0.1', constellation: pam4, options: { rollOff: 0.25, exceedance: 0.1 }, value: 3.844 },
    { name: 'QPSK', constellation: generate('qam', { order: 4 }), options: shaped, value: 4.269 },
    { name: '16-QAM at exceedance 1e-4', constellation: qam16, options: { rollOff: 0.25, exceedance: 1e-4 }, value: 6.180 },
    { name: '16-QAM at exceedance 0.01', constellation: qam16, options: { rollOff: 0.25, exceedance: 0.01 }, value: 4.456 },
    { name: '16-QAM at roll-off 1', constellation: qam16, options: { rollOff: 1 }, value: 5.409 },
    { name: '16-QAM at roll-off 0.05', constellation: qam16, options: { rollOff: 0.05 }, value: 6.296 },
    { name: '8-PSK at roll-off 0.05', constellation: psk8, options: { rollOff: 0.05 }, value: 5.412 },
    { name: '16 points of unequal probabilities', constellation: bell, options: shaped, value: 6.042 },
    { name: 'three points with an offset', constellation: offset, options: shaped, value: 6.351 },
  ])('$name: $value dB', ({ constellation, options, value }) => {
    expect(Math.abs(shapedBackOffDb(constellation, options).backOffDb - value)).toBeLessThan(0.06)
  })
})

describe('the simulation', () => {
  it('repeats to the last bit', () => expect(shapedBackOffDb(qam16, shaped)).toEqual(shapedBackOffDb(qam16, shaped)))
  it('depends on the seed', () => {
    expect(shapedBackOffDb(qam16, { ...shaped, seed: 2 }).backOffDb).not.toBe(shapedBackOffDb(qam16, shaped).backOffDb)
  })
  it('does not depend on the scale of the points', () => {
    expect(shapedBackOffDb(scaled(qam16, 7), shaped).backOffDb).toBeCloseTo(shapedBackOffDb(qam16, shaped).backOffDb, 6)
  })
  it('scatters over seeds by no more than its standard error says', () => {
    const runs = Array.from({ length: 30 }, (_, i) => shapedBackOffDb(psk8, { ...shaped, seed: i + 1 }))
    const mean = runs.reduce((sum, run) => sum + run.backOffDb, 0) / 30
    const scatter = Math.sqrt(runs.reduce((sum, run) => sum + (run.backOffDb - mean) ** 2, 0) / 29)
    expect(scatter / runs[0]!.standardErrorDb).toBeLessThan(1.4)
  })
  it('halves its standard error with four times the instants', () => {
    const ratio = shapedBackOffDb(qam16, { ...shaped, instants: 16384 }).standardErrorDb / shapedBackOffDb(qam16, shaped).standardErrorDb
    expect(ratio).toBeGreaterThan(0.4)
    expect(ratio).toBeLessThan(0.6)
  })
  it('has a finite standard error for three points far from the origin', () => {
    const far = createConstellation([[10, 0], [10, 1], [11, 0]])
    expect(shapedBackOffDb(far, { rollOff: 0.25, exceedance: 1e-4 }).standardErrorDb).toBeLessThan(0.01)
  })
  it('admits to a large standard error where a single rare point makes the peaks', () => {
    const rare = createConstellation([[0, 0], [1, 0], [0, 50]], { probabilities: [0.5, 0.4999, 0.0001] })
    expect(shapedBackOffDb(rare, { rollOff: 0.25, exceedance: 1e-4 }).standardErrorDb).toBeGreaterThan(0.3)
  })
  it('refuses three dimensions', () => {
    expect(() => shapedBackOffDb(createConstellation([[1, 0, 0], [0, 1, 0]]), shaped)).toThrow('1 or 2 dimensions')
  })
  it('refuses a roll-off above 1', () => expect(() => shapedBackOffDb(qam16, { rollOff: 1.1 })).toThrow('from 0 to 1'))
  it('refuses an exceedance of 0', () => expect(() => shapedBackOffDb(qam16, { ...shaped, exceedance: 0 })).toThrow('exceedance'))
})
