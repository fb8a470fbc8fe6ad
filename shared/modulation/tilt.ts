/** Symbols of unit mean energy as the waveform uses them; im is zero for one dimension. */
export type Symbols = { order: number, dimensions: number, re: Float64Array, im: Float64Array, probability: Float64Array }

export type Direction = { x: number, y: number }

/** Symbol distributions tilted towards each direction, one a strong tap: rows of `order` cumulative sums. */
export type TiltedSymbols = {
  strong: number[]
  /** the second half opposite to the first */
  directions: Direction[]
  tilt: number
  cumulative: Float64Array
  /** last cumulative sum of each row, direction by direction */
  totals: Float64Array
  /** one over the moment generating function of all strong taps together, one a direction */
  inverseMoments: Float64Array
}

/** Directions that a peak may take: both signs of a real signal, twelve phases of a carrier. */
export function directionsOf(dimensions: number): Direction[] {
  const count = dimensions === 1 ? 2 : 12
  return Array.from({ length: count }, (_, j) => ({ x: Math.cos(2 * Math.PI * j / count), y: Math.sin(2 * Math.PI * j / count) }))
}

/** Exponentially tilted distributions p_i·exp(tilt·tap·⟨s_i, u⟩) of the symbol under each strong tap, for each direction u. */
export function tiltedSymbols(symbols: Symbols, strong: number[], directions: Direction[], tilt: number): TiltedSymbols {
  const { order, re, im, probability } = symbols
  const rows = directions.length * strong.length
  const half = directions.length / 2
  const cumulative = new Float64Array(rows * order)
  const totals = new Float64Array(rows)
  const inverseMoments = new Float64Array(directions.length).fill(1)
  for (let j = 0; j < half; j++) {
    const u = directions[j]!
    for (let t = 0; t < strong.length; t++) {
      const row = j * strong.length + t
      const opposite = (j + half) * strong.length + t
      let towards = 0
      let away = 0
      for (let i = 0; i < order; i++) {
        const factor = Math.exp(tilt * strong[t]! * (re[i]! * u.x + im[i]! * u.y))
        towards += probability[i]! * factor
        away += probability[i]! / factor
        cumulative[row * order + i] = towards
        cumulative[opposite * order + i] = away
      }
      totals[row] = towards
      totals[opposite] = away
      inverseMoments[j]! /= towards
      inverseMoments[j + half]! /= away
    }
  }
  return { strong, directions, tilt, cumulative, totals, inverseMoments }
}

/** Rate function tilt·K′ − K of the strong taps' sum in one direction, K its cumulant generating function. */
const rateAt = ({ order, re, im, probability }: Symbols, strong: number[], u: Direction, tilt: number): number => {
  let rate = 0
  for (const tap of strong) {
    let total = 0
    let first = 0
    for (let i = 0; i < order; i++) {
      const projection = tilt * tap * (re[i]! * u.x + im[i]! * u.y)
      const weight = probability[i]! * Math.exp(projection)
      total += weight
      first += weight * projection
    }
    rate += first / total - Math.log(total)
  }
  return rate
}

/**
 * Tilt that brings instants near a level as rare as the exceedance probability p: where the rate function of the strong taps' sum,
 * along both axes on average, is −ln p, which is exact for a Gaussian envelope; but no more than twice the √(−2·N·ln p) of a Gaussian
 * signal. PSK, QAM, PAM and APSK of equal probabilities end at that limit, which left them the least scatter at roll-off 0.05 to 1
 * and p from 1e-4 to 0.1; three times begins to miss levels at roll-off 0.05 (measured). Shaped symbols need less.
 */
export function tiltFor(symbols: Symbols, strong: number[], exceedance: number): number {
  const target = -Math.log(exceedance)
  const axes = [{ x: 1, y: 0 }, { x: 0, y: 1 }].slice(0, symbols.dimensions)
  const tooRare = (tilt: number) => axes.reduce((sum, u) => sum + rateAt(symbols, strong, u, tilt), 0) > target * axes.length
  let high = 2 * Math.sqrt(2 * target * symbols.dimensions)
  if (!tooRare(high)) return high
  let low = 0
  for (let step = 0; step < 8; step++) {
    const middle = (low + high) / 2
    if (tooRare(middle)) high = middle
    else low = middle
  }
  return (low + high) / 2
}
