import { maximalDimensions, maximalOrder } from '../constellation-checks'
import { createConstellation } from '../constellation'
import { minimumDistanceOf } from '../distance'
import type { Issue } from '../errors'
import { isWhole } from './family'
import type { Family, FamilyParameters } from './family'
import { latticeDimensions } from './lattice-cut'

type Factor = NonNullable<FamilyParameters['factors']>[number]

const orders = 'A product has 2 to 8 factors, up to 4096 points and up to 8 dimensions in all.'
const total = (numbers: readonly number[]) => numbers.reduce((sum, n) => sum + n, 0)

/**
 * The Cartesian product: every choice of a point from each factor, the last factor changing fastest; methods §12. Factors are brought to the
 * same minimum distance, so that none is weaker than another: equal points of QPSK twice make the hypercube of 16.
 * @param others the families that may be factors
 */
export function productOf(others: readonly Family[]): Family {
  const familyOf = (factor: Factor) => others.find(({ id }) => id === factor?.family)
  return {
    id: 'product',
    title: 'Product',
    orders,
    parameters: ['factors'],
    validate: ({ factors }) => {
      if (!Array.isArray(factors) || !isWhole(factors.length, 2, maximalDimensions)) return [{ path: ['factors'], message: orders }]
      const wrong = (factors as Factor[]).flatMap((factor, n) => factorIssues(familyOf(factor), factor, others).map(issue => ({ ...issue, path: ['factors', n, ...issue.path] })))
      return wrong.length > 0 ? wrong : sizeIssues(factors as Factor[])
    },
    points: ({ factors }) => factors!
      .map(factor => atUnitDistance(familyOf(factor)!.points(factor)))
      .reduce<number[][]>((product, points) => product.flatMap(before => points.map(point => [...before, ...point])), [[]]),
    signature: ({ factors }) => (factors ?? []).map(factor => familyOf(factor)?.signature(factor) ?? '?').join(' × '),
  }
}

function factorIssues(family: Family | undefined, factor: Factor, others: readonly Family[]): Issue[] {
  return family ? family.validate(factor) : [{ path: ['family'], message: `A factor is one of ${others.map(({ id }) => id).join(', ')}.` }]
}

function sizeIssues(factors: readonly Factor[]): Issue[] {
  if (total(factors.map(dimensionsOf)) > maximalDimensions) return [{ path: ['factors'], message: 'The factors of a product have up to 8 dimensions in all.' }]
  const order = factors.reduce((product, factor) => product * orderOf(factor), 1)
  return order > maximalOrder ? [{ path: ['factors'], message: 'The factors of a product have up to 4096 points, multiplied.' }] : []
}

/** M of a valid factor. */
export function orderOf({ family, order, rings, points }: Factor): number {
  return family === 'apsk' ? total(rings!) : family === 'custom' ? points!.length : order!
}

/** N of a valid factor. */
function dimensionsOf(factor: Factor): number {
  switch (factor.family) {
    case 'pam': return 1
    case 'orthogonal': return factor.order!
    case 'biorthogonal': return factor.order! / 2
    case 'simplex': return factor.order! - 1
    case 'hypercube': return Math.log2(factor.order!)
    case 'lattice': return latticeDimensions[factor.lattice!]
    case 'custom': return factor.points![0]!.length
    default: return 2
  }
}

function atUnitDistance(points: number[][]): number[][] {
  const distance = minimumDistanceOf(createConstellation(points))
  return points.map(point => point.map(x => x / distance))
}
