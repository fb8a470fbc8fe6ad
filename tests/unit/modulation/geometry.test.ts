import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, decisionCells, generate } from '../../../shared/modulation'
import type { Geometry } from '../../../shared/modulation'
import { relevantByClipping } from './exact-cells'
import { randomFrom } from './seeded'

const neighboursOf = ({ constellation, offsets, neighbours }: Geometry) =>
  Array.from({ length: constellation.order }, (_, i) => [...neighbours.subarray(offsets[i], offsets[i + 1])])
const relevant = (points: number[][]) => neighboursOf(analyse(createConstellation(points)))

describe('relevant neighbours', () => {
  it('on a line are the points next to a point', () => {
    expect(relevant([[3], [1], [2], [7]])).toEqual([[2, 3], [2], [0, 1], [0]])
  })
  it('of two points are each other', () => expect(relevant([[0, 0], [1, 2]])).toEqual([[1], [0]]))
  it('of a square do not include the diagonal', () => {
    expect(relevant([[0, 0], [1, 0], [1, 1], [0, 1]])).toEqual([[1, 3], [0, 2], [1, 3], [0, 2]])
  })
  it('of collinear points in the plane are the points next to a point', () => {
    expect(relevant([[2, 2], [0, 0], [1, 1], [5, 5]])).toEqual([[2, 3], [2], [0, 1], [0]])
  })
  it('of a point in the middle of a ring are all points of the ring', () => {
    const { constellation, offsets, neighbours } = analyse(generate('apsk', { rings: [1, 7] }))
    expect([constellation.order, [...neighbours.subarray(offsets[0], offsets[1])]]).toEqual([8, [1, 2, 3, 4, 5, 6, 7]])
  })
  it.each([8, 16, 64, 256])('of %d-PSK are two a point', order => expect(analyse(generate('psk', { order })).relevantMean).toBe(2))
  it.each([16, 64, 256, 1024])('of %d-QAM are 4 − 4/√M in the mean', (order) => {
    expect(analyse(generate('qam', { order })).relevantMean).toBeCloseTo(4 - 4 / Math.sqrt(order), 12)
  })
  it('keep their number when a grid is turned', () => {
    const turned = [...Array(64).keys()].map((n) => {
      const [x, y] = [n % 8, Math.floor(n / 8)]
      return [x * Math.cos(0.7) - y * Math.sin(0.7), x * Math.sin(0.7) + y * Math.cos(0.7)]
    })
    expect(analyse(createConstellation(turned)).relevantMean).toBe(3.5)
  })
  it('of a far outlier are those that bound its half of the plane', () => {
    expect(relevant([[0, 0], [0, 1], [1, 0], [1e6, 0.5]])).toEqual(relevantByClipping([[0, 0], [0, 1], [1, 0], [1e6, 0.5]]))
  })
})

describe('relevant neighbours equal those of exact clipping', () => {
  const random = randomFrom(20)
  const between = (low: number, high: number) => low + (high - low) * random()
  const scattered = (count: number, size = 1) => Array.from({ length: count }, () => [between(-size, size), between(-size, size)])
  const turned = (points: number[][], angle: number) => points.map(([x, y]) =>
    [x! * Math.cos(angle) - y! * Math.sin(angle), x! * Math.sin(angle) + y! * Math.cos(angle)])
  const cells = (columns: number, rows: number, keep: number) => [...Array(columns * rows).keys()]
    .filter(() => random() < keep).map(n => [n % columns, Math.floor(n / columns)])
  const ring = (count: number, radius: number, phase: number) => Array.from({ length: count }, (_, i) =>
    [radius * Math.cos(2 * Math.PI * i / count + phase), radius * Math.sin(2 * Math.PI * i / count + phase)])
  const jittered = (points: number[][], size: number) => points.map(([x, y]) => [x! + between(-size, size), y! + between(-size, size)])

  const kinds: Record<string, () => number[][]> = {
    'points at random': () => scattered(3 + Math.floor(between(0, 12))),
    'parts of an integer grid': () => cells(4, 4, 0.7).concat([[9, 9], [9, 10]]),
    'parts of a turned grid': () => turned(cells(4, 3, 0.8).concat([[5, 1], [6, 1]]), between(0, 3)),
    'grids moved by about the shortest facet': () => jittered(cells(4, 3, 0.9).concat([[7, 7]]), 10 ** between(-10.5, -8)),
    'rings with a centre': () => [[0, 0], ...ring(5, 1, random()), ...ring(8, between(1.5, 3), random())],
    'one ring': () => ring(3 + Math.floor(between(0, 9)), between(0.1, 10), random()),
    'collinear points': () => [...new Set(Array.from({ length: 8 }, () => Math.floor(between(-50, 50))))].map(n => [3 * n, -n]),
    'a far outlier': () => [...scattered(8), [1e5, between(-1e4, 1e4)]],
    'nearly coincident pairs': () => scattered(5).flatMap(([x, y]) => [[x!, y!], [x! + between(1e-8, 2e-8), y! + between(1e-8, 2e-8)]]),
    'hexagonal parts': () => cells(4, 4, 0.8).map(([x, y]) => [x! + y! / 2, y! * Math.sqrt(3) / 2]).concat([[20, 3], [20, 4]]),
  }
  // 2,000 sets in all.
  for (const [kind, make] of Object.entries(kinds)) {
    it(`200 sets of ${kind}`, () => {
      for (let n = 0; n < 200; n++) {
        const points = make()
        expect(relevant(points), JSON.stringify(points)).toEqual(relevantByClipping(points))
      }
    })
  }
})

describe('cells', () => {
  const geometry = analyse(createConstellation([[0, 0], [2, 0], [0, 2]]))
  it('know how far their edges are', () => expect([...geometry.edges!.h.subarray(0, 2)]).toEqual([1, 1]))
  it('know where their edges end', () => {
    // The corner (1, 1) lies 1 to the left of 0 → 1 and 1 to the right of 0 → 2.
    expect([geometry.edges!.t1[0], geometry.edges!.t2[0], geometry.edges!.t1[1], geometry.edges!.t2[1]]).toEqual([-Infinity, 1, -1, Infinity])
  })
  it('are drawn inside a box', () => {
    const [first] = decisionCells(geometry, { left: -3, right: 3, bottom: -3, top: 3 })
    expect(first).toEqual([[-3, 1], [-3, -3], [1, -3], [1, 1]])
  })
  it('fill the box', () => {
    const box = { left: -1.5, right: 1.5, bottom: -1.5, top: 1.5 }
    const areas = decisionCells(analyse(generate('apsk', { rings: [1, 5, 10], ratios: [1.95] })), box).map(area)
    expect(areas.reduce((sum, a) => sum + a, 0)).toBeCloseTo(9, 12)
  })
  it('of points on a line are strips', () => {
    const [, second] = decisionCells(analyse(createConstellation([[0], [2], [4]])), { left: -1, right: 5, bottom: -1, top: 1 })
    expect(area(second!)).toBe(4)
  })
})

function area(polygon: number[][]): number {
  return polygon.reduce((sum, [x, y], n) => {
    const [u, v] = polygon[(n + 1) % polygon.length]!
    return sum + (x! * v! - u! * y!) / 2
  }, 0)
}

describe('sizes of the coordinates', () => {
  it.each([1e-60, 1e-9, 1e60])('%d times a grid has the grid\'s neighbours', (size) => {
    expect(relevant([[0, 0], [size, 0], [size, size], [0, size]])).toEqual([[1, 3], [0, 2], [1, 3], [0, 2]])
  })
})
