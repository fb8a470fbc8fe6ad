import { maximalDimensions } from '../constellation-checks'
import { isWhole, orderIssues } from './family'
import type { Family } from './family'

const orders = 'Simplex signals are 2 to 9, one more than dimensions.'

/**
 * Simplex signals: orthogonal ones minus their mean, in the M − 1 dimensions that these lie in; methods §12. Coordinate n is taken along
 * (1, …, 1, −n, 0, …) with n ones.
 */
export const simplex: Family = {
  id: 'simplex',
  title: 'Simplex',
  orders,
  parameters: ['order'],
  validate: ({ order }) => orderIssues(isWhole(order, 2, maximalDimensions + 1), orders),
  points: ({ order }) => Array.from({ length: order! }, (_, i) =>
    Array.from({ length: order! - 1 }, (_, m) => (i <= m ? 1 : i === m + 1 ? -(m + 1) : 0) / Math.sqrt((m + 1) * (m + 2)))),
  signature: ({ order }) => `Simplex ${order}`,
}
