import type { Constellation } from './constellation'
import { createConstellation } from './constellation'
import { ModulationError } from './errors'

/** Energies that differ by less, relative to the peak energy, are the same. */
const sameEnergy = 1e-9
/** exp(−690): a probability that a double still holds. */
const largestExponent = 690
/** A wanted entropy this close to log2 M, in bit, is log2 M. */
const rounding = 1e-12

/**
 * Maxwell–Boltzmann probabilities p_i ∝ exp(−ν·|s_i|²) of a wanted entropy: of all with that entropy they have the least mean energy.
 * @param entropy H wanted, bit per symbol, up to log2 M, which makes all probabilities equal (ν = 0)
 * @returns M probabilities of sum 1 whose entropy is the wanted one to 1e-12 bit
 * @throws ModulationError with path ['entropy'] that tells what entropies these points can have
 * @see methods §5; Kschischang and Pasupathy, Optimal nonuniform signaling for Gaussian channels, IEEE Trans. Inf. Theory 39 (1993)
 */
export function shapedProbabilities(constellation: Pick<Constellation, 'order' | 'dimensions' | 'points'>, entropy: number): Float64Array {
  const { order } = constellation
  const all = Math.log2(order)
  const { energies, peak } = energiesAboveLeast(constellation)
  const spread = Math.max(...energies)
  if (Math.abs(entropy - all) <= rounding) return new Float64Array(order).fill(1 / order)
  if (spread <= sameEnergy * peak) {
    throw new ModulationError(`All points have the same energy, which leaves nothing to shape: the entropy is ${all.toFixed(3)} bit.`, ['entropy'])
  }
  // In units of the spread: from 0, which is no shaping, to where the highest energy's probability would vanish.
  let [low, high] = [0, largestExponent / spread]
  const least = entropyOf(boltzmann(energies, high))
  if (!(entropy >= least && entropy <= all)) {
    const from = (Math.ceil(least * 1e3) / 1e3).toFixed(3)
    throw new ModulationError(`Shaping gives these points an entropy from ${from} to ${all.toFixed(3)} bit.`, ['entropy'])
  }
  // The entropy falls with ν; halving goes on until doubles end.
  for (;;) {
    const middle = (low + high) / 2
    if (!(middle > low && middle < high)) break
    if (entropyOf(boltzmann(energies, middle)) > entropy) low = middle
    else high = middle
  }
  return boltzmann(energies, high)
}

/**
 * The same points and labels, used with other probabilities. Energies are those of the new probabilities: nothing is rescaled.
 * @param probabilities as many as points, above 0, sum 1 within 1e-9; null: all equal
 * @throws ModulationError with path ['probabilities']
 */
export function withProbabilities(constellation: Constellation, probabilities: ArrayLike<number> | null): Constellation {
  const { order, dimensions, points, labels } = constellation
  const rows = Array.from({ length: order }, (_, i) => points.subarray(i * dimensions, (i + 1) * dimensions))
  return createConstellation(rows, { probabilities, labels })
}

function energiesAboveLeast({ order, dimensions, points }: Pick<Constellation, 'order' | 'dimensions' | 'points'>) {
  const energies = new Float64Array(order)
  for (let i = 0; i < order; i++) {
    for (let n = 0; n < dimensions; n++) energies[i]! += points[i * dimensions + n]! ** 2
  }
  const least = Math.min(...energies)
  return { energies: energies.map(energy => energy - least), peak: Math.max(...energies) }
}

function boltzmann(energies: Float64Array, nu: number): Float64Array {
  const weights = energies.map(energy => Math.exp(-nu * energy))
  const sum = weights.reduce((total, weight) => total + weight, 0)
  return weights.map(weight => weight / sum)
}

function entropyOf(probabilities: Float64Array): number {
  return probabilities.reduce((sum, p) => sum - p * Math.log2(p), 0)
}
