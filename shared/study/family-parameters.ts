import { families } from '../modulation'
import type { Family, FamilyId, FamilyParameter, FamilyParameters } from '../modulation'
import type { CandidateInputs, Factor } from '../schemas/candidates'

/** The core's family of a row, or null for an entered scheme, which has no points. */
export function familyOfRow(inputs: Pick<CandidateInputs, 'family'>): Family | null {
  return families.find(family => family.id === inputs.family) ?? null
}

const radians = (degrees: number) => degrees * Math.PI / 180

type Read = { [K in FamilyParameter]: (inputs: CandidateInputs | Factor) => FamilyParameters[K] }

const readers: Read = {
  order: inputs => inputs.order,
  rings: inputs => inputs.rings,
  ratios: inputs => inputs.ratios ?? [],
  phases: inputs => inputs.phasesDeg?.map(radians) ?? null,
  points: inputs => 'points' in inputs ? inputs.points : null,
  lattice: inputs => inputs.lattice ?? null,
  offset: inputs => inputs.offset ?? null,
  factors: inputs => 'factors' in inputs ? inputs.factors?.map(factor => ({ family: factor.family, ...parametersOf(factor) })) ?? null : null,
}

const parametersOf = (inputs: CandidateInputs | Factor): FamilyParameters =>
  Object.fromEntries((familyOfRow(inputs)?.parameters ?? []).map(parameter => [parameter, readers[parameter](inputs)]))

/**
 * What a row's family reads of its inputs, angles in radians. Fields of other families are left out.
 * @throws never: what is missing or wrong is for the family's own validation to say
 */
export const familyParameters = (inputs: CandidateInputs): FamilyParameters => parametersOf(inputs)

/** Points M and real dimensions N of a row, as far as its inputs tell them. */
export interface RowSize { order: number | null, dimensions: number | null }

const latticeDimensions = { A2: 2, D4: 4, E8: 8 } as const
const sum = (numbers: readonly number[]) => numbers.reduce((a, b) => a + b, 0)

/** Real dimensions by family, where they follow from the number of points alone. */
const dimensionsByOrder: Partial<Record<FamilyId, (order: number) => number>> = {
  'pam': () => 1, 'psk': () => 2, 'qam': () => 2, 'cross-qam': () => 2, 'hexagonal': () => 2,
  'orthogonal': order => order, 'biorthogonal': order => order / 2, 'simplex': order => order - 1, 'hypercube': order => Math.log2(order),
}

function sizeOf(inputs: CandidateInputs | Factor): RowSize {
  const { family, order = null, rings, lattice } = inputs
  switch (family) {
    case 'entered': return { order: null, dimensions: null }
    case 'apsk': return { order: rings ? sum(rings) : null, dimensions: 2 }
    case 'custom': return 'points' in inputs && inputs.points
      ? { order: inputs.points.length, dimensions: inputs.points[0]!.length }
      : { order: null, dimensions: null }
    case 'lattice': return { order, dimensions: lattice ? latticeDimensions[lattice] : null }
    case 'product': return productSize('factors' in inputs ? inputs.factors : null)
    default: return { order, dimensions: order === null ? null : dimensionsByOrder[family]?.(order) ?? null }
  }
}

function productSize(factors: readonly Factor[] | null): RowSize {
  const sizes = (factors ?? []).map(sizeOf)
  if (sizes.length === 0 || sizes.some(({ order, dimensions }) => order === null || dimensions === null)) return { order: null, dimensions: null }
  return { order: sizes.reduce((product, { order }) => product * order!, 1), dimensions: sum(sizes.map(({ dimensions }) => dimensions!)) }
}

/** Number of points and of dimensions that a row's inputs come to; null where they do not tell. */
export const rowSize = (inputs: CandidateInputs): RowSize => sizeOf(inputs)
