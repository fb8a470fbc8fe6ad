import { maximalOrder } from '../constellation-checks'

/** Number of ones in each word of up to twelve bits. */
export const onesIn: Uint8Array = Uint8Array.from({ length: maximalOrder }, (_, word) => word.toString(2).replaceAll('0', '').length)

/** Bits k of a label for M points, or null when M is no power of two. */
export function labelBits(order: number): number | null {
  const bits = Math.log2(order)
  return Number.isInteger(bits) && bits >= 1 ? bits : null
}

/** Labels as written from words as numbers. */
export function written(words: ArrayLike<number>, bits: number): string[] {
  return Array.from(words, word => word.toString(2).padStart(bits, '0'))
}

/** Words as numbers from labels as written. */
export function wordsOf(labels: readonly string[]): Uint16Array {
  return Uint16Array.from(labels, label => parseInt(label, 2))
}

/**
 * Natural binary labels: point i has the number i, most significant bit first.
 * @param order M
 * @returns null when M is no power of two
 */
export function naturalLabels(order: number): string[] | null {
  const bits = labelBits(order)
  return bits === null ? null : written(Array.from({ length: order }, (_, i) => i), bits)
}
