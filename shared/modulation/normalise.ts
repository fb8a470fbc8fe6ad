import type { Constellation } from './constellation'
import { scaled } from './constellation'
import { minimumDistanceOf } from './distance'
import { ModulationError } from './errors'

export const normalisations = ['meanEnergy', 'peakEnergy', 'minimumDistance'] as const

/** How a constellation is scaled: unit mean energy, unit peak energy, or a fixed minimum distance, the spacing in signal units. */
export interface Normalisation {
  normalisation: (typeof normalisations)[number]
  /** d_min in signal units, for 'minimumDistance' only */
  spacing?: number | null
}

/**
 * Scales a constellation; it is never shifted.
 * @throws ModulationError for an unknown normalisation, or a spacing that is missing or not above 0
 * @see methods §0
 */
export function normalise(constellation: Constellation, { normalisation, spacing }: Normalisation): Constellation {
  if (normalisation === 'meanEnergy') return scaled(constellation, 1 / Math.sqrt(constellation.meanEnergy))
  if (normalisation === 'peakEnergy') return scaled(constellation, 1 / Math.sqrt(constellation.peakEnergy))
  if (normalisation !== 'minimumDistance') {
    throw new ModulationError('A normalisation is meanEnergy, peakEnergy or minimumDistance.', ['normalisation'])
  }
  if (!(spacing && spacing > 0 && spacing < Infinity)) {
    throw new ModulationError('Spacing is the minimum distance in signal units, a number above 0.', ['spacing'])
  }
  return scaled(constellation, spacing / minimumDistanceOf(constellation))
}
