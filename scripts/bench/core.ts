import { analyse, createConstellation, directionalEstimate, evaluate, generate, requiredEsN0Db, serExactCurve } from '../../shared/modulation/index'
import type { EvaluationRequest } from '../../shared/modulation/index'
import { fromDecibels } from '../../shared/modulation/decibels'
import type { Measure } from './measure'

/* Measurements of the numerical core alone, in one thread. Run: npm run bench -- core */

/** One line of the table. */
export interface Measurement {
  what: string
  milliseconds: number
  limit: number | null
}

/** 0, 1, … 40 dB. */
const esN0Db = Array.from({ length: 41 }, (_, n) => n)

/** 1,000 different rows of mixed families, M from 2 to 256, as a sweep makes them. */
export function mixedSweep(): EvaluationRequest['constellation'][] {
  const rows: EvaluationRequest['constellation'][] = []
  for (let order = 2; order <= 256; order++) rows.push({ family: 'psk', order })
  for (let order = 2; order <= 256; order += 4) rows.push({ family: 'pam', order }, { family: 'hexagonal', order })
  for (const order of [4, 8, 16, 32, 64, 128, 256]) rows.push({ family: 'qam', order })
  for (const order of [32, 128]) rows.push({ family: 'cross-qam', order })
  for (let n = 0; rows.length < 1000; n++) {
    const ratio = 1.8 + n / 300
    const rings = [[4, 12], [5, 11], [1, 5, 10], [4, 12, 16], [8, 16, 20, 20], [16, 48, 64, 128]][n % 6]!
    const ratios = Array.from({ length: rings.length - (rings[0] === 1 ? 2 : 1) }, (_, q) => ratio * (1 + 0.7 * q))
    rows.push({ family: 'apsk', rings, ratios })
  }
  return rows
}

/** Geometry, three curves of 41 values and three required Es/N0 for each row. */
export function measureSweep(): Measurement {
  const rows = mixedSweep()
  const start = performance.now()
  for (const constellation of rows) {
    evaluate({ constellation, esN0Db, target: { quantity: 'ser', value: 1e-6 } })
  }
  return { what: '1,000-row sweep, M 2 to 256, core alone', milliseconds: performance.now() - start, limit: 1500 }
}

/** M points uniform in a square or a cube of more dimensions, from a fixed seed (a linear congruential generator is random enough to place points). */
export function randomPoints(order: number, dimensions = 2): number[][] {
  let state = 12345
  const next = () => {
    state = (state * 1103515245 + 12345) % 2147483648
    return state / 1073741824 - 1
  }
  return Array.from({ length: order }, () => Array.from({ length: dimensions }, next))
}

/** Geometry and exact SER at 41 SNR values of random points. */
export function measureRandom(order: number): Measurement {
  const points = randomPoints(order)
  const start = performance.now()
  const constellation = createConstellation(points)
  const geometry = analyse(constellation)
  serExactCurve(geometry, esN0Db.map(db => constellation.meanEnergy / fromDecibels(db + 10)))
  return { what: `M = ${order} random points, geometry and exact SER at 41 values`, milliseconds: performance.now() - start, limit: order === 4096 ? 400 : null }
}

/** Geometry and required Es/N0 of the largest regular sets, whose ties the triangulation decides exactly. */
export function measureRegular(family: 'qam' | 'psk' | 'hexagonal'): Measurement {
  const start = performance.now()
  const geometry = analyse(generate(family, { order: 4096 }))
  requiredEsN0Db({ geometry, kind: 'serExact' }, 1e-6)
  return { what: `${family} of 4096 points, generated, geometry and required Es/N0`, milliseconds: performance.now() - start, limit: null }
}

/** Relevant neighbours of random points in 4 dimensions, by linear programmes, and one error rate from 100,000 directions. */
export function measureSpace(order: number): Measurement[] {
  const constellation = createConstellation(randomPoints(order, 4))
  const start = performance.now()
  const geometry = analyse(constellation)
  const analysed = performance.now()
  directionalEstimate(geometry)(constellation.meanEnergy / fromDecibels(20))
  return [
    { what: `M = ${order} random points in 4 dimensions, geometry`, milliseconds: analysed - start, limit: 5000 },
    { what: `M = ${order} random points in 4 dimensions, directional estimate and lower bound`, milliseconds: performance.now() - analysed, limit: null },
  ]
}

/** All measurements; the first sweep only warms the compiler up. */
export function measureCore(): Measurement[] {
  measureSweep()
  return [
    measureSweep(),
    ...[256, 1024, 4096].map(measureRandom),
    ...(['qam', 'psk', 'hexagonal'] as const).map(measureRegular),
    ...measureSpace(256),
  ]
}

const measure: Measure = {
  title: 'the numerical core in one thread',
  needs: 'core',
  run: async () => measureCore().map(({ what, milliseconds, limit }) => ({ what, figure: milliseconds, unit: 'ms', target: limit })),
}
export default measure
