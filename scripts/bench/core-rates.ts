import { bitMetricRate, createConstellation, fromDecibels, generate, mutualInformation } from '../../shared/modulation/index'
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

/** The slowest of several SNR values, each the median of three runs: rates cost most where neighbours overlap a little. */
function slowest(constellation: Constellation): number {
  const times = [0, 10, 20, 25, 30, 40].map((db) => {
    const n0 = constellation.meanEnergy / fromDecibels(db)
    return Array.from({ length: 3 }, () => {
      const start = performance.now()
      mutualInformation(constellation, n0)
      bitMetricRate(constellation, n0)
      return performance.now() - start
    }).sort((a, b) => a - b)[1]!
  })
  return Math.max(...times)
}

const sets: { what: string, constellation: () => Constellation, target: number | null }[] = [
  { what: '256-QAM', constellation: rectangular, target: 5 },
  { what: '64 random points', constellation: () => random(64), target: 100 },
  { what: '256 random points', constellation: () => random(256), target: 1000 },
  { what: '4096 random points', constellation: () => random(4096), target: null },
]

const measure: Measure = {
  title: 'information rates in one thread',
  needs: 'core',
  run: async () => {
    slowest(random(64))
    return sets.map(({ what, constellation, target }): Row => (
      { what: `${what}: mutual information and bit-metric rate at the slowest of six SNR values`, figure: slowest(constellation()), unit: 'ms', target }))
  },
}
export default measure
