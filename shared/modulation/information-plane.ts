import type { InformationSource } from './information-source'

/**
 * What the receiver does not know, in bit: the equivocation H(X|Y), and Σ_b H(B_b|Y), by the trapezoidal rule on one lattice of nodes
 * shared by all points. The lattice is cut into tiles. In a tile with points s_i in reach, the density Σ p_i·exp(−|y−s_i|²/N0) is a sum
 * of products of one factor a row and one a column, so that no exponential a node and point is needed, and Σ_i p_i(y)·ln p_i(y), which
 * the equivocation subtracts from p·ln p, needs no nodes at all. A tile with one point in reach knows the point: it is skipped, so that
 * far points and high SNR cost nothing. The rule converges as exp(−c/step), the logarithm's zeros beside the real plane being nearest.
 */

/** Distance, in √N0, within which a point counts: exp(−36) of its peak is left there. */
const reach = 6
/** Nodes along a side of a tile, an even number: the coarser rule of every other node is read from the same tile. */
const side = 64
/** Steps, in √N0, are powers of two, so that nodes are exact. */
const firstStep = 1 / 4
const lastStep = 1 / 64
/**
 * A result stands when it changes by less, in bit and relative to itself, from twice the step. A zero of the density in an unlucky place
 * hides an error from this comparison; for two points d·√N0 apart the error is about exp(−d²/4 − π²/(d·step)), at worst 3e-10 with a
 * step of 1/8, but 1e-6 with 1/4, which has to change by far less to stand.
 */
const change = 1e-6
const relativeChange = 1e-3
const changeOfFirst = 1e-10

/** Equivocations in bit: of the symbol, and summed over the bits. */
export interface Equivocation { symbol: number, bits: number }

/** Points in reach of a tile. */
interface Tile { column: number, row: number, points: number[] }

/**
 * Equivocations of a source of 1 or 2 dimensions.
 * @param n0 above 0, signal units squared
 * @returns H(X|Y) and Σ_b H(B_b|Y), each to better than 1e-7 bit; bits is 0 for a source without words
 * @see methods §5; Trefethen and Weideman, The exponentially convergent trapezoidal rule, SIAM Review 56 (2014)
 */
export function planeEquivocation(source: InformationSource, n0: number): Equivocation {
  for (let step = firstStep; ; step /= 2) {
    const [fine, coarse] = trapezoids(source, n0, step)
    const allowed = (result: number) => step === firstStep ? changeOfFirst : Math.min(change, relativeChange * Math.max(result, change))
    const settled = (['symbol', 'bits'] as const).every(kind => Math.abs(fine[kind] - coarse[kind]) < allowed(fine[kind]))
    if (settled || step <= lastStep) return fine
  }
}

/** Equivocations with a step, and with twice the step. */
function trapezoids(source: InformationSource, n0: number, step: number): [Equivocation, Equivocation] {
  const { dimensions, bits } = source
  const fine = { symbol: 0, bits: 0 }
  const coarse = { symbol: 0, bits: 0 }
  const work = workFor(bits.length)
  for (const tile of tilesOf(source, n0, step)) {
    if (tile.points.length > 1) addTile(source, tile, work, n0, step, fine, coarse)
  }
  const scale = (step / Math.sqrt(Math.PI)) ** dimensions / Math.LN2
  return [times(fine, scale), times(coarse, scale * 2 ** dimensions)]
}

const times = ({ symbol, bits }: Equivocation, factor: number): Equivocation => ({ symbol: symbol * factor, bits: bits * factor })

/** The tiles that points reach, each with its points. Node (0, 0) of tile (0, 0) is the origin. */
function tilesOf({ order, dimensions, points }: InformationSource, n0: number, step: number): Iterable<Tile> {
  const tiles = new Map<string, Tile>()
  const unit = 1 / (Math.sqrt(n0) * step)
  const width = reach / step
  for (let i = 0; i < order; i++) {
    const x = points[i * dimensions]! * unit
    const y = dimensions === 2 ? points[2 * i + 1]! * unit : 0
    const lastColumn = Math.floor((x + width) / side)
    // One dimension is one row of a plane.
    const [firstRow, lastRow] = dimensions === 2 ? [Math.floor((y - width) / side), Math.floor((y + width) / side)] : [0, 0]
    for (let column = Math.floor((x - width) / side); column <= lastColumn; column++) {
      for (let row = firstRow; row <= lastRow; row++) {
        const key = `${column},${row}`
        const tile = tiles.get(key)
        if (tile) tile.points.push(i)
        else tiles.set(key, { column, row, points: [i] })
      }
    }
  }
  return tiles.values()
}

