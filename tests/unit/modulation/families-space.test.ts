import { describe, expect, it } from 'vitest'
import { familyLabels, familyOf, generate, minimumDistanceOf } from '../../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../../shared/modulation'

const product: FamilyParameters = { factors: [{ family: 'pam', order: 4 }, { family: 'psk', order: 4 }] }

describe('families of more dimensions', () => {
  const members: [FamilyId, FamilyParameters, number, number, string][] = [
    ['orthogonal', { order: 4 }, 4, 4, 'Orthogonal 4'],
    ['biorthogonal', { order: 8 }, 8, 4, 'Biorthogonal 8'],
    ['simplex', { order: 9 }, 9, 8, 'Simplex 9'],
    ['hypercube', { order: 256 }, 256, 8, 'Hypercube 256'],
    ['lattice', { order: 24, lattice: 'D4' }, 24, 4, '24-D4'],
    ['lattice', { order: 4096, lattice: 'E8', offset: [0.5, 0, 0, 0, 0, 0, 0, 0.25] }, 4096, 8, '4096-E8 about 0.5, 0, 0, 0, 0, 0, 0, 0.25'],
    ['product', product, 16, 3, '4-PAM × QPSK'],
  ]
  it.each(members)('%s %o has its order', (id, parameters, order) => expect(generate(id, parameters).order).toBe(order))
  it.each(members)('%s %o has its dimensions', (id, parameters, _, dimensions) => expect(generate(id, parameters).dimensions).toBe(dimensions))
  it.each(members)('%s %o has unit mean energy', (id, parameters) => expect(generate(id, parameters).meanEnergy).toBeCloseTo(1, 13))
  it.each(members)('%s %o has a short name', (id, parameters, _, __, name) => expect(familyOf(id).signature(parameters)).toBe(name))

  it('simplex signals have the distances of orthogonal ones before scaling', () => {
    expect(minimumDistanceOf({ ...generate('simplex', { order: 5 }), points: Float64Array.from(familyOf('simplex').points({ order: 5 }).flat()) })).toBeCloseTo(Math.SQRT2, 14)
  })
  // Proakis: simplex signals need 10·log10(M/(M−1)) dB less than orthogonal ones.
  it('simplex signals at unit energy are √(M/(M−1)) as far apart as orthogonal ones', () => {
    expect(minimumDistanceOf(generate('simplex', { order: 4 })) / minimumDistanceOf(generate('orthogonal', { order: 4 }))).toBeCloseTo(Math.sqrt(4 / 3), 14)
  })
  it('opposite biorthogonal signals stand at opposite ends of the list', () => {
    expect(familyOf('biorthogonal').points({ order: 4 })).toEqual([[1, 0], [0, 1], [0, -1], [-1, 0]])
  })
})

describe('lattice cuts', () => {
  const squares = (parameters: FamilyParameters) => familyOf('lattice').points(parameters).map(p => Math.round(p.reduce((sum, x) => sum + x * x, 0) * 1000) / 1000)
  const shell = (parameters: FamilyParameters, square: number) => squares(parameters).filter(s => s === square).length
  // Theta series, Conway and Sloane, SPLAG chapter 4: A2 1 + 6q + 6q³ + 6q⁴ + 12q⁷; D4 1 + 24q + 24q² + 96q³; E8 1 + 240q + 2160q² (in d_min²)
  it.each<[FamilyParameters, number, number]>([
    [{ lattice: 'A2', order: 50 }, 1, 6], [{ lattice: 'A2', order: 50 }, 3, 6], [{ lattice: 'A2', order: 50 }, 7, 12],
    [{ lattice: 'D4', order: 200 }, 1, 24], [{ lattice: 'D4', order: 200 }, 2, 24], [{ lattice: 'D4', order: 200 }, 3, 96],
    [{ lattice: 'E8', order: 2500 }, 1, 240], [{ lattice: 'E8', order: 2500 }, 2, 2160],
  ])('%o has at squared distance %d the shell of %d points', (parameters, square, count) => expect(shell(parameters, square)).toBe(count))
  it('equal distances go by falling coordinates', () => {
    expect(familyOf('lattice').points({ lattice: 'D4', order: 4 }).map(p => p.map(x => Math.round(x * Math.SQRT2)))).toEqual([[0, 0, 0, 0], [1, 1, 0, 0], [1, 0, 1, 0], [1, 0, 0, 1]])
  })
  it('the offset becomes the origin', () => {
    expect(familyOf('lattice').points({ lattice: 'A2', order: 2, offset: [0.5, 0] })).toEqual([[0.5, 0], [-0.5, 0]])
  })
  it('about a deep hole of D4 the eight points of a cross polytope come first', () => {
    expect(squares({ lattice: 'D4', order: 9, offset: [Math.SQRT1_2, 0, 0, 0] })).toEqual([...Array.from({ length: 8 }, () => 0.5), 1.5])
  })
})

