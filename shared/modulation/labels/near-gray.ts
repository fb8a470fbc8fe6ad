import { seededRandom } from '../random'
import type { Random } from '../random'
import { onesIn } from './words'

/**
 * What a pair of points weighs: its share of errors where d_min²/(4·N0) is 4, an error rate near 1e-3. In the plane nothing counts that is
 * farther than twice the minimum distance; in more dimensions neighbours are so many that only nearer ones are counted.
 */
const steepness = 4
const farthestOf = (dimensions: number) => dimensions <= 2 ? 4 : dimensions <= 4 ? 2 : 1

/** Small sets are shaken so often as M²·shakes reaches this, at most forty times. */
const shaking = 40_000
const mostShakes = 40

/** Comparisons of two labels from each start at most, some tenths of a second: large sets are left where the last ones move little. */
const mostComparisons = 4e7

/** Points up to which every pair is tried; beyond, a point changes only with those whose labels differ in one or two bits. */
const everyPair = 256

/** Pairs of near points: the neighbours of i are entries offsets[i] … offsets[i + 1] − 1. */
interface Near { offsets: Int32Array, neighbours: Int32Array, weights: Float64Array }

/**
 * Labels whose near pairs differ in few bits: from each start, labels of two points change places as long as that lowers the weighted
 * number of differing bits; small sets are shaken and searched again. Seeded, so that the same points always get the same labels.
 * @param points M points, M a power of two
 * @param starts words in the order of the points
 * @returns words of the best labelling found
 */
export function nearGrayWords(points: readonly ArrayLike<number>[], starts: readonly (readonly number[])[]): Uint16Array {
  const near = nearPairs(points)
  const random = seededRandom(points.length)
  let best: Uint16Array = new Uint16Array()
  let least = Infinity
  const consider = (words: Uint16Array) => {
    improve(words, near)
    const cost = costOf(words, near)
    if (cost < least - 1e-9) [best, least] = [words, cost]
  }
  for (const start of starts) consider(Uint16Array.from(start))
  const shakes = Math.min(mostShakes, Math.floor(shaking / points.length ** 2))
  for (let n = 0; n < shakes; n++) consider(shaken(best, random))
  return best
}

/** Points counted in columns from left to right, each from below, and labelled by the two numbers' Gray words; any dimension. */
export function sortedIntoColumns(points: readonly ArrayLike<number>[], columns: number, wordAt: (column: number, row: number) => number): number[] {
  const rows = points.length / columns
  const across = points.map((_, i) => i).sort((a, b) => points[a]![0]! - points[b]![0]! || a - b)
  const height = (i: number) => points[i]![1] ?? 0
  const words = new Array<number>(points.length)
  for (let column = 0; column < columns; column++) {
    const members = across.slice(column * rows, (column + 1) * rows).sort((a, b) => height(a) - height(b) || a - b)
    members.forEach((i, row) => words[i] = wordAt(column, row))
  }
  return words
}

function nearPairs(points: readonly ArrayLike<number>[]): Near {
  const sorted = points.map((_, i) => i).sort((a, b) => points[a]![0]! - points[b]![0]!)
  const squareOf = (a: number, b: number) => {
    let sum = 0
    for (let n = 0; n < points[a]!.length; n++) sum += (points[a]![n]! - points[b]![n]!) ** 2
    return sum
  }
  const within = (limit: () => number, found: (a: number, b: number, square: number) => void) => {
    sorted.forEach((a, m) => {
      for (let n = m + 1; n < sorted.length && (points[sorted[n]!]![0]! - points[a]![0]!) ** 2 <= limit(); n++) {
        const square = squareOf(a, sorted[n]!)
        if (square <= limit()) found(a, sorted[n]!, square)
      }
    })
  }
  let least = Infinity
  within(() => least, (_a, _b, square) => least = square)
  const lists = points.map(() => [] as [number, number][])
  const farthest = farthestOf(points[0]!.length) * (1 + 1e-9)
  within(() => least * farthest, (a, b, square) => {
    // Rounded, so that equal distances weigh the same to the last bit and ties stay ties.
    const weight = Number(Math.exp(-steepness * (square / least - 1)).toPrecision(9))
    lists[a]!.push([b, weight])
    lists[b]!.push([a, weight])
  })
  const offsets = new Int32Array(points.length + 1)
  lists.forEach((list, i) => offsets[i + 1] = offsets[i]! + list.length)
  const flat = lists.flat()
  return { offsets, neighbours: Int32Array.from(flat, ([j]) => j), weights: Float64Array.from(flat, ([, weight]) => weight) }
}

function costOf(words: Uint16Array, { offsets, neighbours, weights }: Near): number {
  let cost = 0
  for (let i = 0; i < words.length; i++) {
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) cost += weights[entry]! * onesIn[words[i]! ^ words[neighbours[entry]!]!]!
  }
  return cost
}

/** Change of half the cost when i and j exchange labels. */
function gain(words: Uint16Array, { offsets, neighbours, weights }: Near, i: number, j: number): number {
  const a = words[i]!
  const b = words[j]!
  let change = 0
  for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
    const c = neighbours[entry]!
    if (c !== j) change += weights[entry]! * (onesIn[b ^ words[c]!]! - onesIn[a ^ words[c]!]!)
  }
  for (let entry = offsets[j]!; entry < offsets[j + 1]!; entry++) {
    const c = neighbours[entry]!
    if (c !== i) change += weights[entry]! * (onesIn[a ^ words[c]!]! - onesIn[b ^ words[c]!]!)
  }
  return change
}

/** Exchanges, each point with the partner that gains most, until a whole round finds none or the work is too much. */
function improve(words: Uint16Array, near: Near): void {
  const order = words.length
  const placeOf = new Int32Array(order)
  words.forEach((word, i) => placeOf[word] = i)
  const masks = Array.from({ length: order }, (_, mask) => mask).filter(mask => mask > 0 && (order <= everyPair || onesIn[mask]! <= 2))
  const steps = mostComparisons / (masks.length * 2 * near.neighbours.length / order)
  for (let step = 0, idle = 0; idle < order && step < steps; step++) {
    const i = step % order
    let best = -1
    let change = -1e-9
    for (const mask of masks) {
      const j = placeOf[words[i]! ^ mask]!
      const candidate = gain(words, near, i, j)
      if (candidate < change) [best, change] = [j, candidate]
    }
    idle++
    if (best < 0) continue
    const word = words[i]!
    words[i] = words[best]!
    words[best] = word
    placeOf[words[i]!] = i
    placeOf[word] = best
    idle = 0
  }
}

/** A copy with a few labels, an eighth of them and at least three, passed on in a ring. */
export function shaken(words: Uint16Array, random: Random): Uint16Array {
  const copy = words.slice()
  const count = Math.min(words.length, Math.max(3, words.length >> 3))
  const chosen = Array.from({ length: count }, () => Math.floor(random() * words.length))
  const taken = [...new Set(chosen)]
  const first = copy[taken[0]!]!
  taken.forEach((i, n) => copy[i] = n + 1 < taken.length ? copy[taken[n + 1]!]! : first)
  return copy
}
