import { maximalOrder } from '../constellation-checks'
import { isWhole, orderIssues } from './family'
import type { Family } from './family'

const orders = 'PAM has any whole number of points from 2 to 4096.'

/** Pulse-amplitude modulation, one dimension: the odd integers about 0; methods §12. */
export const pam: Family = {
  id: 'pam',
  title: 'PAM',
  orders,
  parameters: ['order'],
  validate: ({ order }) => orderIssues(isWhole(order, 2, maximalOrder), orders),
  points: ({ order }) => Array.from({ length: order! }, (_, i) => [2 * i + 1 - order!]),
  signature: ({ order }) => `${order}-PAM`,
}
