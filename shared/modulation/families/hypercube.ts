import { maximalDimensions } from '../constellation-checks'
import { isWhole, orderIssues } from './family'
import type { Family } from './family'

const orders = 'A hypercube has 2, 4, 8, 16, 32, 64, 128 or 256 points: two for each dimension, multiplied.'

/** Vertices of a cube of N dimensions: all 2^N points of coordinates ±1; methods §12. Natural labels are Gray: a bit a coordinate. */
export const hypercube: Family = {
  id: 'hypercube',
  title: 'Hypercube',
  orders,
  parameters: ['order'],
  validate: ({ order }) => orderIssues(isWhole(order, 2, 2 ** maximalDimensions) && Number.isInteger(Math.log2(order)), orders),
  points: ({ order }) => {
    const dimensions = Math.log2(order!)
    return Array.from({ length: order! }, (_, i) => Array.from({ length: dimensions }, (_, n) => i >> dimensions - 1 - n & 1 ? 1 : -1))
  },
  signature: ({ order }) => `Hypercube ${order}`,
}
