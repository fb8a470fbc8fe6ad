import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, generate, mapCells, mapNotes } from '../../../shared/modulation'
import type { Constellation, FamilyId, FamilyParameters } from '../../../shared/modulation'
import { randomFrom } from './seeded'

const neighboursOf = (cells: { offsets: Int32Array, neighbours: Int32Array, constellation: Constellation }) =>
  Array.from({ length: cells.constellation.order }, (_, i) => [...cells.neighbours.subarray(cells.offsets[i], cells.offsets[i + 1])])

describe('cells of equal probabilities are those of minimum distance', () => {
  it.each<[FamilyId, FamilyParameters]>([
    ['pam', { order: 8 }], ['psk', { order: 64 }], ['qam', { order: 64 }], ['qam', { order: 1024 }], ['cross-qam', { order: 128 }],
    ['apsk', { rings: [1, 5, 10], ratios: [1.95] }], ['apsk', { rings: [4, 12, 16], ratios: [2.84, 5.27] }], ['hexagonal', { order: 64 }],
  ])('of %s %o', (id, parameters) => {
    const constellation = generate(id, parameters)
    expect(neighboursOf(mapCells(constellation, 0.1))).toEqual(neighboursOf(analyse(constellation)))
  })
  it('of a turned grid, whose rows are straight only to rounding', () => {
    const constellation = createConstellation([...Array(64).keys()].map((n) => {
      const [x, y] = [n % 8, Math.floor(n / 8)]
      return [x * Math.cos(0.7) - y * Math.sin(0.7), x * Math.sin(0.7) + y * Math.cos(0.7)]
    }))
    expect(neighboursOf(mapCells(constellation, 1))).toEqual(neighboursOf(analyse(constellation)))
  })
  it('of 100 sets at random, to the ends of the edges', () => {
    const random = randomFrom(7)
    for (let n = 0; n < 100; n++) {
      const constellation = createConstellation(Array.from({ length: 2 + n }, () => [random() * 2 - 1, random() * 2 - 1]))
      const [wanted, found] = [analyse(constellation), mapCells(constellation, 0.3)]
      expect(neighboursOf(found)).toEqual(neighboursOf(wanted))
      wanted.edges!.t2.forEach((t2, entry) => {
        if (t2 < 100) expect(found.edges.t2[entry]!).toBeCloseTo(t2, 8)
        expect(found.edges.h[entry]).toBeCloseTo(wanted.edges!.h[entry]!, 14)
      })
    }
  })
})

describe('cells of unequal probabilities', () => {
  const pair = createConstellation([[0, 0], [2, 0]], { probabilities: [0.9, 0.1] })
  it('end at d/2 + N0/(2d)·ln(p_i/p_j) from the point', () => {
    // 1 + (0.5/4)·ln 9
    expect([...mapCells(pair, 0.5).edges.h].map(h => h.toFixed(10))).toEqual(['1.2746530722', '0.7253469278'])
  })
  it('may leave out their own point', () => {
    // 1 − (N0/4)·ln 9 < 0 from N0 = 4/ln 9 = 1.8205 on
    expect([mapNotes(pair, 1.82), mapNotes(pair, 1.821)]).toEqual([{ outside: [], vanished: [] }, { outside: [1], vanished: [] }])
  })
  it('may vanish between likelier ones, on a line', () => {
    // −1, 0, 1: the cell of 0 is |x| < ½ − (N0/2)·ln(p/p_0), nothing from N0 = 1/ln 9 = 0.4551 on
    const line = createConstellation([[-1], [0], [1]], { probabilities: [9 / 19, 1 / 19, 9 / 19] })
    expect([mapNotes(line, 0.455).vanished, mapNotes(line, 0.4552).vanished]).toEqual([[], [1]])
  })
  it('may vanish between likelier ones, in the plane', () => {
    const cross = createConstellation([[0, 0], [1, 0], [0, 1], [-1, 0], [0, -1]], { probabilities: [0.04, 0.24, 0.24, 0.24, 0.24] })
    // ½ = (N0/2)·ln 6 at N0 = 0.5581
    expect([mapNotes(cross, 0.558).vanished, mapNotes(cross, 0.5582).vanished]).toEqual([[], [0]])
  })
  it('of the others close over a vanished one', () => {
    const cross = createConstellation([[0, 0], [1, 0], [0, 1], [-1, 0], [0, -1]], { probabilities: [0.04, 0.24, 0.24, 0.24, 0.24] })
    expect(neighboursOf(mapCells(cross, 0.6))).toEqual([[], [2, 4], [1, 3], [2, 4], [1, 3]])
  })
  it('hold exactly the places where p·exp(−r²/N0) is largest', () => {
    const random = randomFrom(11)
    for (let n = 0; n < 60; n++) {
      const order = 3 + n % 12
      const weights = Array.from({ length: order }, () => random() ** 3 + 1e-3)
      const total = weights.reduce((sum, w) => sum + w, 0)
      const points = Array.from({ length: order }, () => [random() * 2 - 1, random() * 2 - 1])
      const cells = mapCells(createConstellation(points, { probabilities: weights.map(w => w / total) }), 0.02 + random())
      for (let k = 0; k < 40; k++) {
        const place = [random() * 3 - 1.5, random() * 3 - 1.5]
        const score = points.map(([x, y], i) => Math.log(weights[i]!) - ((x! - place[0]!) ** 2 + (y! - place[1]!) ** 2) / cells.n0)
        expect(holders(cells, points, place)).toEqual([score.indexOf(Math.max(...score))])
      }
    }
  })
})

describe('cells refuse', () => {
  const solid = createConstellation([[0, 0, 0], [1, 0, 0]])
  it('three dimensions', () => expect(() => mapCells(solid, 1)).toThrow('MAP decisions are offered for one and two dimensions.'))
  it('N0 = 0', () => expect(() => mapCells(generate('psk', { order: 4 }), 0)).toThrow('The noise density N0 is a finite number above 0.'))
})

/** Points whose cells' edges all have a place on their inner side. */
function holders({ offsets, neighbours, edges, vanished }: ReturnType<typeof mapCells>, points: number[][], [u, v]: number[]): number[] {
  return [...points.keys()].filter(i => !vanished[i] && [...neighbours.subarray(offsets[i], offsets[i + 1])].every((j, n) => {
    const [dx, dy] = [points[j]![0]! - points[i]![0]!, points[j]![1]! - points[i]![1]!]
    return ((u! - points[i]![0]!) * dx + (v! - points[i]![1]!) * dy) / Math.hypot(dx, dy) <= edges.h[offsets[i]! + n]!
  }))
}
