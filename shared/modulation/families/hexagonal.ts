import { maximalOrder } from '../constellation-checks'
import { isWhole, orderIssues } from './family'
import type { Family } from './family'
import { leastEnergyCut } from './hexagonal-search'

const orders = 'Hexagonal has any whole number of points from 2 to 4096.'

/** The M points of the hexagonal lattice with the least energy about their own mean, recentred on it; methods §12. */
export const hexagonal: Family = {
  id: 'hexagonal',
  title: 'Hexagonal',
  orders,
  parameters: ['order'],
  validate: ({ order }) => orderIssues(isWhole(order, 2, maximalOrder), orders),
  points: ({ order }) => leastEnergyCut(order!),
  signature: ({ order }) => `Hexagonal ${order}`,
}
