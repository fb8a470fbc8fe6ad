import type { Constellation } from './constellation'
import { ModulationError, requireNoiseDensity } from './errors'
import type { Estimate } from './estimate'
import { highOf, isInterval, lowOf, valueOf } from './estimate'
import { planeEquivocation } from './information-plane'
import type { InformationSource } from './information-source'
import { informationSources } from './information-source'
import { simulatedEquivocation } from './information-simulated'
import type { InformationSimulation } from './information-simulated'

/** The ways to an information rate, by the names of the evaluation's quantities. */
export const informationRates = { mutualInformation, bitMetricRate } as const

export type InformationRateKind = keyof typeof informationRates

/**
 * Mutual information I(X;Y) of the constellation's own probabilities with white Gaussian noise.
 * @param n0 noise density N0 > 0, signal units squared
 * @param simulation seed and effort, for sets that are no product of parts in 1 or 2 dimensions
 * @returns bit per symbol, from 0 to H: a number to better than 1e-6 bit for N ≤ 2 and products of such, else an interval of 95 %
 * @see methods §5; Shannon 1948; Ungerboeck 1982
 */
export function mutualInformation(constellation: Constellation, n0: number, simulation?: InformationSimulation): Estimate {
  return ratesOf(constellation, 'mutualInformation', [n0], simulation)[0]!
}

/**
 * Bit-metric rate [H − Σ_b H(B_b|Y)]⁺: what a decoder that is told of each bit alone can reach; Σ_b I(B_b;Y) for equal probabilities.
 * @param n0 noise density N0 > 0, signal units squared
 * @param simulation seed and effort, for sets that are no product of parts in 1 or 2 dimensions
 * @returns bit per symbol, from 0 to the mutual information, as exact as that
 * @throws ModulationError with path ['labels'] when there are none
 * @see methods §5; Caire, Taricco and Biglieri 1998; Böcherer 2015
 */
export function bitMetricRate(constellation: Constellation, n0: number, simulation?: InformationSimulation): Estimate {
  return ratesOf(constellation, 'bitMetricRate', [n0], simulation)[0]!
}

/** Rates at several noise densities, in bit per symbol; bitMetricRate is null without labels. */
export interface RateCurves { mutualInformation: Estimate[], bitMetricRate: Estimate[] | null }

/**
 * Both rates at several noise densities.
 * @param n0s noise densities, each > 0, signal units squared
 * @see mutualInformation, bitMetricRate
 */
export function rateCurves(constellation: Constellation, n0s: ArrayLike<number>, simulation?: InformationSimulation): RateCurves {
  return {
    mutualInformation: ratesOf(constellation, 'mutualInformation', n0s, simulation),
    bitMetricRate: constellation.labels ? ratesOf(constellation, 'bitMetricRate', n0s, simulation) : null,
  }
}

/**
 * One of the rates at several noise densities, in bit per symbol.
 * @see mutualInformation, bitMetricRate
 */
export function ratesOf(
  constellation: Constellation, kind: InformationRateKind, n0s: ArrayLike<number>, simulation: InformationSimulation = {},
): Estimate[] {
  const withBits = kind === 'bitMetricRate'
  if (withBits && !constellation.labels) {
    throw new ModulationError('A bit-metric rate needs labels: give each point its word of bits, or use the mutual information.', ['labels'])
  }
  const sources = informationSources(constellation, withBits)
  return Array.from(n0s, (n0) => {
    requireNoiseDensity(n0)
    return remaining(constellation.entropy, sources.map(source => equivocation(source, n0, withBits, simulation)))
  })
}

function equivocation(source: InformationSource, n0: number, withBits: boolean, simulation: InformationSimulation): Estimate {
  const { symbol, bits } = source.dimensions <= 2 ? planeEquivocation(source, n0) : simulatedEquivocation(source, n0, simulation)
  return withBits ? bits : symbol
}

/** What is left of an entropy; the ends of intervals add up as if they erred together, which is on the safe side. */
function remaining(entropy: number, lost: Estimate[]): Estimate {
  const left = (part: (estimate: Estimate) => number) => Math.min(entropy, Math.max(0, entropy - lost.reduce<number>((sum, e) => sum + part(e), 0)))
  return lost.some(isInterval) ? { value: left(valueOf), low: left(highOf), high: left(lowOf) } : left(valueOf)
}
