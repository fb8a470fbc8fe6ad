import { orderIssues } from './family'
import type { Family } from './family'
import { grid } from './qam'

const orders = 'Cross QAM has 32, 128 or 512 points.'

/** Cross QAM: the square grid of 3·2^((k−3)/2) columns without its four corners of side 2^((k−5)/2); methods §12. */
export const crossQam: Family = {
  id: 'cross-qam',
  title: 'Cross QAM',
  orders,
  parameters: ['order'],
  validate: ({ order }) => orderIssues(order === 32 || order === 128 || order === 512, orders),
  points: ({ order }) => {
    const corner = 2 ** ((Math.log2(order!) - 5) / 2)
    const side = 6 * corner
    const inner = side - 2 * corner
    return grid(side, side).filter(([x, y]) => Math.abs(x!) < inner || Math.abs(y!) < inner)
  },
  signature: ({ order }) => `Cross ${order}-QAM`,
}
