import { largest } from './linear-programme'
import { parallelogramsOf } from './parallelograms'
import { PolarHull } from './polar-hull'

/** Pairs of relevant neighbours, each once: methods §1, for three dimensions and more. */
export interface SpaceFacets {
  /** d_min, signal units */
  minimumDistance: number
  first: number[]
  second: number[]
  distance: number[]
}

/** A neighbour is relevant when removing its half space enlarges the cell by more than this part of d_ij²/2. */
const enlargement = 1e-7
/** No value of a linear programme is looked at beyond this. */
const limit = 2

/**
 * Relevant neighbours in any number of dimensions: one linear programme a pair, unless something simpler settles it. A middle to which no
 * third point is as near makes neighbours; a parallelogram of points, as lattices are full of, keeps its longer diagonal's ends apart.
 * @param points M·N coordinates of different points
 * @see methods §1; Clarkson 1994; Gabriel and Sokal 1969
 */
export function spaceFacets(points: Float64Array, dimensions: number): SpaceFacets {
  const order = points.length / dimensions
  const facets: SpaceFacets = { minimumDistance: Infinity, first: [], second: [], distance: [] }
  const hull = new PolarHull(order - 1, dimensions)
  const squares = new Float64Array(order - 1)
  const neighbours = Array.from({ length: order }, (): number[] => [])
  const isDiagonal = parallelogramsOf(points, dimensions)
  for (let i = 0; i < order - 1; i++) {
    const others = nearestFirst(points, dimensions, i)
    const farthest = fillPolar(hull.y, squares, points, dimensions, i, others)
    facets.minimumDistance = Math.min(facets.minimumDistance, Math.sqrt(squares[0]!) * farthest)
    hull.begin()
    others.forEach((j, n) => {
      // A pair counts alike from both of its sides.
      if (j < i || isDiagonal(i, j, neighbours[i]!) || !isRelevant(hull, squares, dimensions, n)) return
      neighbours[i]!.push(j)
      neighbours[j]!.push(i)
      facets.first.push(i)
      facets.second.push(j)
      facets.distance.push(Math.sqrt(squares[n]!) * farthest)
    })
  }
  return facets
}

function nearestFirst(points: Float64Array, dimensions: number, i: number): number[] {
  const order = points.length / dimensions
  const squares = Float64Array.from({ length: order }, (_, j) => squareBetween(points, dimensions, i, j))
  return Array.from({ length: order }, (_, j) => j).filter(j => j !== i).sort((a, b) => squares[a]! - squares[b]!)
}

function squareBetween(points: Float64Array, dimensions: number, i: number, j: number): number {
  let sum = 0
  for (let n = 0; n < dimensions; n++) sum += (points[j * dimensions + n]! - points[i * dimensions + n]!) ** 2
  return sum
}

/** Polar points and squared distances of the others, in units of the farthest one's distance, which is returned. */
function fillPolar(y: Float64Array, squares: Float64Array, points: Float64Array, dimensions: number, i: number, others: readonly number[]): number {
  const farthest = Math.sqrt(squareBetween(points, dimensions, i, others[others.length - 1]!))
  others.forEach((j, n) => {
    const square = squareBetween(points, dimensions, i, j)
    squares[n] = square / farthest / farthest
    for (let c = 0; c < dimensions; c++) {
      y[n * dimensions + c] = 2 * (points[j * dimensions + c]! - points[i * dimensions + c]!) / square * farthest
    }
  })
  return farthest
}

function isRelevant(hull: PolarHull, squares: Float64Array, dimensions: number, n: number): boolean {
  if (isMiddleFree(hull.y, squares, dimensions, n)) return true
  const value = hull.largest(n, 1 + enlargement, limit) ?? largestOfAll(hull.y, squares, dimensions, n)
  return value > 1 + enlargement
}

/** Whether a place just beyond the middle of the pair is in the cell as far as all others are concerned. */
function isMiddleFree(y: Float64Array, squares: Float64Array, dimensions: number, n: number): boolean {
  // In polar coordinates the vector to point n is y_n·|a_n|²/2.
  const scale = squares[n]! / 4 * (1 + 4 * enlargement)
  for (let k = 0; k < squares.length; k++) {
    if (k === n) continue
    let sum = 0
    for (let c = 0; c < dimensions; c++) sum += y[k * dimensions + c]! * y[n * dimensions + c]!
    if (sum * scale > 1) return false
  }
  return true
}

/** The same by the package's solver, in units in which point n is at distance 1. */
function largestOfAll(y: Float64Array, squares: Float64Array, dimensions: number, n: number): number {
  const unit = Math.sqrt(squares[n]!)
  const rows = Array.from(squares, (_, k) => y.subarray(k * dimensions, (k + 1) * dimensions).map(x => x * unit))
  return largest(rows[n]!, rows.filter((_, k) => k !== n), limit)
}
