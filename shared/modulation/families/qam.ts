import { isWhole, orderIssues } from './family'
import type { Family } from './family'

const orders = 'QAM has a power of two of points from 4 to 4096.'

/** Quadrature amplitude modulation: the grid of odd integers, 2^⌈k/2⌉ columns by 2^⌊k/2⌋ rows; methods §12. */
export const qam: Family = {
  id: 'qam',
  title: 'QAM',
  orders,
  parameters: ['order'],
  validate: ({ order }) => orderIssues(isWhole(order, 4, 4096) && Number.isInteger(Math.log2(order)), orders),
  points: ({ order }) => {
    const k = Math.log2(order!)
    return grid(2 ** Math.ceil(k / 2), 2 ** Math.floor(k / 2))
  },
  signature: ({ order }) => `${order}-QAM`,
}

/** Odd integers about 0 in both coordinates, column after column. */
export function grid(columns: number, rows: number): number[][] {
  return Array.from({ length: columns * rows }, (_, n) => [2 * Math.floor(n / rows) + 1 - columns, 2 * (n % rows) + 1 - rows])
}
