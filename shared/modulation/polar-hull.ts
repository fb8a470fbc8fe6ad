/** A bound that no decision looks beyond, in units of the farthest point's distance. */
const box = 1e5
/** Constraints violated by no more than this part are met, and weights of no more than this are none: coordinates are rounded. */
const tolerance = 1e-11
const negligible = 1e-12
/** Pivots after which the basis is computed anew, after which the rule is one that cannot go round in circles, and after which it is given up. */
const [renewal, patience, endurance] = [12, 60, 200]
/** Final bases of a cell that are kept: most other points lie behind one of them. */
const remembered = 48

/**
 * One decision cell seen from its point as the polar of a set of points: with a_k the vector to point k, y_k = 2·a_k/|a_k|², the cell is
 * {x: y_k·x ≤ 1 for all k}. Point j is redundant where y_j lies in the hull of the origin and the other y_k.
 */
export class PolarHull {
  readonly y: Float64Array
  /** constraints that have mattered so far, the first ones tried */
  private readonly active: number[] = []
  private readonly isActive: Uint8Array
  private readonly bases: { points: Int32Array, inverse: Float64Array }[] = []
  private readonly inverse: Float64Array
  private readonly basis: Int32Array
  private readonly weights: Float64Array
  private readonly x: Float64Array
  private readonly column: Float64Array
  private readonly direction: Float64Array
  private own = 0

  /**
   * @param order number of other points
   * @param dimensions N
   */
  constructor(private readonly order: number, private readonly dimensions: number) {
    this.y = new Float64Array(order * dimensions)
    this.isActive = new Uint8Array(order)
    this.inverse = new Float64Array(dimensions * dimensions)
    this.basis = new Int32Array(dimensions)
    this.weights = new Float64Array(dimensions)
    this.x = new Float64Array(dimensions)
    this.column = new Float64Array(dimensions)
    this.direction = new Float64Array(dimensions)
  }

  /** Takes up another cell: `y` has been filled, lengths in units of the farthest point's distance. */
  begin(): void {
    this.active.length = 0
    this.bases.length = 0
    this.isActive.fill(0)
  }

  /**
   * The largest y_j·x over the cell without the constraint of j, by the dual simplex method: columns in the basis hold y_j as a sum of
   * weights not below 0, whose sum is at least the largest value; the most violated constraint enters until there is none.
   * @param enough a value at or below which the exact one does not matter
   * @param limit a value above which it does not matter
   * @returns null when it was given up
   * @see Clarkson 1994, More output-sensitive geometric algorithms: constraints known to matter are tried first
   */
  largest(j: number, enough: number, limit: number): number | null {
    if (this.behindKnown(j, enough)) return enough
    this.own = j
    this.start(j)
    for (let pivot = 1; pivot <= endurance; pivot++) {
      const value = this.place()
      const entering = value <= enough ? null : this.violated(j, limit, pivot > patience)
      if (entering === null) return this.verified(enough, limit)
      if (!this.enter(entering, limit)) return null
      if (pivot % renewal === 0 && !this.renew(limit)) return null
    }
    return null
  }

  /** Whether y_j lies in a simplex of other points that has been found before. */
  private behindKnown(j: number, enough: number): boolean {
    const { dimensions, y } = this
    for (let m = this.bases.length - 1; m >= 0; m--) {
      const { points, inverse } = this.bases[m]!
      if (points.includes(j)) continue
      let sum = 0
      let n = 0
      for (; n < dimensions; n++) {
        let weight = 0
        for (let c = 0; c < dimensions; c++) weight += inverse[n * dimensions + c]! * y[j * dimensions + c]!
        if (weight < -negligible) break
        sum += weight
      }
      if (n === dimensions && sum <= enough) return true
    }
    return false
  }

  /**
   * The value of the final basis, computed anew, for the box's size has cost digits; null when it proves nothing. What the box still carries
   * by rounding alone does not count, so that a facet is none that only begins at infinity. A basis of points alone is kept.
   */
  private verified(enough: number, limit: number): number | null {
    if (!this.renew(limit)) return null
    const { basis, weights, inverse } = this
    const bound = weights.reduce((sum, weight, n) => basis[n]! < -1 && weight <= negligible * box ? sum : sum + weight, 0)
    if (bound <= enough) {
      if (this.bases.length === remembered) this.bases.shift()
      if (basis.every(k => k >= 0)) this.bases.push({ points: basis.slice(), inverse: inverse.slice() })
      return bound
    }
    const value = this.place()
    return value > enough && this.violated(this.own, limit, false) === null ? value : null
  }

  /** Inverse and weights computed anew from the basis; false when it does not hold y_j as a sum of weights not below 0. */
  private renew(limit: number): boolean {
    const { dimensions, basis, inverse, weights, y, own } = this
    const columns = Float64Array.from({ length: dimensions * dimensions }, (_, m) => this.entryOf(basis[m % dimensions]!, Math.floor(m / dimensions), limit))
    invert(columns, inverse, dimensions)
    for (let n = 0; n < dimensions; n++) {
      let weight = 0
      for (let c = 0; c < dimensions; c++) weight += inverse[n * dimensions + c]! * y[own * dimensions + c]!
      if (!(weight >= (basis[n]! < -1 ? -negligible * box : -negligible))) return false
      weights[n] = Math.max(0, weight)
    }
    return true
  }

