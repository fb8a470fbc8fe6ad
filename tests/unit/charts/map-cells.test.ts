import { describe, expect, it } from 'vitest'
import { mapPicture, mapSentence } from '../../../app/utils/charts/map-cells'
import type { CandidateConstellation } from '../../../shared/schemas/values'

/** Two points of unit energy, the second sent with probability p. */
const pair = (p: number, availableEsN0Db: number | null): CandidateConstellation => ({
  dimensions: 1, points: [[-1, 0], [1, 0]], cells: [], box: 2, minimumDistance: 2, labels: null, errorByPoint: null, availableEsN0Db,
  neighbours: [[{ point: 1, distance: 2, nearest: true, share: 1 }], [{ point: 0, distance: 2, nearest: true, share: 1 }]],
  probabilities: [1 - p, p],
})
const right = ({ cells }: { cells: number[][][] }, i: number) => Math.max(...cells[i]!.map(([x]) => x!))

describe('MAP cells', () => {
  it('meet halfway for points sent equally often', () => expect(right(mapPicture(pair(0.5, 10))!, 0)).toBeCloseTo(0, 12))
  // from the left point the boundary lies at 1 + (N0/4)·ln(0.9/0.1) with N0 = 0.1
  it('give the more likely point more room', () => expect(right(mapPicture(pair(0.1, 10))!, 0)).toBeCloseTo(0.025 * Math.log(9), 12))
  it('leave an unlikely point outside of its own cell at low SNR', () => expect(mapPicture(pair(0.01, 0))!.outside).toEqual([1]))
  it('are not known without an available Es/N0', () => expect(mapPicture(pair(0.5, null))).toBeNull())
})

describe('the words for MAP cells', () => {
  it('say that all is well', () => expect(mapSentence({ outside: [], vanished: [] })).toBe('Decisions are MAP: every point lies in its own cell.'))
  it('name points outside and vanished cells', () => expect(mapSentence({ outside: [1], vanished: [4, 7] }))
    .toBe('Decisions are MAP. Outside its own cell lies point 1. Never decided on, for want of a cell: points 4, 7.'))
  it('list no more than a dozen', () => expect(mapSentence({ outside: Array.from({ length: 20 }, (_, i) => i), vanished: [] })).toMatch(/ 11 and 8 more\.$/))
})
