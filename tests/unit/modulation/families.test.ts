import { describe, expect, it } from 'vitest'
import { analyse, apskPresets, families, familyOf, generate, minimumDistanceOf, paprDb } from '../../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../../shared/modulation'

/** Mean energy at minimum distance 1. */
function energyAtUnitDistance(id: FamilyId, order: number): number {
  const c = generate(id, { order })
  return c.meanEnergy / minimumDistanceOf(c) ** 2
}
const radius = (points: Float64Array, i: number) => Math.hypot(points[2 * i]!, points[2 * i + 1]!)

describe('families', () => {
  it('are listed in order', () => expect(families.map(({ id }) => id)).toEqual([
    'pam', 'psk', 'qam', 'cross-qam', 'apsk', 'hexagonal', 'orthogonal', 'biorthogonal', 'simplex', 'hypercube', 'lattice', 'product', 'custom',
  ]))
  it('are found by their identifier', () => expect(familyOf('cross-qam').title).toBe('Cross QAM'))
  it('refuse an unknown identifier', () => {
    expect(() => familyOf('spiral')).toThrow('The family is one of pam, psk, qam, cross-qam, apsk, hexagonal, orthogonal, biorthogonal, simplex, hypercube, lattice, product, custom.')
  })
  const members: [FamilyId, FamilyParameters, number, string][] = [
    ['pam', { order: 3 }, 3, '3-PAM'],
    ['psk', { order: 4 }, 4, 'QPSK'],
    ['psk', { order: 8 }, 8, '8-PSK'],
    ['qam', { order: 8 }, 8, '8-QAM'],
    ['cross-qam', { order: 32 }, 32, 'Cross 32-QAM'],
    ['cross-qam', { order: 128 }, 128, 'Cross 128-QAM'],
    ['cross-qam', { order: 512 }, 512, 'Cross 512-QAM'],
    ['apsk', { rings: [4, 12], ratios: [2.57] }, 16, '4+12-APSK 2.57'],
    ['apsk', { rings: [1, 7] }, 8, '1+7-APSK'],
    ['hexagonal', { order: 7 }, 7, 'Hexagonal 7'],
  ]
  it.each(members)('%s %o has its order', (id, parameters, order) => expect(generate(id, parameters).order).toBe(order))
  it.each(members)('%s %o has unit mean energy', (id, parameters) => expect(generate(id, parameters).meanEnergy).toBeCloseTo(1, 14))
  it.each(members)('%s %o has a short name', (id, parameters, _, name) => expect(familyOf(id).signature(parameters)).toBe(name))
  it('custom points are taken as given', () => expect([...generate('custom', { points: [[3], [5]] }).points]).toEqual([3, 5]))
})

describe('points of the families', () => {
  it('PAM is one-dimensional: odd integers', () => expect(familyOf('pam').points({ order: 4 })).toEqual([[-3], [-1], [1], [3]]))
  it('8-QAM is a grid of four columns and two rows', () => {
    expect(familyOf('qam').points({ order: 8 })).toEqual([[-3, -1], [-3, 1], [-1, -1], [-1, 1], [1, -1], [1, 1], [3, -1], [3, 1]])
  })
  it('cross 32 lacks the four corners', () => {
    const points = familyOf('cross-qam').points({ order: 32 })
    expect(points.filter(([x, y]) => Math.abs(x!) === 5 && Math.abs(y!) === 5)).toEqual([])
  })
  // 3GPP TS 38.211 §5.1: factors 1/√2, 1/√10, 1/√42, 1/√170
  it.each([[4, 2], [16, 10], [64, 42], [256, 170]])('%d-QAM at unit energy has points at odd multiples of 1/√%d', (order, factor) => {
    expect(minimumDistanceOf(generate('qam', { order }))).toBeCloseTo(2 / Math.sqrt(factor), 14)
  })
  // 10·log10(3(√M−1)/(√M+1))
  it.each([[16, 2.55], [64, 3.68], [256, 4.23]])('PAPR of %d-QAM is %d dB', (order, papr) => {
    expect(paprDb(generate('qam', { order }))).toBeCloseTo(papr, 2)
  })
  it('rings have the given ratio', () => {
    const { points } = generate('apsk', { rings: [4, 12], ratios: [2.57] })
    expect(radius(points, 4) / radius(points, 0)).toBeCloseTo(2.57, 14)
  })
  it('a ring starts at π/n unless told otherwise', () => {
    expect(familyOf('apsk').points({ rings: [4, 12], ratios: [3] })[0]).toEqual([Math.SQRT1_2, Math.SQRT1_2].map(x => expect.closeTo(x, 15)))
  })
  it('a ring starts at its phase', () => {
    expect(familyOf('apsk').points({ rings: [4], phases: [0.3] })[0]).toEqual([Math.cos(0.3), Math.sin(0.3)])
  })
  it('a first ring of one point is the origin, and the ratio refers to the next', () => {
    const { points } = generate('apsk', { rings: [1, 5, 10], ratios: [1.95] })
    expect([radius(points, 0), radius(points, 6) / radius(points, 1)]).toEqual([0, expect.closeTo(1.95, 14)])
  })
})