  /** Coordinate c of a column: a point's, −1 the limit's, below that the box's. */
  private entryOf(column: number, c: number, limit: number): number {
    if (column >= 0) return this.y[column * this.dimensions + c]!
    if (column === -1) return this.y[this.own * this.dimensions + c]! / limit
    const side = -2 - column
    return side >> 1 === c ? (side % 2 === 0 ? 1 : -1) / box : 0
  }

  /** The basis of a box around everything: column n is ±e_n/box. */
  private start(j: number): void {
    const { dimensions, inverse, basis, weights, y } = this
    inverse.fill(0)
    for (let n = 0; n < dimensions; n++) {
      const sign = y[j * dimensions + n]! < 0 ? -1 : 1
      inverse[n * dimensions + n] = sign * box
      weights[n] = Math.abs(y[j * dimensions + n]!) * box
      basis[n] = sign < 0 ? -2 * n - 3 : -2 * n - 2
    }
  }

  /** The corner x where all constraints of the basis hold with equality, and y_j·x there. */
  private place(): number {
    const { dimensions, inverse, x, y, own } = this
    let value = 0
    for (let c = 0; c < dimensions; c++) {
      let sum = 0
      for (let n = 0; n < dimensions; n++) sum += inverse[n * dimensions + c]!
      x[c] = sum
      value += sum * y[own * dimensions + c]!
    }
    return value
  }

  private valueAt(k: number): number {
    const { dimensions, x, y } = this
    let sum = 0
    for (let c = 0; c < dimensions; c++) sum += y[k * dimensions + c]! * x[c]!
    return sum
  }

  /**
   * The constraint to enter: −1 stands for y_j·x ≤ limit, numbers below for the box. The first violated one, or the most violated.
   * @returns null when all are met
   */
  private violated(j: number, limit: number, first: boolean): number | null {
    if (this.valueAt(j) > limit * (1 + tolerance)) return -1
    let worst = 1 + tolerance
    let found: number | null = null
    if (first) {
      for (let k = 0; k < this.order; k++) if (k !== j && this.valueAt(k) > worst) return k
      return null
    }
    for (const k of this.active) {
      const value = k === j ? 0 : this.valueAt(k)
      if (value > worst) [worst, found] = [value, k]
    }
    if (found !== null) return found
    for (let k = 0; k < this.order; k++) {
      const value = k === j || this.isActive[k] ? 0 : this.valueAt(k)
      if (value > worst) [worst, found] = [value, k]
    }
    if (found !== null) {
      this.isActive[found] = 1
      this.active.push(found)
    }
    return found
  }

  /** Brings a constraint into the basis for the one whose weight would be the first below 0. */
  private enter(entering: number, limit: number): boolean {
    const { dimensions, inverse, basis, weights, column, direction } = this
    for (let c = 0; c < dimensions; c++) column[c] = this.entryOf(entering, c, limit)
    let leaving = -1
    let step = Infinity
    for (let n = 0; n < dimensions; n++) {
      let sum = 0
      for (let c = 0; c < dimensions; c++) sum += inverse[n * dimensions + c]! * column[c]!
      direction[n] = sum
      if (!(sum > 1e-12)) continue
      const ratio = Math.max(0, weights[n]!) / sum
      if (ratio < step || (ratio === step && basis[n]! < basis[leaving]!)) [step, leaving] = [ratio, n]
    }
    if (leaving < 0) return false
    const pivot = direction[leaving]!
    for (let c = 0; c < dimensions; c++) inverse[leaving * dimensions + c]! /= pivot
    for (let n = 0; n < dimensions; n++) {
      if (n === leaving) continue
      const factor = direction[n]!
      weights[n] = weights[n]! - factor * step
      for (let c = 0; c < dimensions; c++) inverse[n * dimensions + c]! -= factor * inverse[leaving * dimensions + c]!
    }
    weights[leaving] = step
    basis[leaving] = entering
    return true
  }
}

/** Inverse of a matrix, row after row, by Gauss and Jordan with the largest pivot of each column; the matrix is used up. */
function invert(matrix: Float64Array, inverse: Float64Array, size: number): void {
  for (let m = 0; m < size * size; m++) inverse[m] = m % (size + 1) === 0 ? 1 : 0
  for (let c = 0; c < size; c++) {
    let top = c
    for (let r = c + 1; r < size; r++) if (Math.abs(matrix[r * size + c]!) > Math.abs(matrix[top * size + c]!)) top = r
    for (const rows of [matrix, inverse]) {
      for (let n = 0; n < size; n++) [rows[c * size + n], rows[top * size + n]] = [rows[top * size + n]!, rows[c * size + n]!]
    }
    const pivot = matrix[c * size + c]!
    for (const rows of [matrix, inverse]) for (let n = 0; n < size; n++) rows[c * size + n]! /= pivot
    for (let r = 0; r < size; r++) {
      const factor = matrix[r * size + c]!
      if (r === c || factor === 0) continue
      for (const rows of [matrix, inverse]) for (let n = 0; n < size; n++) rows[r * size + n]! -= factor * rows[c * size + n]!
    }
  }
}
