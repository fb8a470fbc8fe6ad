import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, generate, q, serExact } from '../../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../../shared/modulation'

const exact = (id: FamilyId, parameters: FamilyParameters, n0: number) => serExact(analyse(generate(id, parameters)), n0)
const powers = [1, 0.3, 0.1, 0.03, 0.01]

describe('exact symbol error rates of more dimensions', () => {
  it.each(powers)('a 5-cube is five times BPSK, N0 %d', (n0) => {
    const single = q(Math.sqrt(2 / 5 / n0))
    expect(exact('hypercube', { order: 32 }, n0) / -Math.expm1(5 * Math.log1p(-single))).toBeCloseTo(1, 12)
  })
  it.each(powers)('a product of QPSK and 16-QAM in 4 dimensions, N0 %d', (n0) => {
    // d_min 1 each: energies ½ and 2.5
    const x = q(1 / Math.sqrt(2 * 3 * n0))
    const wanted = -Math.expm1(2 * Math.log1p(-x) + 2 * Math.log1p(-1.5 * x))
    expect(exact('product', { factors: [{ family: 'psk', order: 4 }, { family: 'qam', order: 16 }] }, n0) / wanted).toBeCloseTo(1, 10)
  })
  // A simplex of three points is 3-PSK, a cross-polytope of four is QPSK, laid into more dimensions.
  const laid = (points: Float64Array) => createConstellation(Array.from({ length: points.length / 2 }, (_, i) => [points[2 * i]!, 0.6 * points[2 * i + 1]!, 0.8 * points[2 * i + 1]!]))
  it.each(powers)('simplex and PSK agree for three points, N0 %d', (n0) => {
    const flat = generate('psk', { order: 3 })
    expect(serExact(analyse(laid(flat.points)), n0) / serExact(analyse(flat), n0)).toBeCloseTo(1, 9)
  })
  it.each(powers)('biorthogonal and QPSK agree for four points, N0 %d', (n0) => {
    const flat = generate('psk', { order: 4 })
    expect(serExact(analyse(laid(flat.points)), n0) / serExact(analyse(flat), n0)).toBeCloseTo(1, 9)
  })
  it('orthogonal signals of unit energy are those of a simplex of less', () => {
    expect(exact('orthogonal', { order: 8 }, 0.1) / exact('simplex', { order: 8 }, 0.1 * 8 / 7)).toBeCloseTo(1, 11)
  })
  it('a product with an orthogonal factor is known', () => {
    const points = [[1, 0, 0], [0, 1, 0], [0, 0, 1]]
    const geometry = analyse(createConstellation(points.flatMap(p => [[...p, 1], [...p, -1]])))
    const three = serExact(analyse(createConstellation(points)), 0.2)
    expect(serExact(geometry, 0.2) / -Math.expm1(Math.log1p(-three) + Math.log1p(-q(1 / Math.sqrt(0.1))))).toBeCloseTo(1, 12)
  })
  it('is refused where none is known', () => {
    expect(() => exact('lattice', { lattice: 'D4', order: 24 }, 0.1)).toThrow('An exact symbol error rate is known for')
  })
})
