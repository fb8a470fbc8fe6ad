import { maximalDimensions } from '../constellation-checks'
import { isWhole, orderIssues } from './family'
import type { Family } from './family'

const orders = 'Orthogonal signals are 2 to 8, one for each dimension.'

/** Orthogonal signals: M unit vectors of M dimensions; methods §12. */
export const orthogonal: Family = {
  id: 'orthogonal',
  title: 'Orthogonal',
  orders,
  parameters: ['order'],
  validate: ({ order }) => orderIssues(isWhole(order, 2, maximalDimensions), orders),
  points: ({ order }) => unitVectors(order!),
  signature: ({ order }) => `Orthogonal ${order}`,
}

/** The N unit vectors of N dimensions. */
export function unitVectors(dimensions: number): number[][] {
  return Array.from({ length: dimensions }, (_, i) => Array.from({ length: dimensions }, (_, n) => n === i ? 1 : 0))
}
