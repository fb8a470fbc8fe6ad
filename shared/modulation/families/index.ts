import type { Constellation, ConstellationOptions } from '../constellation'
import { createConstellation } from '../constellation'
import { ModulationError } from '../errors'
import { normalise } from '../normalise'
import { apsk } from './apsk'
import { biorthogonal } from './biorthogonal'
import { crossQam } from './cross-qam'
import { custom } from './custom'
import type { Family, FamilyId, FamilyParameter, FamilyParameters } from './family'
import { hexagonal } from './hexagonal'
import { hypercube } from './hypercube'
import { lattice } from './lattice'
import { orthogonal } from './orthogonal'
import { pam } from './pam'
import { productOf } from './product'
import { psk } from './psk'
import { qam } from './qam'
import { simplex } from './simplex'

export { apskPresets } from './apsk-presets'
export type { ApskPreset } from './apsk-presets'
export type { Family, FamilyId, FamilyParameter, FamilyParameters, LatticeId } from './family'

/** All families. A new one is a file of its own and an entry here. */
export const families: readonly Family[] = withProduct([
  pam, psk, qam, crossQam, apsk, hexagonal, orthogonal, biorthogonal, simplex, hypercube, lattice, custom,
])

function withProduct(single: readonly Family[]): readonly Family[] {
  return [...single.slice(0, -1), productOf(single), ...single.slice(-1)]
}

/**
 * The family of an identifier.
 * @throws ModulationError with path ['family'] for one that does not exist
 */
export function familyOf(id: string): Family {
  const family = families.find(candidate => candidate.id === id)
  if (!family) throw new ModulationError(`The family is one of ${families.map(({ id }) => id).join(', ')}.`, ['family'])
  return family
}

/**
 * Generates a constellation: unit mean energy, except for custom points, which are taken as given.
 * @param id the family
 * @param parameters its parameters; those of other families are ignored
 * @param options probabilities and labels, in the order of the family's points
 * @throws ModulationError with the first thing that is wrong
 * @see methods §12
 */
export function generate(id: FamilyId, parameters: FamilyParameters, options: ConstellationOptions = {}): Constellation {
  const family = familyOf(id)
  const [issue] = family.validate(parameters)
  if (issue) throw new ModulationError(issue.message, issue.path)
  const constellation = atSource(family, parameters, () => createConstellation(family.points(parameters), options))
  return id === 'custom' ? constellation : normalise(constellation, { normalisation: 'meanEnergy' })
}

/** The input that a family's points come from: near ratios make APSK's coincide. */
function sourceOf({ parameters }: Family, { ratios }: FamilyParameters): FamilyParameter {
  if (parameters.includes('points')) return 'points'
  return parameters.includes('ratios') && ratios?.length ? 'ratios' : parameters[0]!
}

/** Makes a constellation; what is wrong with its points is told at the input that they come from. */
function atSource(family: Family, parameters: FamilyParameters, make: () => Constellation): Constellation {
  try {
    return make()
  } catch (error) {
    const source = sourceOf(family, parameters)
    if (error instanceof ModulationError && error.path[0] === 'points' && source !== 'points') throw new ModulationError(error.message, [source])
    throw error
  }
}