describe('Cartesian products', () => {
  it('bring their factors to the same minimum distance', () => {
    const { points } = generate('product', product)
    const [betweenLevels, betweenPhases] = [Math.abs(points[0]! - points[12]!), Math.hypot(points[1]! - points[4]!, points[2]! - points[5]!)]
    expect(betweenLevels / betweenPhases).toBeCloseTo(1, 13)
  })
  it('of PAM of two points are a hypercube', () => {
    const pair = { family: 'pam', order: 2 } as const
    expect(generate('product', { factors: [pair, pair, pair] }).points).toEqual(generate('hypercube', { order: 8 }).points)
  })
  it('have the factors\' labels one behind the other', () => {
    expect(familyLabels('product', { factors: [{ family: 'pam', order: 2 }, { family: 'pam', order: 4 }] }))
      .toEqual(['0', '1'].flatMap(first => familyLabels('pam', { order: 4 })!.map(word => first + word)))
  })
  it('have no labels where a factor has none', () => {
    expect(familyLabels('product', { factors: [{ family: 'pam', order: 2 }, { family: 'psk', order: 3 }] })).toBeNull()
  })
})

describe('refusals', () => {
  const pam = (order: number) => ({ family: 'pam', order }) as const
  const refusals: [FamilyId, FamilyParameters, (string | number)[], string][] = [
    ['orthogonal', { order: 9 }, ['order'], 'Orthogonal signals are 2 to 8, one for each dimension.'],
    ['biorthogonal', { order: 7 }, ['order'], 'Biorthogonal signals are an even number from 2 to 16, two for each dimension.'],
    ['simplex', { order: 10 }, ['order'], 'Simplex signals are 2 to 9, one more than dimensions.'],
    ['hypercube', { order: 12 }, ['order'], 'A hypercube has 2, 4, 8, 16, 32, 64, 128 or 256 points: two for each dimension, multiplied.'],
    ['lattice', { order: 16 }, ['lattice'], 'The lattice is A2, D4 or E8.'],
    ['lattice', { order: 16, lattice: 'D4', offset: [1, 2] }, ['offset'], 'An offset of D4 has 4 coordinates.'],
    ['lattice', { order: 16, lattice: 'A2', offset: [0, 101] }, ['offset', 1], 'A coordinate of the offset is from −100 to 100 minimum distances.'],
    ['product', { factors: [pam(4)] }, ['factors'], 'A product has 2 to 8 factors, up to 4096 points and up to 8 dimensions in all.'],
    ['product', { factors: [pam(4), pam(1)] }, ['factors', 1, 'order'], 'PAM has any whole number of points from 2 to 4096.'],
    ['product', { factors: [pam(128), pam(64)] }, ['factors'], 'The factors of a product have up to 4096 points, multiplied.'],
    ['product', { factors: [{ family: 'orthogonal', order: 8 }, pam(2)] }, ['factors'], 'The factors of a product have up to 8 dimensions in all.'],
    ['product', { factors: [pam(2), { family: 'product' }] }, ['factors', 1, 'family'],
      'A factor is one of pam, psk, qam, cross-qam, apsk, hexagonal, orthogonal, biorthogonal, simplex, hypercube, lattice, custom.'],
  ]
  it.each(refusals)('%s %o', (id, parameters, path, message) => expect(familyOf(id).validate(parameters)).toEqual([{ path, message }]))
})
