import { halfWidth } from './estimate'
import type { Estimate } from './estimate'
import { observerOf } from './information-observer'
import type { InformationSource } from './information-source'
import { seededRandom } from './random'
import type { Random } from './random'

/** How much is simulated, and from which seed. */
export interface InformationSimulation {
  /** any integer; default 1 */
  seed?: number
  /** pairs of received vectors, made even; default: what takes a fraction of a second */
  draws?: number
}

/** Pairs of point and received vector, by about which one rate's draws are counted out, and the most draws. */
const defaultPairs = 5e6
const mostDraws = 65536

/** Equivocations in bit with intervals of 95 %: of the symbol, and summed over the bits (0 without words). */
export interface SimulatedEquivocation { symbol: Estimate, bits: Estimate }

/** Draws that are made unless others are asked for: at least a pair for each point. */
export const defaultDraws = (order: number) => Math.max(2 * order, Math.min(mostDraws, Math.round(defaultPairs / order)))

/**
 * Equivocations of a source of any dimension by seeded simulation: H(X|Y) is the mean of log2(Σ_j p_j·L_ij/p_i), L_ij the likelihood
 * ratio of points j and i at what is received; how it is drawn: information-observer.ts. The same seed meets the same noise at every N0.
 * The logarithm of p(y|i) scatters with the noise's energy, whose mean is known: what depends on it linearly is taken out again.
 * @param n0 above 0, signal units squared
 * @see methods §5; Owen and Zhou, Safe and effective importance sampling, J. Am. Stat. Assoc. 95 (2000)
 */
export function simulatedEquivocation(source: InformationSource, n0: number, simulation: InformationSimulation): SimulatedEquivocation {
  const random = seededRandom(simulation.seed ?? 1)
  const { sent, weights } = planOf(source, simulation.draws ?? defaultDraws(source.order), random)
  const observer = observerOf(source, n0, random)
  const symbol = meanOf(sent.length)
  const ofBits = meanOf(sent.length)
  sent.forEach((i, draw) => {
    if (i !== sent[draw - 1]) observer.take(i)
    observer.draw()
    const weight = weights[draw]!
    symbol.add(weight * observer.symbol(), weight * observer.excess())
    ofBits.add(weight * observer.bits(), weight * observer.excess())
  })
  return { symbol: symbol.estimate(), bits: source.bits.length > 0 ? ofBits.estimate() : 0 }
}

/** The point that each draw sends, two draws of one stratum after the other, and the draw's weight, 1 on average. */
interface Plan { sent: Uint16Array, weights: Float64Array }

/**
 * Each point is a stratum of its own, with at least one pair of draws, as many as fit its probability. Where draws are fewer than that, each
 * comes from one of as many equal parts of the probability, alike points beside each other.
 */
function planOf(source: InformationSource, draws: number, random: Random): Plan {
  const { order, probabilities } = source
  if (draws >= 2 * order) {
    const pairs = probabilities.map(p => Math.max(1, Math.round(draws * p / 2)))
    const total = 2 * pairs.reduce((sum, count) => sum + count, 0)
    const sent = new Uint16Array(total)
    const weights = new Float64Array(total)
    let from = 0
    for (let i = 0; i < order; i++) {
      const to = from + 2 * pairs[i]!
      sent.fill(i, from, to)
      weights.fill(probabilities[i]! * total / (to - from), from, to)
      from = to
    }
    return { sent, weights }
  }
  const even = 2 * Math.ceil(draws / 2)
  const ranked = byEnergy(source)
  let rank = 0
  let upTo = probabilities[ranked[0]!]!
  const sent = Uint16Array.from({ length: even }, (_, draw) => {
    const position = (draw + random()) / even
    while (position >= upTo && rank < order - 1) upTo += probabilities[ranked[++rank]!]!
    return ranked[rank]!
  })
  return { sent, weights: new Float64Array(even).fill(1) }
}

/** Points from the least energy on: of about the same energy they are about as far inside or outside of the set. */
function byEnergy({ order, dimensions, points }: InformationSource): Uint16Array {
  const energies = Float64Array.from({ length: order }, (_, i) =>
    points.subarray(i * dimensions, (i + 1) * dimensions).reduce((sum, x) => sum + x * x, 0))
  return Uint16Array.from(energies.keys()).sort((a, b) => energies[a]! - energies[b]! || a - b)
}

/**
 * Mean and interval of an even number of values, each with a control of mean 0 whose linear part is taken out. Their scatter is that
 * within pairs of one stratum after the other, since strata differ by more than chance does; no equivocation is below 0.
 */
function meanOf(count: number) {
  let [sum, controlSum] = [0, 0]
  let [squares, products, controlSquares] = [0, 0, 0]
  let first: [number, number] | null = null
  return {
    add(value: number, control: number) {
      sum += value
      controlSum += control
      if (!first) {
        first = [value, control]
        return
      }
      const [difference, controlDifference] = [value - first[0], control - first[1]]
      first = null
      squares += difference * difference
      products += difference * controlDifference
      controlSquares += controlDifference * controlDifference
    },
    estimate(): Estimate {
      const slope = controlSquares > 0 ? products / controlSquares : 0
      const middle = (sum - slope * controlSum) / count
      const error = halfWidth * Math.sqrt(Math.max(0, squares - slope * products)) / count
      return { value: Math.max(0, middle), low: Math.max(0, middle - error), high: Math.max(0, middle + error) }
    },
  }
}
