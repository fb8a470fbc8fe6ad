import { families } from '../modulation'
import type { Family, FamilyParameters } from '../modulation'
import type { CandidateInputs } from '../schemas/candidates'

/** The core's family of a row, or null for an entered scheme, which has no points. */
export function familyOfRow(inputs: Pick<CandidateInputs, 'family'>): Family | null {
  return families.find(family => family.id === inputs.family) ?? null
}

/**
 * What a row's family reads of its inputs, angles in radians. Fields of other families are left out.
 * @throws never: what is missing or wrong is for the family's own validation to say
 */
export function familyParameters(inputs: CandidateInputs): FamilyParameters {
  const reads = familyOfRow(inputs)?.parameters ?? []
  const parameters: FamilyParameters = {}
  for (const parameter of reads) {
    switch (parameter) {
      case 'order': parameters.order = inputs.order
        break
      case 'rings': parameters.rings = inputs.rings
        break
      case 'ratios': parameters.ratios = inputs.ratios ?? []
        break
      case 'phases': parameters.phases = inputs.phasesDeg?.map(degrees => degrees * Math.PI / 180) ?? null
        break
      case 'points': parameters.points = inputs.points
    }
  }
  return parameters
}
