import type { Estimate } from './estimate'
import { observerOf } from './information-observer'
import type { InformationSource } from './information-source'
import { seededRandom } from './random'

/** How much is simulated, and from which seed. */
export interface InformationSimulation {
  /** any integer; default 1 */
  seed?: number
  /** pairs of received vectors; default: what takes a fraction of a second */
  draws?: number
}

/** Pairs of point and received vector that one rate costs at most, and the fewest draws that give a fair interval. */
const defaultPairs = 5e6
const [fewestDraws, mostDraws] = [2048, 65536]
/** Half width of a two-sided interval of 95 %, in standard errors. */
const halfWidth = 1.959964

/** Equivocations in bit with intervals of 95 %: of the symbol, and summed over the bits (0 without words). */
export interface SimulatedEquivocation { symbol: Estimate, bits: Estimate }

/** Draws that are made unless others are asked for. */
export const defaultDraws = (order: number) => Math.min(mostDraws, Math.max(fewestDraws, Math.round(defaultPairs / order)))

/**
 * Equivocations of a source of any dimension by seeded simulation: H(X|Y) is the mean of log2(Σ_j p_j·L_ij/p_i), L_ij the likelihood
 * ratio of points j and i at what is received; how it is drawn: information-observer.ts. The same seed meets the same noise at every N0.
 * @param n0 above 0, signal units squared
 * @see methods §5; Owen and Zhou, Safe and effective importance sampling, J. Am. Stat. Assoc. 95 (2000)
 */
export function simulatedEquivocation(source: InformationSource, n0: number, simulation: InformationSimulation): SimulatedEquivocation {
  const { order, probabilities, bits } = source
  const draws = simulation.draws ?? defaultDraws(order)
  const random = seededRandom(simulation.seed ?? 1)
  const observer = observerOf(source, n0, random)
  const symbol = meanOf(draws)
  const ofBits = meanOf(draws)
  // Points in proportion to their probabilities, one from each of as many equal strata as draws.
  let i = 0
  let upTo = probabilities[0]!
  let taken = -1
  for (let draw = 0; draw < draws; draw++) {
    const position = (draw + random()) / draws
    while (position >= upTo && i < order - 1) upTo += probabilities[++i]!
    if (i !== taken) observer.take(taken = i)
    observer.draw()
    symbol.add(observer.symbol())
    ofBits.add(observer.bits())
  }
  return { symbol: symbol.estimate(), bits: bits.length > 0 ? ofBits.estimate() : 0 }
}

/** Mean of a known number of values and its interval; no equivocation is below 0. */
function meanOf(count: number) {
  let mean = 0
  let squares = 0
  let seen = 0
  return {
    add(value: number) {
      const before = value - mean
      mean += before / ++seen
      squares += before * (value - mean)
    },
    estimate(): Estimate {
      const error = halfWidth * Math.sqrt(squares / (count - 1) / count)
      return { value: Math.max(0, mean), low: Math.max(0, mean - error), high: Math.max(0, mean + error) }
    },
  }
}
