import type { SeenBits } from './bit-error-plane'
import { q } from './gaussian'
import type { Geometry } from './geometry'
import { onesIn } from './labels/words'

/**
 * As addPlaneBits, for points on a line: noise that passes a threshold outwards loses the wrong bits of the cell before it and takes up
 * those of the cell behind it.
 * @see methods §3
 */
export function addLineBits({ constellation: { points, order } }: Geometry, { words, p, densities, reach, sums }: SeenBits): void {
  const rising = Int32Array.from({ length: order }, (_, i) => i).sort((i, j) => points[i]! - points[j]!)
  const farthest = reach.length > 0 ? reach[0]! : 0
  for (let n = 0; n < order; n++) {
    for (const step of [-1, 1]) {
      for (let m = n; m + step >= 0 && m + step < order; m += step) {
        const [i, before, behind] = [rising[n]!, rising[m]!, rising[m + step]!]
        const distance = Math.abs((points[before]! - points[i]!) + (points[behind]! - points[before]!) / 2)
        if (distance * distance > farthest) break
        const bits = onesIn[words[i]! ^ words[behind]!]! - onesIn[words[i]! ^ words[before]!]!
        if (bits === 0) continue
        for (let s = 0; s < densities.length && distance * distance <= reach[s]!; s++) {
          sums[s]! += p[i]! * bits * q(distance * Math.sqrt(2 / densities[s]!))
        }
      }
    }
  }
}
