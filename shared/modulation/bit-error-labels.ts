import type { Constellation } from './constellation'
import { ModulationError } from './errors'
import { wordsOf } from './labels/words'

/**
 * The labels of a constellation as numbers.
 * @throws ModulationError with path ['labels'] when there are none
 */
export function labelWords({ labels, order }: Constellation): Uint16Array {
  if (labels) return wordsOf(labels)
  const remedy = Number.isInteger(Math.log2(order))
    ? `give each of the ${order} points a different word of ${Math.log2(order)} bits`
    : `labels need a power of two of points, and there are ${order}`
  throw new ModulationError(`A bit error rate needs labels: ${remedy}.`, ['labels'])
}