describe('hexagonal sets', () => {
  // Computed by search; compare Graham and Sloane, Discrete Comput. Geom. 5 (1990)
  it.each([[4, 0.5], [8, 1.078125], [16, 2.1875], [32, 4.39746], [64, 8.8125]])('of %d points have mean energy %d', (order, energy) => {
    expect(energyAtUnitDistance('hexagonal', order)).toBeCloseTo(energy, 5)
  })
  it('of 7 points are a hexagon and its centre', () => expect(energyAtUnitDistance('hexagonal', 7)).toBeCloseTo(6 / 7, 14))
  it.each([2, 3, 5, 19, 100, 1000, 4096])('of %d points have their mean at the origin', (order) => {
    const { points } = generate('hexagonal', { order })
    expect(Math.abs(points.reduce((sum, x, n) => sum + (n % 2 === 0 ? x : 0), 0))).toBeLessThan(1e-9)
  })
  it('never need more energy for fewer points', () => {
    const energies = Array.from({ length: 60 }, (_, n) => energyAtUnitDistance('hexagonal', n + 2))
    expect(energies).toEqual([...energies].sort((a, b) => a - b))
  })
})

describe('APSK presets', () => {
  // ETSI EN 302 307-1, tables 9 and 10
  it('list the ring ratios of 16-APSK', () => {
    expect(apskPresets.filter(({ rings }) => rings.length === 2).map(({ codeRate, ratios }) => [codeRate, ...ratios])).toEqual([
      ['2/3', 3.15], ['3/4', 2.85], ['4/5', 2.75], ['5/6', 2.7], ['8/9', 2.6], ['9/10', 2.57]])
  })
  it('list the ring ratios of 32-APSK', () => {
    expect(apskPresets.filter(({ rings }) => rings.length === 3).map(({ codeRate, ratios }) => [codeRate, ...ratios])).toEqual([
      ['3/4', 2.84, 5.27], ['4/5', 2.72, 4.87], ['5/6', 2.64, 4.64], ['8/9', 2.54, 4.33], ['9/10', 2.53, 4.3]])
  })
  it.each(apskPresets)('$title can be generated', preset => expect(analyse(generate('apsk', preset)).minimumDistance).toBeGreaterThan(0.3))
})

describe('refused parameters', () => {
  const cases: [string, FamilyId, FamilyParameters, string, (string | number)[]][] = [
    ['PAM of one point', 'pam', { order: 1 }, 'PAM has any whole number of points from 2 to 4096.', ['order']],
    ['PAM without an order', 'pam', {}, 'PAM has any whole number of points from 2 to 4096.', ['order']],
    ['PSK of 4097', 'psk', { order: 4097 }, 'PSK has any whole number of points from 2 to 4096.', ['order']],
    ['PSK of 4.5', 'psk', { order: 4.5 }, 'PSK has any whole number of points from 2 to 4096.', ['order']],
    ['QAM of 12', 'qam', { order: 12 }, 'QAM has a power of two of points from 4 to 4096.', ['order']],
    ['cross QAM of 64', 'cross-qam', { order: 64 }, 'Cross QAM has 32, 128 or 512 points.', ['order']],
    ['hexagonal NaN', 'hexagonal', { order: NaN }, 'Hexagonal has any whole number of points from 2 to 4096.', ['order']],
    ['APSK without rings', 'apsk', {}, 'Rings are the numbers of points on each, the innermost first, such as 4+12.', ['rings']],
    ['an empty first ring', 'apsk', { rings: [0, 4] }, 'The first ring has 1 (at the origin) to 4096 points.', ['rings', 0]],
    ['a second ring of one', 'apsk', { rings: [4, 1], ratios: [2] }, 'A further ring has 2 to 4096 points.', ['rings', 1]],
    ['one point in all', 'apsk', { rings: [1] }, 'APSK has rings of 1 or more points, 2 to 4096 points in all.', ['rings']],
    ['no ratio', 'apsk', { rings: [4, 12] }, 'These rings have 1 ratio: one for each ring outside the first of more than one point.', ['ratios']],
    ['a ratio too many', 'apsk', { rings: [1, 7], ratios: [2] }, 'These rings have no ratio: leave it empty.', ['ratios']],
    ['falling ratios', 'apsk', { rings: [4, 12, 16], ratios: [3, 2] }, 'Ring ratios are above 1, up to 1,000, and grow outwards.', ['ratios', 1]],
    ['too few phases', 'apsk', { rings: [4, 12], ratios: [3], phases: [0] }, 'Phases are as many as rings.', ['phases']],
    ['a phase of NaN', 'apsk', { rings: [4], phases: [NaN] }, 'A phase is a finite number of radians.', ['phases', 0]],
    ['custom without points', 'custom', {}, 'A constellation has 2 to 4096 points.', ['points']],
  ]
  it.each(cases)('%s: sentence and path', (_, id, parameters, message, path) => {
    expect(familyOf(id).validate(parameters)).toEqual([{ path, message }])
  })
  it('are thrown by generate', () => expect(() => generate('qam', { order: 12 })).toThrow('QAM has a power of two of points from 4 to 4096.'))
})
