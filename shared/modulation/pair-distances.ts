import type { Constellation } from './constellation'
import { minimumDistanceOf } from './distance'
import { onesIn } from './labels/words'

/** Squared distances of all pairs of points, in no order, with what the pairs of each weigh: Σ (p_i + p_j), times the wrong bits of the two where labels count. */
export interface PairDistances {
  /** d_min² */
  least: number
  square: Float64Array
  weight: Float64Array
}

/** Up to so many pairs each stands for itself: putting them together would take longer than a few error rates. */
const fewPairs = 2 ** 17

/**
 * Squared distances with the same binary exponent and the same leading bits of the mantissa share a bin. Within a bin exp(−s/(4·N0)) bends
 * so little that two points with the right moments stand for all of it: down to error rates of 1e-30 their sum is off by
 * less than (75·2^−13)⁴/384 = 2e-11 of itself.
 */
const binBits = 13
const shift = 20 - binBits
/** The bits of a double's upper word that tell the place in a bin, and half a bin in units of the lower word's last bit. */
const rest = (1 << shift) - 1
const halfBin = 2 ** (31 + shift)
const lowerWord = 2 ** 32
/** Variance in a bin, in squares of its half width, below which its distances are one. */
const sameDistance = 1e-9

/**
 * Distances of all pairs of points. Of many pairs, in any number of dimensions, near ones are put together: they become one distance
 * where they repeat, as in a grid, and at most two a bin where they do not.
 * @param constellation M points
 * @param labels as numbers, where wrong bits weigh
 * @see Golub and Welsch 1969: two nodes carry the moments up to the third
 */
export function pairDistancesOf(constellation: Constellation, labels: Uint16Array | null = null): PairDistances {
  const least = minimumDistanceOf(constellation) ** 2
  const pairs = constellation.order * (constellation.order - 1) / 2
  return { least, ...(pairs <= fewPairs ? listed(constellation, labels, pairs) : together(binned(constellation, labels, least))) }
}

function listed({ order, dimensions, points, probabilities }: Constellation, labels: Uint16Array | null, pairs: number) {
  const square = new Float64Array(pairs)
  const weight = new Float64Array(pairs)
  let at = 0
  for (let i = 1; i < order; i++) {
    for (let j = 0; j < i; j++) {
      square[at] = squareOf(points, i * dimensions, j * dimensions, dimensions)
      const bits = labels ? onesIn[labels[i]! ^ labels[j]!]! : 1
      weight[at++] = bits * (probabilities ? probabilities[i]! + probabilities[j]! : 2 / order)
    }
  }
  return { square, weight }
}

function squareOf(points: Float64Array, a: number, b: number, dimensions: number): number {
  let sum = 0
  for (let n = 0; n < dimensions; n++) {
    const apart = points[a + n]! - points[b + n]!
    sum += apart * apart
  }
  return sum
}

const words = new Uint32Array(2)
const double = new Float64Array(words.buffer)
/** Place of a double's upper word on this machine. */
const upper = (double[0] = 1, words[1] === 0 ? 0 : 1)

/** Smallest number of a bin. */
const beginningOf = (bin: number): number => {
  words[upper] = bin << shift
  words[1 - upper] = 0
  return double[0]!
}

/** The bin of a squared distance. */
const binOf = (square: number): number => {
  double[0] = square
  return words[upper]! >>> shift
}

/** By bin from the first on, four each: Σ w·uⁿ for n = 0 … 3, u from −1 to 1 across the bin. */
interface Bins { first: number, moments: Float64Array }

function binned({ order, dimensions, points, peakEnergy, ...constellation }: Constellation, labels: Uint16Array | null, least: number): Bins {
  const first = binOf(least) - 1
  const moments = new Float64Array(4 * (binOf(4 * peakEnergy) + 2 - first))
  const p = constellation.probabilities ?? new Float64Array(order).fill(1 / order)
  for (let i = 1; i < order; i++) {
    for (let j = 0; j < i; j++) {
      const at = 4 * (binOf(squareOf(points, i * dimensions, j * dimensions, dimensions)) - first)
      // How far into the bin: the mantissa's other bits.
      const u = ((words[upper]! & rest) * lowerWord + words[1 - upper]!) / halfBin - 1
      const weight = (p[i]! + p[j]!) * (labels ? onesIn[labels[i]! ^ labels[j]!]! : 1)
      moments[at]! += weight
      moments[at + 1]! += weight * u
      moments[at + 2]! += weight * u * u
      moments[at + 3]! += weight * u * u * u
    }
  }
  return { first, moments }
}

function together({ first, moments }: Bins) {
  const square: number[] = []
  const weights: number[] = []
  for (let at = 0; at < moments.length; at += 4) {
    if (moments[at] === 0) continue
    const [low, high] = [beginningOf(first + at / 4), beginningOf(first + at / 4 + 1)]
    for (const { u, weight } of nodesOf(moments, at)) {
      square.push((low + high + u * (high - low)) / 2)
      weights.push(weight)
    }
  }
  return { square: Float64Array.from(square), weight: Float64Array.from(weights) }
}

/** Places from −1 to 1 and weights that have a bin's moments. */
function nodesOf(moments: Float64Array, at: number): { u: number, weight: number }[] {
  const weight = moments[at]!
  const [mean, second, third] = [moments[at + 1]! / weight, moments[at + 2]! / weight, moments[at + 3]! / weight]
  const variance = second - mean * mean
  if (!(variance > sameDistance)) return [{ u: mean, weight }]
  const skew = (third - 3 * mean * variance - mean ** 3) / variance
  const root = Math.sqrt(skew * skew / 4 + variance)
  const [left, right] = [skew / 2 - root, skew / 2 + root]
  return [{ u: mean + left, weight: weight * right / (right - left) }, { u: mean + right, weight: weight * -left / (right - left) }]
}
