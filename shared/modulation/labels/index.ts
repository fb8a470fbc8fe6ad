import { familyOf } from '../families'
import type { FamilyId, FamilyParameters } from '../families'
import { pamWords, pskWords } from './gray'
import { searchedWords } from './near-gray-family'
import { qamWords } from './qam'
import { standardRingWords } from './rings'
import { labelBits, naturalLabels, written } from './words'

export { naturalLabels } from './words'

/**
 * The labels that belong to a family, in the order of its points, most significant bit first: Gray where there are some, else the
 * standard's, else near-Gray ones. Custom points have none, nor has a number of points that is no power of two.
 * @param id the family
 * @param parameters its parameters, valid
 * @returns M words of k bits, or null
 * @see 3GPP TS 38.211 §5.1; ETSI EN 302 307-1, figures 11 and 12; each file of this folder
 */
export function familyLabels(id: FamilyId, parameters: FamilyParameters): string[] | null {
  if (id === 'custom' || familyOf(id).validate(parameters).length > 0) return null
  const order = orderOf(id, parameters)
  const bits = labelBits(order)
  if (bits === null) return null
  switch (id) {
    case 'pam': return written(pamWords(order), bits)
    case 'psk': return written(pskWords(order), bits)
    case 'qam': return written(qamWords(bits), bits)
    case 'apsk': return written(standardRingWords(parameters) ?? searchedWords(id, parameters), bits)
    case 'cross-qam':
    case 'hexagonal':
    case 'lattice': return written(searchedWords(id, parameters), bits)
    case 'product': return productLabels(parameters.factors!)
    // A hypercube and biorthogonal points are in an order that makes natural labels good; orthogonal and simplex ones leave no choice.
    default: return naturalLabels(order)
  }
}

function orderOf(id: FamilyId, { order, rings, points, factors }: FamilyParameters): number {
  switch (id) {
    case 'apsk': return rings!.reduce((sum, n) => sum + n, 0)
    case 'custom': return points!.length
    case 'product': return factors!.reduce((product, { family, ...parameters }) => product * orderOf(family, parameters), 1)
    default: return order!
  }
}

/** Every choice of a label from each factor, one after another, the last factor changing fastest; custom factors count naturally. */
function productLabels(factors: NonNullable<FamilyParameters['factors']>): string[] {
  return factors
    .map(({ family, ...parameters }) => familyLabels(family, parameters) ?? naturalLabels(orderOf(family, parameters))!)
    .reduce((product, labels) => product.flatMap(before => labels.map(label => before + label)), [''])
}
