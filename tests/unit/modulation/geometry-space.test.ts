import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, decisionCells, generate, serUnionBound } from '../../../shared/modulation'
import type { FamilyId, FamilyParameters, Geometry } from '../../../shared/modulation'
import { spaceFacets } from '../../../shared/modulation/geometry-space'
import { largest } from '../../../shared/modulation/linear-programme'
import { randomFrom } from './seeded'

const counts = ({ offsets, constellation: { order } }: Geometry) => Array.from({ length: order }, (_, i) => offsets[i + 1]! - offsets[i]!)
const listOf = ({ offsets, neighbours, constellation: { order } }: Geometry) => Array.from({ length: order }, (_, i) => [...neighbours.subarray(offsets[i], offsets[i + 1])])
const randomPoints = (seed: number, order: number, dimensions: number, levels = 0) => {
  const random = randomFrom(seed)
  const points = Array.from({ length: order }, () => Array.from({ length: dimensions }, () => levels ? Math.floor(random() * levels) : random() - 0.5))
  return points.filter((point, i) => points.findIndex(other => other.join() === point.join()) === i)
}

/** Vertices of the 600-cell: (±1, 0, 0, 0), (±½, ±½, ±½, ±½) and even permutations of (±φ, ±1, ±1/φ, 0)/2. */
function vertices600(): number[][] {
  const golden = (1 + Math.sqrt(5)) / 2
  const signs = (n: number) => Array.from({ length: 2 ** n }, (_, m) => Array.from({ length: n }, (_, b) => m >> b & 1 ? -1 : 1))
  const units = [0, 1, 2, 3].flatMap(n => [1, -1].map(sign => [0, 1, 2, 3].map(m => m === n ? sign : 0)))
  const halves = signs(4).map(s => s.map(x => x / 2))
  const orders = [0, 1, 2, 3].flatMap(a => [0, 1, 2, 3].flatMap(b => [0, 1, 2, 3].flatMap(c => [0, 1, 2, 3].map(d => [a, b, c, d])))).filter(o => new Set(o).size === 4)
  const even = orders.filter(o => o.flatMap((x, i) => o.slice(i + 1).map(y => x > y)).filter(Boolean).length % 2 === 0)
  const mixed = even.flatMap(o => signs(3).map(([a, b, c]) => o.map(n => [a! * golden / 2, b! / 2, c! / golden / 2, 0][n]!)))
  return [...units, ...halves, ...mixed]
}
const shell = (lattice: 'D4' | 'E8', order: number) => {
  const { points, dimensions } = generate('lattice', { lattice, order: order + 1 })
  return Array.from({ length: order }, (_, i) => [...points.subarray((i + 1) * dimensions, (i + 2) * dimensions)])
}

// Coxeter, Regular Polytopes: vertices adjacent to a vertex
describe('relevant neighbours of regular sets are the adjacent vertices', () => {
  const all = (points: number[][]) => new Set(counts(analyse(createConstellation(points))))
  const family = (id: FamilyId, parameters: FamilyParameters) => new Set(counts(analyse(generate(id, parameters))))
  it('4-cube: 4', () => expect(family('hypercube', { order: 16 })).toEqual(new Set([4])))
  it('8-cube: 8', () => expect(family('hypercube', { order: 256 })).toEqual(new Set([8])))
  it('4-cross-polytope: 6', () => expect(family('biorthogonal', { order: 8 })).toEqual(new Set([6])))
  it('8-simplex: 8', () => expect(family('simplex', { order: 9 })).toEqual(new Set([8])))
  it('24-cell: 8', () => expect(all(shell('D4', 24))).toEqual(new Set([8])))
  it('600-cell: 12', () => expect(all(vertices600())).toEqual(new Set([12])))
  it('E8 roots: 56', () => expect(all(shell('E8', 240))).toEqual(new Set([56])))
})

