import { maximalOrder } from '../constellation-checks'
import { isWhole, orderIssues } from './family'
import type { Family } from './family'
import { onCircle } from './circle'

const orders = 'PSK has any whole number of points from 2 to 4096.'

/** Phase-shift keying: angles 2πi/M on one circle; methods §12. */
export const psk: Family = {
  id: 'psk',
  title: 'PSK',
  orders,
  parameters: ['order'],
  validate: ({ order }) => orderIssues(isWhole(order, 2, maximalOrder), orders),
  points: ({ order }) => Array.from({ length: order! }, (_, i) => onCircle(1, i, order!, 0)),
  signature: ({ order }) => order === 2 ? 'BPSK' : order === 4 ? 'QPSK' : `${order}-PSK`,
}
