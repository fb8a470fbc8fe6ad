import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'

/** What an information rate is computed from: points in signal units with their probabilities and, for the bit metric, their bits. */
export interface InformationSource {
  order: number
  dimensions: number
  /** order·dimensions coordinates, point after point */
  points: Float64Array
  probabilities: Float64Array
  /** labels as numbers, one a point; null: symbols alone */
  words: Uint16Array | null
  /** masks of the bits that count here */
  bits: readonly number[]
}

/** Probabilities of a product may differ from the product of the factors' by so much: they were rounded. */
const rounding = 1e-12

/**
 * The independent parts that a rate is the sum of: a set that is a Cartesian product in its own coordinates falls into
 * factors if its probabilities are products too and, for the bit metric, if each bit depends on one factor alone.
 * @param withBits whether the bits of the labels count; the constellation then has labels
 */
export function informationSources(constellation: Constellation, withBits: boolean): InformationSource[] {
  const { order, dimensions, points, labels, bitsPerSymbol } = constellation
  const words = withBits && labels ? Uint16Array.from(labels, label => Number.parseInt(label, 2)) : null
  const bits = words ? Array.from({ length: bitsPerSymbol }, (_, b) => 1 << b) : []
  const probabilities = Float64Array.from({ length: order }, (_, i) => probabilityOf(constellation, i))
  return factorised({ order, dimensions, points, probabilities, words, bits })
}

function factorised(source: InformationSource): InformationSource[] {
  for (let cut = 1; cut < source.dimensions; cut++) {
    const parts = split(source, cut)
    if (parts) return [parts[0], ...factorised(parts[1])]
  }
  return [source]
}

/** Points told apart by some of their coordinates alone: the class of each, and the first point of each class. */
interface Classes { of: Uint16Array, first: number[] }

/** The two factors of coordinates before and from `cut` on, or null where the source is no product there. */
function split(source: InformationSource, cut: number): [InformationSource, InformationSource] | null {
  const { order, dimensions, words, bits } = source
  const front = classes(source, 0, cut)
  const back = classes(source, cut, dimensions)
  // Points are all different, so that this many pairs are all pairs.
  if (front.first.length * back.first.length !== order) return null
  const frontBits = bits.filter(bit => dependsOn(front, words!, bit))
  const backBits = bits.filter(bit => dependsOn(back, words!, bit))
  if (frontBits.length + backBits.length !== bits.length) return null
  const parts = [factor(source, front, 0, cut, frontBits), factor(source, back, cut, dimensions, backBits)] as const
  for (let i = 0; i < order; i++) {
    const product = parts[0].probabilities[front.of[i]!]! * parts[1].probabilities[back.of[i]!]!
    if (Math.abs(product - source.probabilities[i]!) > rounding * product) return null
  }
  return [...parts]
}

function classes({ order, dimensions, points }: InformationSource, from: number, to: number): Classes {
  const of = new Uint16Array(order)
  const first: number[] = []
  const known = new Map<string | number, number>()
  for (let i = 0; i < order; i++) {
    const start = i * dimensions
    const key = to - from === 1 ? points[start + from]! : points.subarray(start + from, start + to).join()
    let index = known.get(key)
    if (index === undefined) {
      index = first.length
      known.set(key, index)
      first.push(i)
    }
    of[i] = index
  }
  return { of, first }
}

function dependsOn({ of, first }: Classes, words: Uint16Array, bit: number): boolean {
  return of.every((index, i) => ((words[i]! ^ words[first[index]!]!) & bit) === 0)
}

function factor(source: InformationSource, { of, first }: Classes, from: number, to: number, bits: number[]): InformationSource {
  const probabilities = new Float64Array(first.length)
  of.forEach((index, i) => probabilities[index]! += source.probabilities[i]!)
  const points = new Float64Array(first.length * (to - from))
  first.forEach((i, n) => {
    points.set(source.points.subarray(i * source.dimensions + from, i * source.dimensions + to), n * (to - from))
  })
  const words = source.words && Uint16Array.from(first, i => source.words![i]!)
  return { order: first.length, dimensions: to - from, points, probabilities, words, bits }
}
