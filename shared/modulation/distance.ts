import type { Constellation } from './constellation'

/**
 * Minimum distance in any number of dimensions: points sorted along one coordinate, each compared with those
 * that are no farther along it than the best so far.
 * @returns d_min, signal units
 */
export function minimumDistanceOf({ points, dimensions, order }: Constellation): number {
  const sorted = Uint32Array.from({ length: order }, (_, i) => i * dimensions).sort((a, b) => points[a]! - points[b]!)
  let least = Infinity
  for (let m = 0; m < order; m++) {
    const a = sorted[m]!
    for (let n = m + 1; n < order; n++) {
      const b = sorted[n]!
      if ((points[b]! - points[a]!) ** 2 > least) break
      let square = 0
      for (let c = 0; c < dimensions; c++) square += (points[a + c]! - points[b + c]!) ** 2
      least = Math.min(least, square)
    }
  }
  return Math.sqrt(least)
}
