import { ModulationError } from './errors'

/** Limits of the model: methods §12. */
export const maximalOrder = 4096
export const maximalDimensions = 8

/** Fourth powers of coordinates decide the geometry: they must neither overflow nor vanish. */
const largestCoordinate = 1e60
const leastLargest = 1e-60

/** Two points closer than this part of the largest |s| are the same point: methods §0. */
const coincidence = 1e-9

/**
 * Checks number, length and finiteness of points.
 * @returns the dimension N
 */
export function checkPoints(points: readonly ArrayLike<number>[]): number {
  if (!Array.isArray(points) || points.length < 2 || points.length > maximalOrder) {
    throw new ModulationError('A constellation has 2 to 4096 points.', ['points'])
  }
  const dimensions = points[0]!.length
  if (!(dimensions >= 1 && dimensions <= maximalDimensions)) {
    throw new ModulationError('A point has 1 to 8 coordinates.', ['points', 0])
  }
  points.forEach((point, i) => {
    if (point.length !== dimensions) {
      throw new ModulationError(`All points have the same number of coordinates: point ${i + 1} has ${point.length}, the first ${dimensions}.`, ['points', i])
    }
    for (let n = 0; n < dimensions; n++) {
      if (!(Math.abs(point[n]!) <= largestCoordinate)) throw new ModulationError('A coordinate is a number from −1e60 to 1e60.', ['points', i, n])
    }
  })
  return dimensions
}

/**
 * Refuses coincident points. Points that coincide also have close projections on any one direction, so that
 * after sorting along a direction in general position only a short window need be searched.
 */
export function checkDistinct(points: Float64Array, dimensions: number): void {
  const order = points.length / dimensions
  const projections = new Float64Array(order)
  let largest = 0
  for (let i = 0; i < order; i++) {
    let energy = 0
    let projection = 0
    for (let n = 0; n < dimensions; n++) {
      const x = points[i * dimensions + n]!
      energy += x * x
      projection += x * direction[n]!
    }
    projections[i] = projection
    largest = Math.max(largest, energy)
  }
  if (largest === 0) throw new ModulationError('The points are not all at the origin: the mean energy is above 0.', ['points'])
  if (Math.sqrt(largest) < leastLargest) throw new ModulationError('The largest point is at least 1e-60 from the origin.', ['points'])
  const radius = coincidence * Math.sqrt(largest)
  // |direction| = 1, so a projection differs by no more than the points do; the rest is rounding.
  const window = radius * (1 + 1e-5)
  const sorted = Uint32Array.from(projections.keys()).sort((a, b) => projections[a]! - projections[b]!)
  for (let a = 0; a < order; a++) {
    const i = sorted[a]!
    for (let b = a + 1; b < order && projections[sorted[b]!]! - projections[i]! <= window; b++) {
      const j = sorted[b]!
      let square = 0
      for (let n = 0; n < dimensions; n++) square += (points[i * dimensions + n]! - points[j * dimensions + n]!) ** 2
      if (Math.sqrt(square) < radius) {
        const [first, second] = [Math.min(i, j), Math.max(i, j)]
        throw new ModulationError(`All points are different: points ${first + 1} and ${second + 1} coincide.`, ['points', second])
      }
    }
  }
}

/** A unit vector with no simple ratio between any two coordinates. */
const direction = (() => {
  const raw = [1, Math.SQRT2 - 0.7, Math.E / 3, Math.PI / 4, Math.LN2 + 0.1, Math.sqrt(3) / 5, Math.sqrt(5) / 4, Math.sqrt(7) / 6]
  const length = Math.hypot(...raw)
  return raw.map(x => x / length)
})()

/** Checks that probabilities are M positive numbers of sum 1. */
export function checkProbabilities(probabilities: ArrayLike<number>, order: number): void {
  if (probabilities.length !== order) {
    throw new ModulationError(`Probabilities are as many as points: ${order}.`, ['probabilities'])
  }
  let sum = 0
  for (let i = 0; i < order; i++) {
    const p = probabilities[i]!
    if (!(p > 0 && p < 1)) throw new ModulationError('A probability is above 0 and below 1.', ['probabilities', i])
    sum += p
  }
  if (Math.abs(sum - 1) > 1e-9) throw new ModulationError('The probabilities have the sum 1, within 1e-9.', ['probabilities'])
}

/** Checks that labels are M different words of k = log2 M bits. */
export function checkLabels(labels: readonly string[], order: number): void {
  const bits = Math.log2(order)
  if (!Number.isInteger(bits)) throw new ModulationError('Labels need a power of two of points.', ['labels'])
  if (labels.length !== order) throw new ModulationError(`Labels are as many as points: ${order}.`, ['labels'])
  const seen = new Map<string, number>()
  labels.forEach((label, i) => {
    if (label.length !== bits || !/^[01]+$/.test(label)) {
      throw new ModulationError(`A label is a word of ${bits} bits 0 or 1.`, ['labels', i])
    }
    const first = seen.get(label)
    if (first !== undefined) {
      throw new ModulationError(`All labels are different: points ${first + 1} and ${i + 1} have the same one.`, ['labels', i])
    }
    seen.set(label, i)
  })
}
