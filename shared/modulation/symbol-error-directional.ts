import { probabilityOf } from './constellation'
import { halfWidth } from './estimate'
import type { Estimate } from './estimate'
import { q } from './gaussian'
import type { Geometry } from './geometry'
import { seededRandom } from './random'
import { serLowerBound } from './symbol-error-lower'
import { serUnionBound } from './symbol-error-bounds'

/** How much is simulated, and from which seed. */
export interface DirectionalEffort {
  /** any integer; default 1 */
  seed?: number
  /** random directions; default 100,000 */
  directions?: number
}

const defaultDirections = 1e5
/** Directions that must count for the mean before its standard error is believed; with fewer the bounds are the interval. */
const fewest = 200
/** Pairs of neighbours whose joint probability the lower bound computes at most, a rate. */
const mostPairs = 2e4
const [fewestNeighbours, mostNeighbours] = [6, 64]
/** Exponents from here on add nothing. */
const negligibleExponent = 745

/**
 * Directional estimate of the mean symbol error rate, cut to the lower and the union bound: the mean over random directions u of the
 * probability that noise in that direction leads out of the cell, Γ(N/2, ρ(u)²/N0)/Γ(N/2), ρ the distance to the cell's boundary.
 * The same directions serve every N0, so that the estimate falls with the SNR as the rate does.
 * @param geometry decision regions of any dimension, from analyse
 * @returns the estimate as a function of N0 (above 0, signal units squared): value within an interval of 95 %
 * @see methods §2
 */
export function directionalEstimate(geometry: Geometry, effort: DirectionalEffort = {}): (n0: number) => Exclude<Estimate, number> {
  const { seed = 1, directions = defaultDirections } = effort
  const squares = boundarySquares(geometry, seed, directions)
  const { constellation: { order, dimensions } } = geometry
  const neighbours = Math.round(Math.min(mostNeighbours, Math.max(fewestNeighbours, Math.sqrt(2 * mostPairs / order))))
  return (n0) => {
    const upper = Math.min(1, serUnionBound(geometry, n0))
    const lower = Math.min(upper, serLowerBound(geometry, n0, { neighbours }))
    const { mean, error, counted } = meanBeyond(squares, dimensions, n0)
    const within = (x: number) => Math.min(upper, Math.max(lower, x))
    if (counted < fewest) return { value: within(mean), low: lower, high: upper }
    return { value: within(mean), low: within(mean - halfWidth * error), high: within(mean + halfWidth * error) }
  }
}

/** Mean and standard error over directions, and how many equal ones would scatter as much. */
function meanBeyond(squares: Float64Array, dimensions: number, n0: number): { mean: number, error: number, counted: number } {
  let [sum, sumOfSquares] = [0, 0]
  for (const square of squares) {
    // Rising: what follows is farther away.
    if (square > negligibleExponent * n0) break
    const beyond = radialTail(dimensions, square / n0)
    sum += beyond
    sumOfSquares += beyond * beyond
  }
  const count = squares.length
  const mean = sum / count
  const variance = Math.max(0, sumOfSquares / count - mean * mean)
  return { mean, error: Math.sqrt(variance / (count - 1)), counted: sumOfSquares > 0 ? sum / sumOfSquares * sum : 0 }
}

/** Γ(N/2, x)/Γ(N/2): the probability that the noise's energy is above x·N0. */
export function radialTail(dimensions: number, x: number): number {
  const odd = dimensions % 2 === 1
  let term = odd ? 2 * Math.exp(-x) * Math.sqrt(x / Math.PI) : Math.exp(-x)
  let sum = odd ? 2 * q(Math.sqrt(2 * x)) : 0
  for (let a = odd ? 1.5 : 1; a <= dimensions / 2; a++) {
    sum += term
    term *= x / a
  }
  return sum
}

/** Squared distances to the cell's boundary in random directions, rising; points in proportion to their probabilities, by strata. */
function boundarySquares({ constellation, offsets, neighbours, distances }: Geometry, seed: number, count: number): Float64Array {
  const { points, dimensions, order } = constellation
  const random = seededRandom(seed)
  const squares = new Float64Array(count)
  const direction = new Float64Array(dimensions)
  let i = 0
  let upTo = probabilityOf(constellation, 0)
  for (let draw = 0; draw < count; draw++) {
    const position = (draw + random()) / count
    while (position >= upTo && i < order - 1) upTo += probabilityOf(constellation, ++i)
    const length = drawDirection(direction, random)
    // The boundary to j is where u·a_j reaches d_j²/2.
    let nearness = 0
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      const j = neighbours[entry]!
      let along = 0
      for (let n = 0; n < dimensions; n++) along += direction[n]! * (points[j * dimensions + n]! - points[i * dimensions + n]!)
      const square = distances[entry]! * distances[entry]!
      if (along > nearness * square) nearness = along / square
    }
    const distance = length / (2 * nearness)
    squares[draw] = distance * distance
  }
  return squares.sort()
}

/** A vector of independent normal numbers, whose direction is uniform; Box and Muller. Returns its length. */
function drawDirection(direction: Float64Array, random: () => number): number {
  let square = 0
  for (let n = 0; n < direction.length; n += 2) {
    const radius = Math.sqrt(-2 * Math.log(1 - random()))
    const angle = 2 * Math.PI * random()
    direction[n] = radius * Math.cos(angle)
    if (n + 1 < direction.length) direction[n + 1] = radius * Math.sin(angle)
  }
  for (const x of direction) square += x * x
  return Math.sqrt(square)
}