// Conway and Sloane, SPLAG: kissing numbers, which are also the numbers of relevant vectors of D4 and E8
describe('lattice points deep inside a cut', () => {
  const inside = (lattice: 'D4' | 'E8', order: number) => analyse(generate('lattice', { lattice, order }))
  it('of D4 have 24 relevant neighbours', () => expect(counts(inside('D4', 49))[0]).toBe(24))
  it('of D4 have 24 nearest neighbours', () => expect(inside('D4', 49).nearestCounts[0]).toBe(24))
  it('of E8 have 240 relevant neighbours', () => expect(counts(inside('E8', 241))[0]).toBe(240))
  it('of E8 have 240 nearest neighbours', () => expect(inside('E8', 241).nearestCounts[0]).toBe(240))
})

describe('relevant neighbours in space', () => {
  // The same points in a plane of three dimensions, turned about an axis, have the exact neighbours of the plane.
  it.each([1, 2, 3, 4, 5, 6, 7, 8])('of points in a plane are those of the plane, set %d', (seed) => {
    const points = randomPoints(seed, 40, 2)
    const turned = points.map(([x, y]) => [x!, 0.8 * y!, 0.6 * y!])
    expect(listOf(analyse(createConstellation(turned)))).toEqual(listOf(analyse(createConstellation(points))))
  })
  it.each([1, 2, 3, 4])('of a grid in a plane are those of the plane, set %d', (seed) => {
    const points = randomPoints(seed, 30, 2, 8)
    const turned = points.map(([x, y]) => [x!, x!, y!])
    expect(listOf(analyse(createConstellation(turned)))).toEqual(listOf(analyse(createConstellation(points.map(([x, y]) => [x! * Math.SQRT2, y!])))))
  })
  it('of points on a line are the next ones', () => {
    expect(listOf(analyse(createConstellation([[0, 0, 0], [1, 2, 3], [2, 4, 6], [4, 8, 12]])))).toEqual([[1], [0, 2], [1, 3], [2]])
  })
  const byProgrammes = (points: number[][]) => points.flatMap((from, i) => points.map((_, j) => j).filter(j => j > i).filter((j) => {
    const unit = Math.hypot(...points[j]!.map((x, n) => x - from[n]!))
    const rows = points.map(to => to.map((x, n) => x - from[n]!)).map((a) => {
      const square = a.reduce((sum, x) => sum + x * x, 0)
      return a.map(x => 2 * x * unit / square)
    })
    return largest(rows[j]!, rows.filter((_, k) => k !== i && k !== j), 2) > 1 + 1e-7
  }).map(j => `${i}-${j}`))
  it.each([[3, 36, 0], [4, 36, 0], [4, 30, 3], [6, 24, 0], [8, 20, 0]])('in %d dimensions are those of one programme a pair by the package', (dimensions, order, levels) => {
    const points = randomPoints(dimensions, order, dimensions, levels)
    const { first, second } = spaceFacets(Float64Array.from(points.flat()), dimensions)
    expect(new Set(first.map((i, f) => `${i}-${second[f]}`))).toEqual(new Set(byProgrammes(points)))
  })
  it('of products are those of one factor', () => {
    const product = analyse(generate('product', { factors: [{ family: 'hexagonal', order: 7 }, { family: 'psk', order: 5 }] }))
    const { first } = spaceFacets(product.constellation.points, 4)
    expect(2 * first.length).toBe(product.neighbours.length)
  })
})

describe('a geometry of more than two dimensions', () => {
  const geometry = analyse(generate('biorthogonal', { order: 8 }))
  it('has no edges', () => expect(geometry.edges).toBeNull())
  it('has its minimum distance', () => expect(geometry.minimumDistance).toBeCloseTo(Math.SQRT2, 14))
  // Six neighbours at √2 of unit energy: 6·Q(1/√N0)
  it('has a union bound', () => expect(serUnionBound(geometry, 0.04) / (6 * 2.866515718791939e-7)).toBeCloseTo(1, 11))
  it('has no cells to draw', () => {
    expect(() => decisionCells(geometry, { left: -1, right: 1, bottom: -1, top: 1 })).toThrow('This is offered for one and two dimensions')
  })
})
