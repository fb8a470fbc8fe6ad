import { describe, expect, it } from 'vitest'
import { analyse, berExact, createConstellation, decisionProbabilities, naturalLabels, q, serExactByPoint } from '../../../shared/modulation'
import { randomFrom } from './seeded'

const rowsOf = (points: number[][], n0: number) => {
  const rows: number[][] = []
  decisionProbabilities(analyse(createConstellation(points)), n0, 1e-12, (_, row) => rows.push([...row]))
  return rows
}

describe('probabilities of decisions', () => {
  const random = randomFrom(3)
  const points = Array.from({ length: 16 }, () => [random(), random()])
  const geometry = analyse(createConstellation(points, { labels: naturalLabels(16) }))

  it.each([1, 0.05, 0.005])('of all other points add up to the error of each at N0 = %d', (n0) => {
    const errors = serExactByPoint(geometry, n0)
    const sums = rowsOf(points, n0).map((row, i) => 16 * row.reduce((sum, p, c) => c === i ? sum : sum + p, 0))
    expect(Math.max(...sums.map((sum, i) => Math.abs(sum / errors[i]! - 1)))).toBeLessThan(1e-9)
  })
  it.each([1, 0.05, 0.005])('weighted with wrong bits are the bit error rate at N0 = %d', (n0) => {
    const wrong = (i: number, c: number) => (i ^ c).toString(2).replaceAll('0', '').length
    const sum = rowsOf(points, n0).flatMap((row, i) => row.map((p, c) => p * wrong(i, c))).reduce((a, b) => a + b, 0)
    expect(Math.abs(sum / 4 / berExact(geometry, n0) - 1)).toBeLessThan(1e-9)
  })
  it('on a line are differences of Q to the thresholds', () => {
    const row = rowsOf([[-3], [-1], [1], [3]], 2)[0]!
    expect(row.slice(1)).toEqual([(q(1) - q(3)) / 4, (q(3) - q(5)) / 4, q(5) / 4].map(p => expect.closeTo(p, 14)))
  })
})
