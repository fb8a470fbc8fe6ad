import { checkDistinct, checkLabels, checkPoints, checkProbabilities } from './constellation-checks'
import { decibels } from './decibels'
import { ModulationError } from './errors'

/** M signal points in N real dimensions with what follows from them alone. Signal units throughout. */
export interface Constellation {
  /** number of points M */
  order: number
  /** real coordinates of a point, N */
  dimensions: number
  /** M·N coordinates, point after point */
  points: Float64Array
  /** M probabilities, or null: all 1/M */
  probabilities: Float64Array | null
  /** M words of k bits, most significant first, or null */
  labels: string[] | null
  /** Es = Σ p_i·|s_i|² about the origin, signal units squared */
  meanEnergy: number
  /** Epk = max |s_i|², signal units squared */
  peakEnergy: number
  /** k = log2 M */
  bitsPerSymbol: number
  /** H = −Σ p_i·log2 p_i, bit per symbol */
  entropy: number
}

/** What a constellation may have beside its points. */
export interface ConstellationOptions {
  probabilities?: ArrayLike<number> | null
  labels?: readonly string[] | null
}

/**
 * Builds a constellation from points as given: nothing is moved or rescaled.
 * @param points 2 to 4096 points of 1 to 8 finite coordinates, in signal units
 * @param options probabilities (positive, sum 1 within 1e-9) and labels (k-bit words, all different; M a power of two)
 * @throws ModulationError naming the offending field; coincident points are named both, counted from 1
 * @see methods §0
 */
export function createConstellation(points: readonly ArrayLike<number>[], options: ConstellationOptions = {}): Constellation {
  const dimensions = checkPoints(points)
  const order = points.length
  const coordinates = new Float64Array(order * dimensions)
  points.forEach((point, i) => {
    for (let n = 0; n < dimensions; n++) coordinates[i * dimensions + n] = point[n]!
  })
  checkDistinct(coordinates, dimensions)
  if (options.probabilities) checkProbabilities(options.probabilities, order)
  if (options.labels) checkLabels(options.labels, order)
  const probabilities = options.probabilities ? Float64Array.from(options.probabilities) : null
  return describe(coordinates, dimensions, probabilities, options.labels ? [...options.labels] : null)
}

/**
 * The same constellation with every coordinate multiplied by a factor.
 * @param factor above 0
 */
export function scaled(constellation: Constellation, factor: number): Constellation {
  const { points, dimensions, probabilities, labels } = constellation
  return describe(points.map(x => x * factor), dimensions, probabilities, labels)
}

/** Probability of point i. */
export function probabilityOf(constellation: Constellation, i: number): number {
  return constellation.probabilities ? constellation.probabilities[i]! : 1 / constellation.order
}

/** Peak-to-average power ratio of the points alone, 10·log10(Epk/Es) in dB. */
export function paprDb(constellation: Constellation): number {
  return decibels(constellation.peakEnergy / constellation.meanEnergy)
}

function describe(
  points: Float64Array, dimensions: number, probabilities: Float64Array | null, labels: string[] | null,
): Constellation {
  const order = points.length / dimensions
  const bitsPerSymbol = Math.log2(order)
  let meanEnergy = 0
  let peakEnergy = 0
  let entropy = probabilities ? 0 : bitsPerSymbol
  for (let i = 0; i < order; i++) {
    let energy = 0
    for (let n = 0; n < dimensions; n++) energy += points[i * dimensions + n]! ** 2
    const p = probabilities ? probabilities[i]! : 1 / order
    meanEnergy += p * energy
    peakEnergy = Math.max(peakEnergy, energy)
    if (probabilities) entropy -= p * Math.log2(p)
  }
  if (!(meanEnergy > 0 && peakEnergy < Infinity)) {
    throw new ModulationError('The mean energy of the points is a finite number above 0.', ['points'])
  }
  return { order, dimensions, points, probabilities, labels, meanEnergy, peakEnergy, bitsPerSymbol, entropy }
}
