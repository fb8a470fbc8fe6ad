import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'
import { decisionProbabilities } from './decision-probabilities'
import { q } from './gaussian'
import type { Geometry } from './geometry'

/** What the confusion of pairs weighs in the bit error rate: partners of i are entries offsets[i] … offsets[i + 1] − 1. */
export interface PairWeights {
  offsets: Int32Array
  partners: Int32Array
  /** probability of i sent and the partner decided, plus the other way round */
  weights: Float64Array
}

/** Pairs that weigh less than this part of the mean point are left out of the search. */
const negligible = 1e-6
/** Of a point with many partners the heaviest count, fewer where there are many points. */
const mostPartners = 256
const leastPartners = 64
const mostPairs = 2 ** 18

/** Weights from the exact probabilities of each decision, one or two dimensions. */
export function exactWeights(geometry: Geometry, n0: number): PairWeights {
  const { order } = geometry.constellation
  const lists = Array.from({ length: order }, () => new Map<number, number>())
  decisionProbabilities(geometry, n0, negligible, (i, row) => {
    row[i] = 0
    for (const c of heaviest(row)) {
      lists[i]!.set(c, (lists[i]!.get(c) ?? 0) + row[c]!)
      lists[c]!.set(i, (lists[c]!.get(i) ?? 0) + row[c]!)
    }
  })
  return packed(lists)
}

/** Weights of the union bound over all pairs, any dimension. */
export function pairwiseWeights(constellation: Constellation, n0: number): PairWeights {
  const { order, dimensions, points } = constellation
  const lists = Array.from({ length: order }, () => new Map<number, number>())
  const row = new Float64Array(order)
  for (let i = 0; i < order; i++) {
    for (let c = 0; c < order; c++) {
      let square = 0
      for (let n = 0; n < dimensions; n++) square += (points[i * dimensions + n]! - points[c * dimensions + n]!) ** 2
      row[c] = c === i ? 0 : (probabilityOf(constellation, i) + probabilityOf(constellation, c)) * q(Math.sqrt(square / (2 * n0)))
    }
    for (const c of heaviest(row)) {
      lists[i]!.set(c, row[c]!)
      lists[c]!.set(i, row[c]!)
    }
  }
  return packed(lists)
}

/** The entries that matter, all of them or the largest. */
function heaviest(row: Float64Array): number[] {
  const least = negligible * row.reduce((sum, weight) => sum + weight, 0)
  const chosen: number[] = []
  for (let c = 0; c < row.length; c++) {
    if (row[c]! > least) chosen.push(c)
  }
  const most = Math.max(leastPartners, Math.min(mostPartners, mostPairs / row.length))
  return chosen.length <= most ? chosen : chosen.sort((a, b) => row[b]! - row[a]!).slice(0, most)
}

function packed(lists: Map<number, number>[]): PairWeights {
  const offsets = new Int32Array(lists.length + 1)
  lists.forEach((list, i) => offsets[i + 1] = offsets[i]! + list.size)
  const partners = new Int32Array(offsets[lists.length]!)
  const weights = new Float64Array(partners.length)
  lists.forEach((list, i) => {
    let entry = offsets[i]!
    for (const [partner, weight] of list) {
      partners[entry] = partner
      weights[entry++] = weight
    }
  })
  return { offsets, partners, weights }
}