/** Buffers of one tile: the density of all points and, for each bit, of those whose bit is 1. */
interface Work { total: Float64Array, ones: Float64Array[], columns: Float64Array, rows: Float64Array }

const workFor = (bits: number): Work => ({
  total: new Float64Array(side * side),
  ones: Array.from({ length: bits }, () => new Float64Array(side * side)),
  columns: new Float64Array(side),
  rows: new Float64Array(side),
})

/** One point's factors along one side of a tile, with their sums Σe and Σe·u², of all nodes and of every other. */
interface Profile { first: number, last: number, sum: number, square: number, evenSum: number, evenSquare: number }

/** One dimension has one row, on which the point lies. */
const single: Profile = { first: 0, last: 0, sum: 1, square: 0, evenSum: 1, evenSquare: 0 }

/** Fills exp(−u²) at the nodes of a side, u the distance from a point in √N0. */
function profile(values: Float64Array, position: number, step: number): Profile {
  const width = reach / step
  const first = Math.max(0, Math.ceil(position - width))
  const last = Math.min(side - 1, Math.floor(position + width))
  const result = { first, last, sum: 0, square: 0, evenSum: 0, evenSquare: 0 }
  for (let n = first; n <= last; n++) {
    const square = ((n - position) * step) ** 2
    const value = Math.exp(-square)
    values[n] = value
    result.sum += value
    result.square += value * square
    if (n % 2 === 0) {
      result.evenSum += value
      result.evenSquare += value * square
    }
  }
  return result
}

function addTile(
  source: InformationSource, tile: Tile, work: Work, n0: number, step: number, fine: Equivocation, coarse: Equivocation,
): void {
  const { dimensions, points, probabilities, words, bits } = source
  const { total, ones, columns, rows } = work
  const size = dimensions === 2 ? side * side : side
  total.fill(0, 0, size)
  for (const density of ones) density.fill(0, 0, size)
  rows[0] = 1
  const unit = 1 / (Math.sqrt(n0) * step)
  for (const i of tile.points) {
    const across = profile(columns, points[i * dimensions]! * unit - tile.column * side, step)
    const along = dimensions === 2 ? profile(rows, points[2 * i + 1]! * unit - tile.row * side, step) : single
    const p = probabilities[i]!
    const logP = Math.log(p)
    fine.symbol -= p * (logP * across.sum * along.sum - across.square * along.sum - across.sum * along.square)
    coarse.symbol -= p * (logP * across.evenSum * along.evenSum - across.evenSquare * along.evenSum - across.evenSum * along.evenSquare)
    addPoint(total, work, across, along, p)
    for (let b = 0; b < bits.length; b++) {
      if (words![i]! & bits[b]!) addPoint(ones[b]!, work, across, along, p)
    }
  }
  for (let n = 0; n < size; n++) {
    const density = total[n]!
    if (density === 0) continue
    const own = density * Math.log(density)
    let ofBits = 0
    for (let b = 0; b < ones.length; b++) {
      const one = ones[b]![n]!
      const zero = density - one
      // A bit that is all but known here adds less than rounding does.
      if (one > 1e-18 * density && zero > 1e-18 * density) ofBits += own - one * Math.log(one) - zero * Math.log(zero)
    }
    fine.symbol += own
    fine.bits += ofBits
    if (n % 2 === 0 && (n / side & 1) === 0) {
      coarse.symbol += own
      coarse.bits += ofBits
    }
  }
}

/** Adds one point's share of a density. */
function addPoint(density: Float64Array, { columns, rows }: Work, across: Profile, along: Profile, p: number): void {
  for (let row = along.first; row <= along.last; row++) {
    const weight = p * rows[row]!
    const start = row * side
    for (let column = across.first; column <= across.last; column++) density[start + column]! += weight * columns[column]!
  }
}
