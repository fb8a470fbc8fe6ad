import { grayWord } from './labels/gray'
import { shaken, sortedIntoColumns } from './labels/near-gray'
import { seededRandom } from './random'
import type { Random } from './random'

/** Seeds of neighbouring starts lie far apart. */
const stride = 0x9E3779B9

/**
 * Labels for a further start: the first is Gray along two coordinates, the second Gray around the mean, as suits a ring; then random ones
 * and the best so far with some labels shaken take turns.
 * @param points M points
 * @param best the best labels so far, as numbers
 * @param seed of the search
 * @param start its number, from 1
 */
export function startWords(points: readonly number[][], best: Uint16Array, seed: number, start: number): Uint16Array {
  if (start === 1) return Uint16Array.from(grayByColumns(points))
  if (start === 2 && points[0]!.length === 2) return Uint16Array.from(grayByAngle(points))
  const random = seededRandom(seed + Math.imul(start, stride))
  return start % 2 === 0 ? shuffled(best, random) : shaken(best, random)
}

function grayByColumns(points: readonly number[][]): number[] {
  const rows = points[0]!.length === 1 ? 1 : 2 ** Math.floor(Math.log2(points.length) / 2)
  return sortedIntoColumns(points, points.length / rows, (column, row) => grayWord(column) * rows + grayWord(row))
}

function grayByAngle(points: readonly number[][]): number[] {
  const mean = [0, 1].map(n => points.reduce((sum, point) => sum + point[n]!, 0) / points.length)
  const angles = points.map(([x, y]) => [Math.atan2(y! - mean[1]!, x! - mean[0]!)])
  return sortedIntoColumns(angles, points.length, grayWord)
}

/** Fisher and Yates. */
function shuffled(words: Uint16Array, random: Random): Uint16Array {
  const copy = words.slice()
  for (let n = copy.length - 1; n > 0; n--) {
    const m = Math.floor(random() * (n + 1))
    const word = copy[n]!
    copy[n] = copy[m]!
    copy[m] = word
  }
  return copy
}
