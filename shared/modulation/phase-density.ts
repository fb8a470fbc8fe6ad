import { ModulationError } from './errors'
import type { Geometry } from './geometry'
import { q } from './gaussian'

/** The farthest that a normal angle is followed, in σ: what lies beyond has a probability below 1e-300. */
const farthest = 38

/** Where the range of integration ends at first, in σ, and where it ends when the rate is so small that the rest could matter. */
const spans: readonly number[] = [10, 14, 20, farthest]

/** Half of the range, in σ: 6e-7 of all angles are outside it. */
export const coreSpan = 5

/**
 * Refuses what a phase error means nothing for.
 * @throws ModulationError with path ['dimensions'] unless there are two, ['sigmaRad'] when σ is not a finite angle of 0 or more
 */
export function requirePhaseError({ constellation }: Geometry, sigma: number): void {
  if (constellation.dimensions !== 2) {
    throw new ModulationError('A carrier phase error turns points of two dimensions: set it to 0 for other constellations.', ['dimensions'])
  }
  if (!(sigma >= 0 && sigma < Infinity)) throw new ModulationError('The r.m.s. phase error is a finite angle of 0 or more.', ['sigmaRad'])
}

/** Density of a normal angle of standard deviation σ, whole turns folded together. */
export function phaseDensity(sigma: number): (phi: number) => number {
  const turns = turnsOf(sigma)
  const scale = 1 / (sigma * Math.sqrt(2 * Math.PI))
  return (phi) => {
    let sum = 0
    for (let k = -turns; k <= turns; k++) {
      const x = (phi + 2 * Math.PI * k) / sigma
      sum += Math.exp(-x * x / 2)
    }
    return sum * scale
  }
}

/** Probability that the angle lies between two places of one turn, −π ≤ from ≤ to ≤ π. */
export function phaseMass(sigma: number, from: number, to: number): number {
  const turns = turnsOf(sigma)
  let sum = 0
  for (let k = -turns; k <= turns; k++) {
    const [x, y] = [(from + 2 * Math.PI * k) / sigma, (to + 2 * Math.PI * k) / sigma]
    sum += x >= 0 ? q(x) - q(y) : y <= 0 ? q(-y) - q(-x) : 1 - q(-x) - q(y)
  }
  return sum
}

/**
 * Mean over the angle, over as wide a range as matters: ±10·σ, and more where the mean is so small that what lies beyond could change it.
 * @param integrate integral of what is averaged times the density over ±limit
 * @param negligible part of the mean that may be left out
 */
export function overPhase(sigma: number, negligible: number, integrate: (limit: number) => number): number {
  let mean = 0
  for (const span of spans) {
    mean = integrate(Math.min(span * sigma, Math.PI))
    if (span * sigma >= Math.PI || 2 * q(span) <= negligible * mean) break
  }
  return mean
}

function turnsOf(sigma: number): number {
  return Math.floor((farthest * sigma + Math.PI) / (2 * Math.PI))
}
