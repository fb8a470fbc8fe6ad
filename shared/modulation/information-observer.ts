import type { InformationSource } from './information-source'
import type { Random } from './random'

/** Nearness to all others below which a point is certain: no double tells its equivocation from 0. */
const negligible = 1e-100
/** What the points left out may add to an equivocation, in nat, and as a part of all that the others may add. */
const leftOut = 1e-6

/** What draws about one sent point say, each the weighted mean of two received vectors, in bit. */
export interface Observer {
  /** goes on to another sent point */
  take: (i: number) => void
  draw: () => void
  symbol: () => number
  bits: () => number
  /** the noise's energy in N0 above its mean N/2: 0 on average, and what much of the scatter of the others comes from */
  excess: () => number
}

/**
 * Draws received vectors about sent points and asks how much they leave open.
 * A draw is a pair of received vectors. Where points lie close, in √N0, it is noise and the noise turned round. Where they lie far
 * apart, errors are too rare to meet: then the second vector is drawn about the midpoint to a point j, chosen in proportion to
 * nearness √(p_j/p_i)·exp(−d_ij²/(4·N0)), and both are weighted with their mixture's likelihood, ½ + ½·Σ_j √(p_j·L_ij/p_i)/Z_i, L_ij the
 * likelihood ratio and Z_i the sum of nearness. Since ln(1 + Σ a_j) ≤ 0.81·Σ √a_j, a point j adds at most 0.81 of its nearness to the
 * equivocation, in nat: those that add next to nothing are left out, and a weighted value is at most 2.4·Z_i bit, so that what is rare is as well
 * known as what is not.
 * @param n0 above 0, signal units squared
 */
export function observerOf(source: InformationSource, n0: number, random: Random): Observer {
  const { order, dimensions, points, probabilities } = source
  const normal = normals(random)
  const unit = 1 / Math.sqrt(n0)
  const bits = bitsOf(source)
  const width = source.bits.length
  const logarithm = probabilities.map(Math.log)
  // Of the points that count beside the sent one: index, offset in √N0, nearness, and ln(p_j/p_i) − d².
  let count = 0
  const index = new Uint16Array(order)
  const offset = new Float64Array(order * dimensions)
  const nearness = new Float64Array(order)
  const level = new Float64Array(order)
  const noise = new Float64Array(dimensions)
  const received = new Float64Array(dimensions)
  const ones = new Float64Array(width)
  let sent = 0
  let closeness = 0
  let symbolSum = 0
  let bitSum = 0
  let energySum = 0

  const take = (i: number) => {
    sent = i
    closeness = 0
    for (let j = 0; j < order; j++) {
      let square = 0
      for (let n = 0; n < dimensions; n++) square += ((points[j * dimensions + n]! - points[i * dimensions + n]!) * unit) ** 2
      const ratio = logarithm[j]! - logarithm[i]!
      nearness[j] = j === i ? 0 : Math.exp(ratio / 2 - square / 4)
      level[j] = ratio - square
      closeness += nearness[j]!
    }
    const least = leftOut * Math.min(1, closeness) / order
    count = 0
    closeness = 0
    for (let j = 0; j < order; j++) {
      if (nearness[j]! <= least) continue
      for (let n = 0; n < dimensions; n++) offset[count * dimensions + n] = (points[j * dimensions + n]! - points[i * dimensions + n]!) * unit
      closeness += nearness[j]!
      nearness[count] = nearness[j]!
      level[count] = level[j]!
      index[count++] = j
    }
  }

  /** A point that counts, in proportion to nearness. */
  const neighbour = () => {
    let left = random() * closeness
    let c = 0
    while (c < count - 1 && (left -= nearness[c]!) >= 0) c++
    return c
  }

  /** Adds what a received vector, relative to the sent point, says of symbol and bits, with its weight. */
  const receive = (mixed: boolean) => {
    let others = 0
    let roots = 0
    ones.fill(0)
    for (let c = 0; c < count; c++) {
      let along = 0
      for (let n = 0; n < dimensions; n++) along += received[n]! * offset[c * dimensions + n]!
      const root = Math.exp(level[c]! / 2 + along)
      const share = root * root
      roots += root
      others += share
      const row = index[c]! * width
      for (let b = 0; b < width; b++) ones[b]! += share * bits[row + b]!
    }
    const weight = mixed ? 2 / (1 + roots / closeness) : 1
    symbolSum += weight * Math.log1p(others)
    let energy = 0
    for (let n = 0; n < dimensions; n++) energy += received[n]! ** 2
    energySum += weight * (energy - dimensions / 2)
    for (let b = 0; b < width; b++) {
      const different = Math.max(0, bits[sent * width + b]! === 1 ? others - ones[b]! : ones[b]!)
      bitSum += weight * Math.log1p(different / Math.max(1, 1 + others - different))
    }
  }

  const draw = () => {
    symbolSum = 0
    bitSum = 0
    energySum = 0
    if (closeness < negligible) return
    const mixed = closeness < 1
    for (let n = 0; n < dimensions; n++) received[n] = noise[n] = Math.SQRT1_2 * normal()
    receive(mixed)
    const other = mixed ? neighbour() : 0
    for (let n = 0; n < dimensions; n++) {
      received[n] = mixed ? offset[other * dimensions + n]! / 2 + Math.SQRT1_2 * normal() : -noise[n]!
    }
    receive(mixed)
  }
  return { take, draw, symbol: () => symbolSum / 2 / Math.LN2, bits: () => bitSum / 2 / Math.LN2, excess: () => energySum / 2 }
}

/** The bits that count as numbers 0 and 1, point after point. */
function bitsOf({ order, words, bits }: InformationSource): Float64Array {
  return Float64Array.from({ length: order * bits.length }, (_, n) => words![Math.floor(n / bits.length)]! & bits[n % bits.length]! ? 1 : 0)
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
