import type { PairWeights } from './label-search-weights'
import { onesIn } from './labels/words'

/** An exchange must lower the part of the rate that it touches by more than this part of it: rounding must not go round in circles. */
const least = 1e-9

/**
 * The partner with which a point's exchange of labels lowers the bit error rate most.
 * @param words labels as numbers
 * @param weights what each pair weighs
 * @param i the point
 * @returns its index, or −1 when no exchange lowers the rate
 */
export function improvePoint(words: Uint16Array, weights: PairWeights, i: number): number {
  let best = -1
  let lowest = -least * costOf(words, weights, i)
  for (let j = 0; j < words.length; j++) {
    if (j === i) continue
    const change = changeOf(words, weights, i, j) + changeOf(words, weights, j, i)
    if (change < lowest) {
      best = j
      lowest = change
    }
  }
  return best
}

/** Two points exchange labels. */
export function exchange(words: Uint16Array, i: number, j: number): void {
  const word = words[i]!
  words[i] = words[j]!
  words[j] = word
}

function costOf(words: Uint16Array, { offsets, partners, weights }: PairWeights, i: number): number {
  let cost = 0
  for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) cost += weights[entry]! * onesIn[words[i]! ^ words[partners[entry]!]!]!
  return cost
}

/** What the pairs of point i lose or gain when it takes the label of j; the pair of the two stays as it is. */
function changeOf(words: Uint16Array, { offsets, partners, weights }: PairWeights, i: number, j: number): number {
  const own = words[i]!
  const other = words[j]!
  const end = offsets[i + 1]!
  let change = 0
  for (let entry = offsets[i]!; entry < end; entry++) {
    const partner = partners[entry]!
    const word = words[partner]!
    if (partner !== j) change += weights[entry]! * (onesIn[other ^ word]! - onesIn[own ^ word]!)
  }
  return change
}
