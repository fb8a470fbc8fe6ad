import { decibels } from './decibels'
import { ModulationError } from './errors'
import type { Geometry } from './geometry'

/**
 * The largest rotation about the origin for which every point stays in its own cell, without noise.
 * A turned point meets the bisector to a neighbour where the cosine of its angle to the neighbour's direction has grown to the bisector's
 * distance from the origin over the point's. The farthest point always meets one: opposite to itself any other point is nearer.
 * Points of one dimension are turned in the plane of their carrier, of which the receiver takes its one coordinate.
 * @param geometry decision regions, from analyse, of one or two dimensions
 * @returns radians, above 0 and at most π
 * @throws ModulationError with path ['dimensions'] for more dimensions, where a rotation has no single angle
 * @see methods §1
 */
export function largestRotationRad(geometry: Geometry): number {
  const { constellation: { order, dimensions, points }, offsets, neighbours, distances } = geometry
  if (dimensions > 2) throw new ModulationError('The largest rotation is offered for one and two dimensions.', ['dimensions'])
  const x = (i: number) => points[dimensions * i]!
  const y = (i: number) => dimensions === 1 ? 0 : points[2 * i + 1]!
  let least = Math.PI
  for (let i = 0; i < order; i++) {
    const radius = Math.hypot(x(i), y(i))
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      const j = neighbours[entry]!
      const [dx, dy] = [x(j) - x(i), y(j) - y(i)]
      const line = (dx * (x(i) + x(j)) + dy * (y(i) + y(j))) / (2 * distances[entry]!)
      if (radius === 0 || line > radius) continue
      const angle = Math.abs(Math.atan2(x(i) * dy - y(i) * dx, x(i) * dx + y(i) * dy))
      least = Math.min(least, angle - Math.acos(Math.max(-1, line / radius)))
    }
  }
  return least
}

/** A bisector this near to the origin passes through it, and one this near to a point's ray in direction runs beside it: lengths and angles of rounding. */
const rounding = 1e-13

/** Gains between which every point stays in its own cell: factors of the amplitude, 0 ≤ down < 1 < up ≤ ∞. */
export interface GainRange {
  /** least gain, 0 where none is too small */
  down: number
  /** largest gain, Infinity where none is too large */
  up: number
}

/**
 * The gains for which every point stays in its own cell, without noise and with thresholds that do not follow the gain.
 * @param geometry decision regions, from analyse, of any number of dimensions
 * @see methods §1
 */
export function largestGain(geometry: Geometry): GainRange {
  const { constellation: { order, dimensions, points }, offsets, neighbours, distances } = geometry
  let down = 0
  let up = Infinity
  for (let i = 0; i < order; i++) {
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      let along = 0
      let square = 0
      for (let n = 0; n < dimensions; n++) {
        const here = points[dimensions * i + n]!
        along += here * (points[dimensions * neighbours[entry]! + n]! - here)
        square += here * here
      }
      const distance = distances[entry]!
      if (Math.abs(along) <= rounding * Math.sqrt(square) * distance) continue
      // The bisector crosses the ray where the gain times `along` is this.
      const crossing = along + distance * distance / 2
      if (along > 0) up = Math.min(up, crossing / along)
      else if (crossing < -rounding * square) down = Math.max(down, crossing / along)
    }
  }
  return { down, up }
}

/**
 * The largest gain error that every point stands, up or down, whichever is smaller.
 * @param geometry decision regions, from analyse
 * @returns dB above 0; Infinity where no gain leads out of a cell, as for PSK
 */
export function largestGainDb(geometry: Geometry): number {
  const { down, up } = largestGain(geometry)
  return 2 * Math.min(decibels(up), -decibels(down))
}
