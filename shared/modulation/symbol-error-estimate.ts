import type { Estimate } from './estimate'
import { requireNoiseDensity } from './errors'
import type { Geometry } from './geometry'
import { requiredEsN0Db } from './required-snr'
import { directionalEstimate } from './symbol-error-directional'
import type { DirectionalEffort } from './symbol-error-directional'
import { hasExactRate, serExactCurve } from './symbol-error-exact'

/** Estimates of the constellation asked for last: its directions serve every N0. */
let last: { geometry: Geometry, seed: number, directions: number | undefined, estimate: ReturnType<typeof directionalEstimate> } | null = null

function estimateOf(geometry: Geometry, { seed = 1, directions }: DirectionalEffort) {
  if (last?.geometry !== geometry || last.seed !== seed || last.directions !== directions) {
    last = { geometry, seed, directions, estimate: directionalEstimate(geometry, { seed, directions }) }
  }
  return last.estimate
}

/**
 * Mean symbol error rates of minimum-distance decisions in any dimension.
 * @param geometry decision regions, from analyse
 * @param n0s noise densities N0 above 0, signal units squared
 * @returns numbers where an exact rate is known, else intervals of 95 % between the lower and the union bound
 * @throws ModulationError when a density is not positive and finite
 * @see methods §2; serExactCurve, directionalEstimate
 */
export function symbolErrorRateCurve(geometry: Geometry, n0s: ArrayLike<number>, effort: DirectionalEffort = {}): Estimate[] {
  if (hasExactRate(geometry)) return [...serExactCurve(geometry, n0s)]
  return Array.from(n0s, (n0) => {
    requireNoiseDensity(n0)
    return estimateOf(geometry, effort)(n0)
  })
}

/** The same at one noise density. */
export function symbolErrorRate(geometry: Geometry, n0: number, effort: DirectionalEffort = {}): Estimate {
  return symbolErrorRateCurve(geometry, [n0], effort)[0]!
}

/**
 * The smallest Es/N0 above which the symbol error rate stays at or below a target.
 * @param target above 0 and below 1
 * @returns Es/N0 in dB: a number where the exact rate is known, else what the interval's middle and ends need
 * @throws ModulationError with path ['target'] as requiredEsN0Db
 * @see methods §2, §4
 */
export function requiredEsN0Estimate(geometry: Geometry, target: number, effort: DirectionalEffort = {}): Estimate {
  if (hasExactRate(geometry)) return requiredEsN0Db({ geometry, kind: 'serExact' }, target)
  const estimate = estimateOf(geometry, effort)
  const { meanEnergy } = geometry.constellation
  const needed = (end: 'value' | 'low' | 'high') => requiredEsN0Db({ rate: n0 => estimate(n0)[end], meanEnergy, monotone: true }, target)
  const [value, low, high] = [needed('value'), needed('low'), needed('high')]
  return { value, low: Math.min(low, value), high: Math.max(high, value) }
}
