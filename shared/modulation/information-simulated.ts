import type { Estimate } from './estimate'
import type { InformationSource } from './information-source'
import { seededRandom } from './random'
import type { Random } from './random'

/** How much is simulated, and from which seed. */
export interface InformationSimulation {
  /** any integer; default 1 */
  seed?: number
  /** pairs of noise vectors; default: what takes about a quarter of a second */
  draws?: number
}

/** Pairs of point and received vector that one rate costs at most, and the fewest draws that give a fair interval. */
const defaultPairs = 1e7
const [fewestDraws, mostDraws] = [2048, 65536]
/** Half width of a two-sided interval of 95 %, in standard errors. */
const halfWidth = 1.959964
/** Nearness to all others below which a point is certain: no double tells its equivocation from 0. */
const negligible = 1e-100

/** Equivocations in bit with intervals of 95 %: of the symbol, and summed over the bits (0 without words). */
export interface SimulatedEquivocation { symbol: Estimate, bits: Estimate }

/**
 * Equivocations of a source of any dimension by seeded simulation: H(X|Y) is the mean of log2(Σ_j p_j·L_ij/p_i), L_ij the likelihood
 * ratio of points j and i at what is received. A draw is a pair of received vectors. Where points lie close, in √N0, it is noise and
 * the noise turned round. Where they lie far apart, errors are too rare to meet: then the second vector is drawn about the
 * midpoint to a point j, chosen in proportion to √(p_j/p_i)·exp(−d_ij²/(4·N0)), and both are weighted with their mixture's likelihood,
 * ½ + ½·Σ_j √(p_j·L_ij/p_i)/Z_i. Since ln(1 + Σ a_j) ≤ 0.81·Σ √a_j, a weighted value is at most 2.4·Z_i bit: what is rare is as well known as what is not.
 * @param n0 above 0, signal units squared
 * @see methods §5; Owen and Zhou, Safe and effective importance sampling, J. Am. Stat. Assoc. 95 (2000)
 */
export function simulatedEquivocation(source: InformationSource, n0: number, simulation: InformationSimulation): SimulatedEquivocation {
  const { order, probabilities, bits } = source
  const draws = simulation.draws ?? Math.min(mostDraws, Math.max(fewestDraws, Math.round(defaultPairs / order)))
  const random = seededRandom(simulation.seed ?? 1)
  const observer = observerOf(source, n0, random)
  const symbol = meanOf(draws)
  const ofBits = meanOf(draws)
  // Points in proportion to their probabilities, one from each of as many equal strata as draws.
  let i = 0
  let upTo = probabilities[0]!
  observer.take(0)
  for (let draw = 0; draw < draws; draw++) {
    const position = (draw + random()) / draws
    while (position >= upTo && i < order - 1) {
      upTo += probabilities[++i]!
      observer.take(i)
    }
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

/** Draws received vectors of one sent point after another and keeps what each draw says. */
function observerOf(source: InformationSource, n0: number, random: Random) {
  const { order, dimensions, points, probabilities, words, bits } = source
  const normal = normals(random)
  const deviation = Math.sqrt(n0 / 2)
  const noise = new Float64Array(dimensions)
  const received = new Float64Array(dimensions)
  const nearness = new Float64Array(order)
  const different = new Float64Array(bits.length)
  let sent = 0
  let closeness = 0
  let symbolSum = 0
  let bitSum = 0

  const squaredDistance = (j: number, from: Float64Array, start: number) => {
    let square = 0
    for (let n = 0; n < dimensions; n++) square += (from[start + n]! - points[j * dimensions + n]!) ** 2
    return square
  }

  /** A neighbour, in proportion to nearness. */
  const neighbour = () => {
    let left = random() * closeness
    let last = sent
    for (let j = 0; j < order; j++) {
      if (nearness[j] === 0) continue
      last = j
      left -= nearness[j]!
      if (left < 0) break
    }
    return last
  }

  /** Adds what a received vector says of symbol and bits, with its weight. */
  const receive = (mixed: boolean) => {
    const own = probabilities[sent]!
    const ownDistance = squaredDistance(sent, received, 0)
    let others = 0
    let roots = 0
    different.fill(0)
    for (let j = 0; j < order; j++) {
      if (j === sent) continue
      const ratio = probabilities[j]! / own
      const likelihood = Math.exp((ownDistance - squaredDistance(j, received, 0)) / n0)
      const share = ratio * likelihood
      others += share
      if (mixed) roots += Math.sqrt(share)
      if (!words) continue
      const apart = words[j]! ^ words[sent]!
      for (let b = 0; b < bits.length; b++) {
        if (apart & bits[b]!) different[b]! += share
      }
    }
    const weight = mixed ? 2 / (1 + roots / closeness) : 1
    symbolSum += weight * Math.log1p(others)
    for (const share of different) bitSum += weight * Math.log1p(share / Math.max(1, 1 + others - share))
  }

  return {
    /** Goes on to another sent point. */
    take(i: number) {
      sent = i
      closeness = 0
      for (let j = 0; j < order; j++) {
        const distance = squaredDistance(j, points, i * dimensions)
        nearness[j] = j === i ? 0 : Math.sqrt(probabilities[j]! / probabilities[i]!) * Math.exp(-distance / (4 * n0))
        closeness += nearness[j]!
      }
    },
    draw() {
      symbolSum = 0
      bitSum = 0
      const mixed = closeness < 1
      if (closeness < negligible) return
      for (let n = 0; n < dimensions; n++) {
        noise[n] = deviation * normal()
        received[n] = points[sent * dimensions + n]! + noise[n]!
      }
      receive(mixed)
      const other = mixed ? neighbour() : sent
      for (let n = 0; n < dimensions; n++) {
        const middle = (points[sent * dimensions + n]! + points[other * dimensions + n]!) / 2
        received[n] = middle + (mixed ? deviation * normal() : -noise[n]!)
      }
      receive(mixed)
    },
    /** bit, mean of the draw's two vectors */
    symbol: () => symbolSum / 2 / Math.LN2,
    bits: () => bitSum / 2 / Math.LN2,
  }
}

/** Standard normal numbers, two from each pair of uniform ones (Box and Muller 1958). */
function normals(random: Random): () => number {
  let second: number | null = null
  return () => {
    if (second !== null) {
      const value = second
      second = null
      return value
    }
    const radius = Math.sqrt(-2 * Math.log(1 - random()))
    const angle = 2 * Math.PI * random()
    second = radius * Math.sin(angle)
    return radius * Math.cos(angle)
  }
}
