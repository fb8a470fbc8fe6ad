import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, paprDb, requiredEsN0Db, serAllPairs, serExact, serLowerBound, serNearest, serUnionBound } from '../../../shared/modulation'

const settings = { seed: 7, numRuns: 100 }

/** 2 to 24 points on a grid of 1/1000 over a square of side 2, so that no two are closer than that. */
const plane = fc.uniqueArray(fc.integer({ min: 0, max: 2000 * 2000 - 1 }), { minLength: 2, maxLength: 24 })
  .map(cells => cells.map((n): [number, number] => [(n % 2000) / 1000 - 1, Math.floor(n / 2000) / 1000 - 1]))
/** d_min/√(2·N0): from error rates near 1 to about 1e-16 */
const argument = fc.double({ min: 0.05, max: 8, noNaN: true })
const angle = fc.double({ min: 0, max: 7, noNaN: true })

const geometryOf = (points: number[][]) => analyse(createConstellation(points))
const densityFor = (minimumDistance: number, x: number) => (minimumDistance / x) ** 2 / 2

/** The four rates of a set of points, at the N0 where d_min/√(2·N0) is x. */
function ratesOf(points: number[][], n0: number) {
  const geometry = geometryOf(points)
  return [serExact(geometry, n0), serUnionBound(geometry, n0), serAllPairs(geometry.constellation, n0), serNearest(geometry, n0)]
}

function expectClose(actual: number[], wanted: number[], tolerance: number) {
  actual.forEach((value, n) => expect(Math.abs(value / wanted[n]! - 1)).toBeLessThan(tolerance))
}

describe('error rates of any points', () => {
  /** Same rates after a change of the points, at N0 times `factor`. */
  function unchangedBy(change: (points: [number, number][], by: number) => number[][], factor: (by: number) => number = () => 1) {
    fc.assert(fc.property(plane, argument, angle, (points, x, by) => {
      const n0 = densityFor(geometryOf(points).minimumDistance, x)
      expectClose(ratesOf(change(points, by), n0 * factor(by)), ratesOf(points, n0), 1e-9)
    }), settings)
  }
  it('do not change by turning', () => unchangedBy((points, by) =>
    points.map(([x, y]) => [x * Math.cos(by) - y * Math.sin(by), x * Math.sin(by) + y * Math.cos(by)])))
  it('do not change by mirroring', () => unchangedBy(points => points.map(([x, y]) => [x, -y])))
  it('do not change by scaling points and √N0 alike', () => unchangedBy(
    (points, by) => points.map(([x, y]) => [x * (by + 0.1), y * (by + 0.1)]), by => (by + 0.1) ** 2))
  it('do not change by another order of the points', () => unchangedBy((points, by) => {
    const shift = Math.floor(by) % points.length
    return [...points.slice(shift), ...points.slice(0, shift)].reverse()
  }))
  it('do not change by moving all points', () => unchangedBy((points, by) => points.map(([x, y]) => [x + by, y - 2 * by])))

  it('are ordered: exact, union bound, all pairs', () => fc.assert(fc.property(plane, argument, (points, x) => {
    const [exact, union, pairs] = ratesOf(points, densityFor(geometryOf(points).minimumDistance, x)) as [number, number, number]
    expect(exact).toBeLessThanOrEqual(union * (1 + 1e-12))
    expect(union).toBeLessThanOrEqual(pairs * (1 + 1e-12))
  }), settings))
  it('lie between the lower bound and the union bound when exact', () => fc.assert(fc.property(plane, argument, (points, x) => {
    const geometry = geometryOf(points)
    const n0 = densityFor(geometry.minimumDistance, x)
    const exact = serExact(geometry, n0)
    expect(serLowerBound(geometry, n0)).toBeLessThanOrEqual(exact * (1 + 1e-9))
    expect(exact).toBeLessThanOrEqual(serUnionBound(geometry, n0) * (1 + 1e-9))
  }), { ...settings, numRuns: 300 }))
  it('are probabilities when exact', () => fc.assert(fc.property(plane, fc.double({ min: 1e-4, max: 1, noNaN: true }), (points, x) => {
    expect(ratesOf(points, densityFor(geometryOf(points).minimumDistance, x))[0]).toBeLessThan(1 - 1 / points.length + 1e-9)
  }), settings))
  it('fall with the SNR when exact', () => fc.assert(fc.property(plane, argument, (points, x) => {
    const geometry = geometryOf(points)
    const n0 = densityFor(geometry.minimumDistance, x)
    expect(serExact(geometry, n0 / 1.05)).toBeLessThan(serExact(geometry, n0))
  }), settings))
  it('approach the nearest-neighbour approximation as the SNR grows', () => fc.assert(fc.property(plane, (points) => {
    const geometry = geometryOf(points)
    const distances = [...geometry.distanceClasses.distance]
    const second = distances.find(d => d > geometry.minimumDistance * (1 + 1e-6)) ?? 2 * geometry.minimumDistance
    // Where the next distance's term is below 1e-9 of the nearest, or at 1e-250 if that comes first.
    const n0 = Math.max((second ** 2 - geometry.minimumDistance ** 2) / (4 * 22), geometry.minimumDistance ** 2 / (4 * 550))
    fc.pre(n0 === (second ** 2 - geometry.minimumDistance ** 2) / (4 * 22))
    expect(Math.abs(serExact(geometry, n0) / serNearest(geometry, n0) - 1)).toBeLessThan(1e-3)
  }), settings))
})

describe('moving all points', () => {
  it('changes the energy', () => fc.assert(fc.property(plane, angle, (points, by) => {
    const c = createConstellation(points)
    const meanX = points.reduce((sum, [x]) => sum + x, 0) / points.length
    const moved = createConstellation(points.map(([x, y]) => [x + by, y]))
    expect(moved.meanEnergy).toBeCloseTo(c.meanEnergy + 2 * by * meanX + by * by, 10)
  }), settings))
  it('leaves the neighbours alone', () => fc.assert(fc.property(plane, angle, (points, by) => {
    const [before, after] = [geometryOf(points), geometryOf(points.map(([x, y]) => [x + by, y - by]))]
    expect([...after.neighbours]).toEqual([...before.neighbours])
  }), settings))
})

describe('required Es/N0', () => {
  it('gives the target back', () => fc.assert(fc.property(plane, fc.double({ min: -12, max: -2, noNaN: true }), (points, exponent) => {
    const geometry = geometryOf(points)
    const db = requiredEsN0Db({ geometry, kind: 'serExact' }, 10 ** exponent)
    expect(serExact(geometry, geometry.constellation.meanEnergy / 10 ** (db / 10)) / 10 ** exponent).toBeCloseTo(1, 6)
  }), settings))
  it('by the bound is never below the exact one', () => fc.assert(fc.property(plane, (points) => {
    const geometry = geometryOf(points)
    expect(requiredEsN0Db({ geometry, kind: 'serUnion' }, 1e-6)).toBeGreaterThanOrEqual(requiredEsN0Db({ geometry, kind: 'serExact' }, 1e-6) - 1e-9)
  }), settings))
})

describe('PAPR', () => {
  it('is never negative', () => fc.assert(fc.property(plane, (points) => {
    expect(paprDb(createConstellation(points))).toBeGreaterThan(-1e-12)
  }), settings))
})
