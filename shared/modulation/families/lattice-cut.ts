import type { LatticeId } from './family'

/** Dimensions of the lattices. */
export const latticeDimensions: Readonly<Record<LatticeId, number>> = { A2: 2, D4: 4, E8: 8 }

/** Squared distances closer than this are equal. */
const tie = 1e-9
/** Number of points to look at beyond M, as a factor on the squared radius from one try to the next. */
const growth = 1.3

/** A lattice in whole or half numbers, to be multiplied by a unit a coordinate: which minimum distance that gives, and which points belong. */
interface Rule {
  minimumDistance: number
  units: readonly number[]
  /** coordinates are whole numbers plus each of these */
  shifts: readonly number[]
  belongs: (sum: number) => boolean
}

const even = (sum: number) => sum % 2 === 0
const rules: Readonly<Record<LatticeId, Rule>> = {
  // The rectangle of 1 × √3 and its middle: whole or half numbers together, d_min 1.
  A2: { minimumDistance: 1, units: [1, Math.sqrt(3)], shifts: [0, 0.5], belongs: () => true },
  // Whole numbers of even sum.
  D4: { minimumDistance: Math.SQRT2, units: [1, 1, 1, 1], shifts: [0], belongs: even },
  // All whole or all half numbers, of even sum.
  E8: { minimumDistance: Math.SQRT2, units: [1, 1, 1, 1, 1, 1, 1, 1], shifts: [0, 0.5], belongs: even },
}

/**
 * The M points of a lattice nearest to an offset, relative to it, in units of the minimum distance.
 * @param offset N coordinates, in minimum distances
 * @returns by distance from the offset; equal distances by falling coordinates, the first counting first
 * @see Conway and Sloane, Sphere Packings, Lattices and Groups, chapter 4
 */
export function latticeCut(id: LatticeId, order: number, offset: readonly number[]): number[][] {
  const { minimumDistance, ...rule } = rules[id]
  const centre = offset.map(x => x * minimumDistance)
  let square = 1
  let found = pointsWithin(rule, centre, square)
  while (found.length < order) found = pointsWithin(rule, centre, square *= growth)
  return found
    .map(point => ({ point, square: Math.round(point.reduce((sum, x) => sum + x * x, 0) / tie) }))
    .sort((a, b) => a.square - b.square || falling(a.point, b.point))
    .slice(0, order)
    .map(({ point }) => point.map(x => x / minimumDistance))
}

/** All points of the lattice within a squared radius about a centre, relative to it: one coordinate after the other. */
function pointsWithin({ units, shifts, belongs }: Omit<Rule, 'minimumDistance'>, centre: readonly number[], square: number): number[][] {
  const found: number[][] = []
  for (const shift of shifts) extend([], 0, square, shift)
  return found

  function extend(point: number[], sum: number, left: number, shift: number): void {
    const n = point.length
    if (n === units.length) {
      if (belongs(sum)) found.push(point)
      return
    }
    const [unit, middle, reach] = [units[n]!, centre[n]!, Math.sqrt(left + tie)]
    const last = Math.floor((middle + reach) / unit - shift)
    for (let k = Math.ceil((middle - reach) / unit - shift); k <= last; k++) {
      const x = (k + shift) * unit - middle
      extend([...point, x], sum + k + shift, Math.max(0, left - x * x), shift)
    }
  }
}

/** Greater coordinates first; those of lattice points that differ do so by far more than rounding. */
function falling(a: readonly number[], b: readonly number[]): number {
  const n = a.findIndex((x, n) => Math.abs(x - b[n]!) > tie)
  return n < 0 ? 0 : b[n]! - a[n]!
}
