import { describe, expect, it } from 'vitest'
import { analyse, apskPresets, asymptoticEfficiencyDb, createConstellation, generate, paprDb } from '../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../shared/modulation'

const geometryOf = (id: FamilyId, parameters: FamilyParameters) => analyse(generate(id, parameters))
/** Mean energy at d_min = 1. */
const energyAtUnitDistance = (id: FamilyId, order: number) => 1 / geometryOf(id, { order }).minimumDistance ** 2

// 3GPP TS 38.211 §5.1: QPSK, 16QAM, 64QAM and 256QAM are odd integers times 1/√2, 1/√10, 1/√42, 1/√170
describe('3GPP TS 38.211 §5.1', () => {
  it.each([{ order: 4, factor: 2 }, { order: 16, factor: 10 }, { order: 64, factor: 42 }, { order: 256, factor: 170 }])(
    '$order-QAM has the factor 1/√$factor',
    ({ order, factor }) => expect(geometryOf('qam', { order }).minimumDistance).toBeCloseTo(2 / Math.sqrt(factor), 13),
  )
})

// IEEE 802.11-2020 and 802.11ax, normalisation factor K_MOD: 1 for BPSK, 1/√682 for 1024-QAM (from memory)
describe('IEEE 802.11', () => {
  it('BPSK is ±1', () => expect(geometryOf('psk', { order: 2 }).minimumDistance).toBeCloseTo(2, 14))
  it('1024-QAM has K_MOD = 1/√682', () => expect(geometryOf('qam', { order: 1024 }).minimumDistance).toBeCloseTo(2 / Math.sqrt(682), 13))
})

// 10·log10(3(√M−1)/(√M+1)), common practice
describe('PAPR of square QAM', () => {
  it.each([{ order: 16, db: 2.55 }, { order: 64, db: 3.68 }, { order: 256, db: 4.23 }])(
    'is $db dB for $order points', ({ order, db }) => expect(paprDb(generate('qam', { order }))).toBeCloseTo(db, 2),
  )
})

// J. G. Smith, "Odd-bit quadrature amplitude-shift keying", IEEE Trans. Commun. 23 (1975) (from memory):
// cross sets of 32, 128, 512 odd-integer points have the mean energy (31·M/32 − 1)·2/3 = 20, 82, 330
describe('Smith 1975, cross sets', () => {
  it.each([{ order: 32, energy: 20 }, { order: 128, energy: 82 }, { order: 512, energy: 330 }])(
    '$order points have mean energy $energy at d_min = 2',
    ({ order, energy }) => expect(4 * energyAtUnitDistance('cross-qam', order)).toBeCloseTo(energy, 9),
  )
  it('cross 32 has a PAPR of 10·log10(34/20) = 2.30 dB', () => expect(paprDb(generate('cross-qam', { order: 32 }))).toBeCloseTo(2.3045, 4))
})

// ETSI EN 302 307-1, tables 9 and 10 (from memory): γ by code rate
describe('ETSI EN 302 307-1', () => {
  const ratiosOf = (rings: number) => Object.fromEntries(apskPresets.filter(preset => preset.rings.length === rings).map(preset => [preset.codeRate, preset.ratios]))
  it('16-APSK ring ratios by code rate', () => {
    expect(ratiosOf(2)).toEqual({ '2/3': [3.15], '3/4': [2.85], '4/5': [2.75], '5/6': [2.7], '8/9': [2.6], '9/10': [2.57] })
  })
  it('32-APSK ring ratios by code rate', () => {
    expect(ratiosOf(3)).toEqual({ '3/4': [2.84, 5.27], '4/5': [2.72, 4.87], '5/6': [2.64, 4.64], '8/9': [2.54, 4.33], '9/10': [2.53, 4.3] })
  })
  // §5.4.3 (from memory): 4·R1² + 12·R2² = 16 makes the mean energy 1
  it('16-APSK at γ = 2.85 has R1² = 16/(4 + 12·γ²)', () => {
    const { points } = generate('apsk', { rings: [4, 12], ratios: [2.85] })
    expect(points[0]! ** 2 + points[1]! ** 2).toBeCloseTo(16 / (4 + 12 * 2.85 ** 2), 13)
  })
  // §5.4.4 (from memory): 4·R1² + 12·R2² + 16·R3² = 32, here R3² for rate 4/5
  it('32-APSK of rate 4/5 has a PAPR of 10·log10(32·4.87²/(4 + 12·2.72² + 16·4.87²))', () => {
    expect(paprDb(generate('apsk', { rings: [4, 12, 16], ratios: [2.72, 4.87] }))).toBeCloseTo(2.0603, 4)
  })
})

