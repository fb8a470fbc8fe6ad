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
  if (id === 'product') return productLabels(parameters.factors!)
  const order = id === 'apsk' ? parameters.rings!.reduce((sum, n) => sum + n, 0) : parameters.order!
  const bits = labelBits(order)
  if (bits === null) return null
  switch (id) {
    case 'pam': return written(pamWords(order), bits)
    case 'psk': return written(pskWords(order), bits)
    case 'qam': return written(qamWords(bits), bits)
    case 'apsk': return written(standardRingWords(parameters) ?? searchedWords(id, parameters), bits)
    case 'cross-qam':
    case 'hexagonal': return written(searchedWords(id, parameters), bits)
    default: return naturalLabels(order)
  }
}

/** Words of the factors one behind the other, the first factor's first: null unless each factor has its own. */
function productLabels(factors: NonNullable<FamilyParameters['factors']>): string[] | null {
  return factors.reduce<string[] | null>((product, { family, ...parameters }) => {
    const own = product && familyLabels(family, parameters)
    return own && product!.flatMap(before => own.map(word => before + word))
  }, [''])
}
