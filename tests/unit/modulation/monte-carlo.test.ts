import { describe, expect, it } from 'vitest'
import { analyse, berExact, createConstellation, fromDecibels, naturalLabels, serExact } from '../../../shared/modulation'
import { randomFrom } from './seeded'

/** Symbols sent for one case: error rates of some per cent are known to about 1 %. */
const symbols = 100_000
/** Of 12 cases none may lie farther off than this many standard errors: one such in 1,300 runs, and the seeds are fixed. */
const standardErrors = 4.2

/** Two normal numbers of unit variance, by Box and Muller 1958. */
function normals(random: () => number): [number, number] {
  const radius = Math.sqrt(-2 * Math.log(1 - random()))
  const angle = 2 * Math.PI * random()
  return [radius * Math.cos(angle), radius * Math.sin(angle)]
}

/** Share of symbols for which another point is nearer to what was received: plain counting, with no geometry at all. */
function counted(points: number[][], p: readonly number[], n0: number, random: () => number): number {
  const sigma = Math.sqrt(n0 / 2)
  let errors = 0
  for (let s = 0; s < symbols; s++) {
    let sent = 0
    for (let u = random() - p[0]!; u > 0 && sent < points.length - 1; u -= p[sent]!) sent++
    const [x, y] = normals(random)
    const received = [points[sent]![0]! + sigma * x, points[sent]![1]! + sigma * y] as const
    const square = (i: number) => (points[i]![0]! - received[0]) ** 2 + (points[i]![1]! - received[1]) ** 2
    const own = square(sent)
    if (points.some((_, i) => i !== sent && square(i) < own)) errors++
  }
  return errors / symbols
}

describe('exact SER agrees with a count of errors', () => {
  it.each(Array.from({ length: 12 }, (_, n) => ({ seed: n + 1, order: 3 + 2 * n, db: 4 + n })))(
    'of $order points at random at $db dB, seed $seed', ({ seed, order, db }) => {
      const random = randomFrom(seed)
      const points = Array.from({ length: order }, () => [2 * random() - 1, 2 * random() - 1])
      const weights = points.map(() => 0.2 + random())
      const total = weights.reduce((sum, w) => sum + w, 0)
      const p = seed % 2 ? weights.map(w => w / total) : points.map(() => 1 / order)
      const geometry = analyse(createConstellation(points, { probabilities: p }))
      const n0 = geometry.constellation.meanEnergy / fromDecibels(db)
      const exact = serExact(geometry, n0)
      const error = Math.sqrt(exact * (1 - exact) / symbols)
      expect(Math.abs(counted(points, p, n0, random) - exact) / error).toBeLessThan(standardErrors)
    })
})

/** Bit errors of each symbol, counted: their mean per bit and its standard error. */
function countedBits(points: number[][], p: readonly number[], labels: string[], n0: number, random: () => number) {
  const sigma = Math.sqrt(n0 / 2)
  let [sum, squares] = [0, 0]
  for (let s = 0; s < symbols; s++) {
    let sent = 0
    for (let u = random() - p[0]!; u > 0 && sent < points.length - 1; u -= p[sent]!) sent++
    const [x, y] = normals(random)
    const squareTo = ([a, b]: number[]) => (a! - points[sent]![0]! - sigma * x) ** 2 + (b! - points[sent]![1]! - sigma * y) ** 2
    const squared = points.map(squareTo)
    const decided = labels[squared.indexOf(Math.min(...squared))]!
    const share = [...labels[sent]!].filter((bit, n) => bit !== decided[n]).length / decided.length
    sum += share
    squares += share * share
  }
  const mean = sum / symbols
  return { mean, error: Math.sqrt((squares / symbols - mean * mean) / symbols) }
}

describe('exact BER of unequal probabilities agrees with a count of wrong bits', () => {
  it.each([4, 8, 16, 8, 4, 16].map((order, n) => ({ seed: 101 + n, order, db: 6 + n })))(
    'of $order points at random at $db dB, seed $seed', ({ seed, order, db }) => {
      const random = randomFrom(seed)
      const points = Array.from({ length: order }, () => [2 * random() - 1, 2 * random() - 1])
      const weights = points.map(() => 0.2 + random())
      const total = weights.reduce((sum, w) => sum + w, 0)
      const p = weights.map(w => w / total)
      const labels = naturalLabels(order)!
      const geometry = analyse(createConstellation(points, { labels, probabilities: p }))
      const n0 = geometry.constellation.meanEnergy / fromDecibels(db)
      const { mean, error } = countedBits(points, p, labels, n0, random)
      expect(Math.abs(mean - berExact(geometry, n0)) / error).toBeLessThan(standardErrors)
    })
})