// R. L. Graham and N. J. A. Sloane, "Penny-packing and two-dimensional codes", Discrete Comput. Geom. 5 (1990):
// least second moments of packings; for these orders the hexagonal sets computed by search
describe('Graham and Sloane 1990', () => {
  it.each([{ order: 4, energy: 0.5 }, { order: 8, energy: 1.078125 }, { order: 16, energy: 2.1875 }, { order: 32, energy: 4.39746 }, { order: 64, energy: 8.8125 }])(
    '$order points have mean energy $energy at d_min = 1',
    ({ order, energy }) => expect(energyAtUnitDistance('hexagonal', order)).toBeCloseTo(energy, 5),
  )
  // seven pennies: six around one, Σ|s|² = 6·1
  it('7 points have mean energy 6/7', () => expect(energyAtUnitDistance('hexagonal', 7)).toBeCloseTo(6 / 7, 12))
})

// J. H. Conway and N. J. A. Sloane, Sphere Packings, Lattices and Groups: A2 has kissing number 6 and coding gain 0.62 dB
describe('Conway and Sloane', () => {
  it('a point inside a hexagonal set has 6 nearest neighbours', () => expect(Math.max(...geometryOf('hexagonal', { order: 64 }).nearestCounts)).toBe(6))
  it('a point inside a square set has 4', () => expect(Math.max(...geometryOf('qam', { order: 64 }).nearestCounts)).toBe(4))
  // nominal coding gain d²/V = 2/√3: the area of a cell is √3/2·d²; with a circular boundary's π/3 (0.20 dB) on top (Forney and Wei)
  it('1024 hexagonal points gain 0.62 + 0.20 dB on square QAM', () => {
    expect(10 * Math.log10(energyAtUnitDistance('qam', 1024) / energyAtUnitDistance('hexagonal', 1024))).toBeCloseTo(0.8245, 2)
  })
})

// G. D. Forney and L.-F. Wei, "Multidimensional constellations, part I", IEEE J. Sel. Areas Commun. 7 (1989)
describe('Forney and Wei 1989', () => {
  it('shaping can gain up to πe/6 = 1.53 dB', () => {
    const amplitudes = Array.from({ length: 160 }, (_, i) => [i - 79.5])
    const deviation = 32 / Math.sqrt(2 * Math.PI * Math.E)
    const bell = amplitudes.map(([x]) => Math.exp(-x! * x! / (2 * deviation * deviation)))
    const total = bell.reduce((sum, p) => sum + p, 0)
    const shaped = createConstellation(amplitudes, { probabilities: bell.map(p => p / total) })
    expect(shaped.entropy).toBeCloseTo(5, 9)
    expect(10 * Math.log10(createConstellation(amplitudes.slice(64, 96)).meanEnergy / shaped.meanEnergy)).toBeCloseTo(1.53, 2)
  })
  // continuous approximation: a square of side L has the energy L²/6, so M-QAM has nearly M/6 at d_min = 1
  it('4096-QAM has mean energy M/6 at d_min = 1 within 0.03 %', () => {
    expect(energyAtUnitDistance('qam', 4096) / (4096 / 6)).toBeCloseTo(1, 3)
  })
})

// L. Euler; M. de Berg et al., Computational Geometry, theorem 7.3: a Voronoi diagram of n points has at most 3n − 6 edges
describe('Euler\'s relation', () => {
  it('a point has fewer than 6 relevant neighbours on average', () => {
    expect(geometryOf('hexagonal', { order: 256 }).relevantMean).toBeLessThanOrEqual(2 * (3 * 256 - 6) / 256)
  })
  it('a square grid has exactly 4 − 4/√M', () => expect(geometryOf('qam', { order: 256 }).relevantMean).toBe(3.75))
})

// Asymptotic power efficiency of common formats (E. Agrell and M. Karlsson, J. Lightwave Technol. 27 (2009), from memory)
describe('Agrell and Karlsson 2009', () => {
  const efficiency = (id: FamilyId, order: number) => {
    const geometry = geometryOf(id, { order })
    return asymptoticEfficiencyDb(geometry.constellation, geometry.minimumDistance)
  }
  it('BPSK has 0 dB', () => expect(efficiency('psk', 2)).toBeCloseTo(0, 12))
  it('QPSK has 0 dB', () => expect(efficiency('psk', 4)).toBeCloseTo(0, 12))
  it('three points of PSK have 0.75 dB', () => expect(efficiency('psk', 3)).toBeCloseTo(0.75, 2))
  it('8-PSK has −3.57 dB', () => expect(efficiency('psk', 8)).toBeCloseTo(-3.57, 2))
  it('16-QAM has −3.98 dB', () => expect(efficiency('qam', 16)).toBeCloseTo(-3.98, 2))
})
