import { maximalDimensions } from '../constellation-checks'
import { isWhole, orderIssues } from './family'
import type { Family } from './family'
import { unitVectors } from './orthogonal'

const orders = 'Biorthogonal signals are an even number from 2 to 16, two for each dimension.'

/**
 * Biorthogonal signals: plus and minus each of M/2 unit vectors; methods §12. Point M − 1 − i is the opposite of point i, so that under
 * natural labels opposite points differ in every bit.
 */
export const biorthogonal: Family = {
  id: 'biorthogonal',
  title: 'Biorthogonal',
  orders,
  parameters: ['order'],
  validate: ({ order }) => orderIssues(isWhole(order, 2, 2 * maximalDimensions) && order % 2 === 0, orders),
  points: ({ order }) => {
    const half = unitVectors(order! / 2)
    return [...half, ...half.map(point => point.map(x => 0 - x)).reverse()]
  },
  signature: ({ order }) => `Biorthogonal ${order}`,
}
