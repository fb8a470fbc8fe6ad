import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, serExact, serExactByPoint, serNearest, serUnionBound } from '../../../shared/modulation'

// 30-digit values by tests/reference/data/make-ser.py: brute-force clipping and quadrature with mpmath.
interface Entry {
  name: string
  points: number[][]
  probabilities: number[] | null
  minimumDistance: string
  relevant: number[][]
  rates: { n0: number, serExact: string, serUnion: string, serNearest: string }[]
}
const table = JSON.parse(readFileSync(new URL('../../reference/data/ser-30-digits.json', import.meta.url), 'utf8')) as Entry[]

const tolerance = 1e-9
const relativeError = (value: number, digits: string) => Math.abs(value / Number(digits) - 1)

describe('the committed table of 30-digit error rates', () => {
  it('has at least 200 cases, from above 0.9 to below 1e-29', () => {
    const rates = table.flatMap(entry => entry.rates.map(rate => Number(rate.serExact)))
    expect(rates.length).toBeGreaterThanOrEqual(200)
    expect(Math.max(...rates)).toBeGreaterThan(0.9)
    expect(Math.min(...rates)).toBeLessThan(1e-29)
  })
})

describe.each(table)('$name', ({ points, probabilities, minimumDistance, relevant, rates }) => {
  const geometry = analyse(createConstellation(points, { probabilities }))
  const list = relevant.map((_, i) => [...geometry.neighbours.subarray(geometry.offsets[i], geometry.offsets[i + 1])])

  it('has the minimum distance of the table', () => expect(relativeError(geometry.minimumDistance, minimumDistance)).toBeLessThan(1e-14))
  it('has the relevant neighbours of the table', () => expect(list).toEqual(relevant))

  it.each(rates)('exact SER at N0 = $n0', ({ n0, serExact: digits }) => {
    expect(relativeError(serExact(geometry, n0), digits)).toBeLessThan(tolerance)
  })
  it.each(rates)('union bound at N0 = $n0', ({ n0, serUnion: digits }) => {
    expect(relativeError(serUnionBound(geometry, n0), digits)).toBeLessThan(tolerance)
  })
  it.each(rates)('nearest-neighbour approximation at N0 = $n0', ({ n0, serNearest: digits }) => {
    expect(relativeError(serNearest(geometry, n0), digits)).toBeLessThan(tolerance)
  })
  it.each(rates)('errors by point add up to the exact SER at N0 = $n0', ({ n0, serExact: digits }) => {
    const sum = serExactByPoint(geometry, n0).reduce((total, p, i) => total + p * (probabilities?.[i] ?? 1 / points.length), 0)
    expect(relativeError(sum, digits)).toBeLessThan(tolerance)
  })
})
