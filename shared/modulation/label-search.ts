import { berAllPairs } from './bit-error-bounds'
import { berExact } from './bit-error-exact'
import { createConstellation } from './constellation'
import type { Constellation } from './constellation'
import { ModulationError, requireNoiseDensity } from './errors'
import { analyse } from './geometry'
import { exchange, improvePoint } from './label-search-exchange'
import { startWords } from './label-search-starts'
import { exactWeights, pairwiseWeights } from './label-search-weights'
import type { PairWeights } from './label-search-weights'
import { labelBits, naturalLabels, wordsOf, written } from './labels/words'

/** What a label search begins with. */
export interface LabelSearchRequest {
  /** its labels are the first start; natural ones without */
  constellation: Constellation
  /** noise density N0 at which the bit error rate is lowered, signal units squared */
  n0: number
  /** any integer */
  seed: number
  /** labellings from which labels are exchanged, 1 to 1000 */
  starts: number
}

/** A label search as plain data: it survives JSON, and a search goes on from any of its states as if it had never stopped. */
export interface LabelSearchState {
  points: number[][]
  probabilities: number[] | null
  n0: number
  seed: number
  starts: number
  /** whether the rate is exact (one and two dimensions) or the union bound over all pairs */
  measure: 'berExact' | 'berAllPairs'
  /** the best labels so far */
  labels: string[]
  /** their bit error rate */
  ber: number
  /** that of the labels at the beginning */
  startBer: number
  /** exchanges of two labels looked at */
  swapsTried: number
  startsDone: number
  done: boolean
  /** labels of the start in hand, as numbers */
  words: number[]
  /** the point whose label is exchanged next, and how many in a row found no better partner */
  next: number
  idle: number
}

/**
 * Prepares a search for labels of a lower bit error rate.
 * @throws ModulationError with path ['labels'] when M is no power of two, ['n0'] or ['starts'] when they are not allowed
 */
export function createLabelSearch({ constellation, n0, seed, starts }: LabelSearchRequest): LabelSearchState {
  requireNoiseDensity(n0)
  if (!(Number.isInteger(starts) && starts >= 1 && starts <= 1000)) {
    throw new ModulationError('A label search has a whole number of starts from 1 to 1,000.', ['starts'])
  }
  const { order, dimensions } = constellation
  const labels = constellation.labels ?? naturalLabels(order)
  if (!labels) throw new ModulationError(`Labels need a power of two of points, and there are ${order}.`, ['labels'])
  const state: LabelSearchState = {
    points: Array.from({ length: order }, (_, i) => [...constellation.points.subarray(i * dimensions, (i + 1) * dimensions)]),
    probabilities: constellation.probabilities && [...constellation.probabilities],
    n0, seed, starts, measure: dimensions <= 2 ? 'berExact' : 'berAllPairs',
    labels: [...labels], ber: NaN, startBer: NaN, swapsTried: 0, startsDone: 0, done: false,
    words: [...wordsOf(labels)], next: 0, idle: 0,
  }
  const ber = rateOf(state, labels)
  return { ...state, ber, startBer: ber }
}

/**
 * Goes on with a label search: binary switching, each point in turn exchanging labels with the partner that lowers the rate most until
 * none does, from the labels given, from random ones, and from the best so far with some labels shaken. The course does not depend on
 * how the work is divided.
 * @param state where the search stands; it is left as it is
 * @param budget milliseconds, or exchanges to look at; at least one point's are
 * @returns where it stands then; its labels are never worse than those of the start
 * @see Zeger and Gersho, "Pseudo-Gray coding", IEEE Trans. Commun. 38 (1990); Schreckenbach et al., IEEE Commun. Lett. 7 (2003)
 */
export function advanceLabelSearch(state: LabelSearchState, budget: { milliseconds: number } | { swaps: number }): LabelSearchState {
  if (state.done) return state
  const weights = weightsOf(state)
  const order = state.points.length
  const end = 'milliseconds' in budget ? performance.now() + budget.milliseconds : Infinity
  const swaps = 'swaps' in budget ? state.swapsTried + budget.swaps : Infinity
  const now = { ...state, words: [...state.words] }
  const words = Uint16Array.from(now.words)
  do {
    if (now.idle === order) {
      finishStart(now, words)
      if (now.done) break
    }
    const partner = improvePoint(words, weights, now.next)
    now.swapsTried += order - 1
    now.idle = partner < 0 ? now.idle + 1 : 0
    if (partner >= 0) exchange(words, now.next, partner)
    now.next = (now.next + 1) % order
  } while (now.swapsTried < swaps && performance.now() < end)
  if (!now.done && now.idle === order) finishStart(now, words)
  return { ...now, words: [...words] }
}

/** Takes the labels found if they are better, and makes those of the next start. */
function finishStart(state: LabelSearchState, words: Uint16Array): void {
  const labels = written(words, labelBits(words.length)!)
  const ber = rateOf(state, labels)
  if (ber < state.ber) {
    state.ber = ber
    state.labels = labels
  }
  state.startsDone++
  state.done = state.startsDone === state.starts
  state.next = 0
  state.idle = 0
  if (!state.done) words.set(startWords(state.points, wordsOf(state.labels), state.seed, state.startsDone))
}

function rateOf({ points, probabilities, n0, measure }: LabelSearchState, labels: readonly string[]): number {
  const constellation = createConstellation(points, { probabilities, labels })
  return measure === 'berExact' ? berExact(analyse(constellation), n0) : berAllPairs(constellation, n0)
}

/** Weights of the search last advanced: they take longer than many exchanges. */
let last: { key: string, weights: PairWeights } | null = null

function weightsOf({ points, probabilities, n0, measure }: LabelSearchState): PairWeights {
  const key = JSON.stringify([points, probabilities, n0])
  if (last?.key !== key) {
    const constellation = createConstellation(points, { probabilities })
    last = { key, weights: measure === 'berExact' ? exactWeights(analyse(constellation), n0) : pairwiseWeights(constellation, n0) }
  }
  return last.weights
}
