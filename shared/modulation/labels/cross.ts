import { grayWord } from './gray'

/**
 * Cross QAM from a Gray-labelled rectangle of 8c by 4c points: its c outer columns on either side stand above and below the rest.
 * @param points odd integers, in the order of the family
 * @see J. G. Smith, "Odd-bit quadrature amplitude-shift keying", IEEE Trans. Commun. 23 (1975)
 */
export function foldedWords(points: readonly (readonly number[])[]): number[] {
  const corner = Math.sqrt(points.length / 32)
  return points.map(([x, y]) => {
    const folded = Math.abs(y!) > 4 * corner
    const across = folded ? Math.sign(x!) * (12 * corner - Math.abs(y!)) : x!
    const up = folded ? Math.sign(y!) * Math.abs(x!) : y!
    return grayWord((across + 8 * corner - 1) / 2) * 4 * corner + grayWord((up + 4 * corner - 1) / 2)
  })
}
