/** Most values of one range. */
export const mostValues = 1001

/** How many values a range has; 0 or less when it runs backwards. A stop within a millionth of a step counts as reached. */
export function valuesOfRange(start: number, stop: number, step: number): number {
  return Math.floor((stop - start) / step + 1e-6) + 1
}

/**
 * Values from start to stop by a step, both in the same unit, without the drift of repeated addition: 0.1, 0.2, 0.3.
 * @throws RangeError when the range runs backwards or has more than 1,001 values
 */
export function snrGrid(start: number, stop: number, step: number): number[] {
  const count = valuesOfRange(start, stop, step)
  if (!(count >= 1 && count <= mostValues)) throw new RangeError('A range runs forwards and has at most 1,001 values.')
  return Array.from({ length: count }, (_, i) => Number((start + i * step).toPrecision(12)))
}
