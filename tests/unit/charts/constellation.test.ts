import { describe, expect, it } from 'vitest'
import { dotsPath, halfPlane, pointAt, pointSentence, pointTowards, pointWords, polygonsPath } from '../../../app/utils/charts/constellation'

const square = [[1, 1], [-1, 1], [-1, -1], [1, -1]]
const same = (value: number) => value

describe('going from point to point', () => {
  it('finds the point nearest to a place', () => expect(pointAt(square, [-0.2, -3])).toBe(2))
  it('follows the arrow to the point that lies there', () => {
    expect([pointTowards(square, 0, 'left'), pointTowards(square, 0, 'down'), pointTowards(square, 2, 'up')]).toEqual([1, 3, 1])
  })
  it('stays where no point lies in that direction', () => expect(pointTowards(square, 0, 'right')).toBe(0))
  it('prefers the point straight ahead to a nearer one aside', () => expect(pointTowards([[0, 0], [1, 0.9], [1.5, 0]], 0, 'right')).toBe(2))
})

describe('the words for a point', () => {
  it('count relevant and nearest neighbours', () => expect(pointSentence(5, [
    { point: 1, distance: 0.632, nearest: true, share: null }, { point: 2, distance: 0.632, nearest: true, share: null }, { point: 3, distance: 0.9, nearest: false, share: null },
    { point: 4, distance: 0.9, nearest: false, share: null },
  ], 0.6324555)).toBe('Point 5: 4 relevant neighbours, 2 at the minimum distance 0.632'))
  it('say when no neighbour is a nearest one', () => expect(pointSentence(0, [{ point: 1, distance: 1, nearest: false, share: null }], 0.5))
    .toBe('Point 0: 1 relevant neighbour, none at the minimum distance 0.500'))
  it('name its label and how often it is mistaken', () => expect(pointWords(0, {
    dimensions: 1, points: [[-1, 0], [1, 0]], cells: [], box: 2, minimumDistance: 2, probabilities: null,
    neighbours: [[{ point: 1, distance: 2, nearest: true, share: 1 }], [{ point: 0, distance: 2, nearest: true, share: 1 }]],
    labels: ['0', '1'], errorByPoint: [1.234e-6, 1.234e-6], availableEsN0Db: 10.567,
  })).toBe('Point 0: 1 relevant neighbour, 1 at the minimum distance 2.000, label 0; mistaken with probability 1.23e−6 at the available 10.56 dB.'))
})

describe('what is drawn', () => {
  it('puts all polygons into one path', () => expect(polygonsPath([[[0, 0], [1, 0], [0, 1]], [], [[2, 2], [3, 2], [2, 3]]], same, same))
    .toBe('M0.00 0.00L1.00 0.00L0.00 1.00ZM2.00 2.00L3.00 2.00L2.00 3.00Z'))
  it('puts all points into one path', () => expect(dotsPath([[1, 2], [3, 4]], same, same)).toBe('M1.00 2.00h0M3.00 4.00h0'))
  it('draws a bisector halfway and across', () => {
    const { edge } = halfPlane([0, 0], [100, 0])
    expect(edge).toEqual([[50, -42], [50, 42]])
  })
  it('strokes the far side of the bisector', () => expect(halfPlane([0, 0], [100, 0]).hatches.every(([[x0], [x1]]) => x0 === 50 && x1 > 50)).toBe(true))
})
