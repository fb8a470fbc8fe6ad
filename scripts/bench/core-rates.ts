import { bitMetricRate, createConstellation, fromDecibels, generate, mutualInformation, rateThresholdDb } from '../../shared/modulation/index'
import type { Constellation } from '../../shared/modulation/index'
import { randomPoints } from './core'
import type { Measure, Row } from './measure'

/* Mutual information and bit-metric rate together at one SNR, in one thread. Run: npm run bench -- core-rates */

const words = (order: number) => Array.from({ length: order }, (_, i) => i.toString(2).padStart(Math.log2(order), '0'))

/** 256-QAM with Gray labels, a bit for each coordinate's halves and quarters. */
function rectangular(): Constellation {
  const gray = (n: number) => (n ^ n >> 1).toString(2).padStart(4, '0')
  return generate('qam', { order: 256 }, { labels: Array.from({ length: 256 }, (_, i) => gray(i >> 4) + gray(i & 15)) })
}

const random = (order: number) => createConstellation(randomPoints(order), { labels: words(order) })

/** The slowest of several SNR values, each the median of its runs: rates cost most where neighbours overlap a little. */
function slowest(constellation: Constellation): number {
  return Math.max(...[0, 10, 20, 25, 30, 40].map(db => median(constellation.meanEnergy / fromDecibels(db), constellation)))
}

/** Median time of both rates, of at least three runs, of more while they are short. */
function median(n0: number, constellation: Constellation): number {
  const times: number[] = []
  const begin = performance.now()
  while (times.length < 3 || (times.length < 25 && performance.now() - begin < 200)) {
    const start = performance.now()
    mutualInformation(constellation, n0)
    bitMetricRate(constellation, n0)
    times.push(performance.now() - start)
  }
  return times.sort((a, b) => a - b)[times.length >> 1]!
}

const sets: { what: string, constellation: () => Constellation, target: number | null }[] = [
  { what: '256-QAM', constellation: rectangular, target: 5 },
  { what: '64 random points', constellation: () => random(64), target: 100 },
  { what: '256 random points', constellation: () => random(256), target: 1000 },
  { what: '4096 random points', constellation: () => random(4096), target: null },
]

/** M points in a cube of four dimensions, whose rates are simulated. */
function fourDimensional(order: number): Constellation {
  const flat = randomPoints(2 * order)
  return createConstellation(Array.from({ length: order }, (_, i) => [...flat[2 * i]!, ...flat[2 * i + 1]!]), { labels: words(order) })
}

/** Both rate thresholds at code rate 3/4. */
function thresholds(constellation: Constellation): number {
  const start = performance.now()
  for (const kind of ['mutualInformation', 'bitMetricRate'] as const) rateThresholdDb(constellation, kind, 0.75 * constellation.entropy)
  return performance.now() - start
}

const searched: typeof sets = [
  { what: '256-QAM', constellation: rectangular, target: null },
  { what: '256 random points', constellation: () => random(256), target: null },
  { what: '256 random points in four dimensions, simulated', constellation: () => fourDimensional(256), target: null },
]

const measure: Measure = {
  title: 'information rates in one thread',
  needs: 'core',
  run: async () => {
    slowest(random(64))
    return [
      ...sets.map(({ what, constellation, target }): Row => (
        { what: `${what}: mutual information and bit-metric rate at the slowest of six SNR values`, figure: slowest(constellation()), unit: 'ms', target })),
      ...searched.map(({ what, constellation, target }): Row => (
        { what: `${what}: both rate thresholds at code rate 3/4`, figure: thresholds(constellation()), unit: 'ms', target })),
    ]
  },
}
export default measure
