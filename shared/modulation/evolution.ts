import { seededRandom } from './random'
import type { Simplex } from './nelder-mead'

/**
 * Evolution of a normal distribution over the unit cube, by covariance matrix adaptation: for more variables than a simplex can turn in.
 * Its vertices are the population drawn last. Plain data, one evaluation a step.
 * @see Hansen and Ostermeier, Evol. Comput. 9 (2001); Hansen, The CMA Evolution Strategy: A Tutorial, arXiv:1604.00772
 */
export interface Evolution extends Simplex {
  mean: number[]
  /** step size */
  sigma: number
  /** n·n numbers, row after row */
  covariance: number[]
  stepPath: number[]
  shapePath: number[]
  generation: number
  seed: number
}

/** An evolution that begins at a place. */
export function evolutionFrom(place: readonly number[], sigma: number, seed: number): Evolution {
  const n = place.length
  const evolution: Evolution = {
    vertices: [], values: [], mean: [...place], sigma, seed, generation: 0,
    covariance: Array.from({ length: n * n }, (_, at) => at % (n + 1) === 0 ? 1 : 0),
    stepPath: place.map(() => 0), shapePath: place.map(() => 0),
  }
  drawPopulation(evolution)
  return evolution
}

/**
 * One step: a member of the population gets its value; after the last, the distribution adapts and the next population is drawn.
 * @param f to be minimised; called at most once
 */
export function stepEvolution(evolution: Evolution, f: (place: number[]) => number): void {
  if (!evolution.values.includes(null)) {
    adapt(evolution)
    drawPopulation(evolution)
  }
  const open = evolution.values.indexOf(null)
  evolution.values[open] = f(evolution.vertices[open]!)
}

/** Lower triangle A of a covariance A·Aᵀ, row after row; rounding may not take it below a least variance. */
function triangleOf(covariance: readonly number[], n: number): Float64Array {
  const triangle = new Float64Array(n * n)
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let rest = covariance[i * n + j]!
      for (let k = 0; k < j; k++) rest -= triangle[i * n + k]! * triangle[j * n + k]!
      triangle[i * n + j] = i === j ? Math.sqrt(Math.max(rest, 1e-20)) : rest / triangle[j * n + j]!
    }
  }
  return triangle
}

/** Places drawn from the distribution; those outside the cube count where they are pushed back to. */
function drawPopulation(evolution: Evolution): void {
  const { mean, sigma, covariance, seed, generation } = evolution
  const n = mean.length
  const random = seededRandom(seed * 7919 + generation)
  const triangle = triangleOf(covariance, n)
  evolution.vertices = Array.from({ length: 4 + Math.floor(3 * Math.log(n)) }, () => {
    const z = mean.map(() => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random()))
    return mean.map((x, i) => {
      let y = 0
      for (let k = 0; k <= i; k++) y += triangle[i * n + k]! * z[k]!
      return Math.min(1, Math.max(0, x + sigma * y))
    })
  })
  evolution.values = evolution.vertices.map(() => null)
}

/** z with A·z = y. */
function solved(triangle: Float64Array, y: readonly number[]): number[] {
  const z: number[] = []
  y.forEach((value, i) => {
    let rest = value
    for (let k = 0; k < i; k++) rest -= triangle[i * y.length + k]! * z[k]!
    z.push(rest / triangle[i * y.length + i]!)
  })
  return z
}

/** Weights of the better half, and the rates at which the distribution learns: Hansen's defaults. */
function ratesFor(n: number, size: number) {
  const raw = Array.from({ length: Math.floor(size / 2) }, (_, r) => Math.log(Math.floor(size / 2) + 0.5) - Math.log(r + 1))
  const total = raw.reduce((sum, w) => sum + w, 0)
  const weights = raw.map(w => w / total)
  const effective = 1 / weights.reduce((sum, w) => sum + w * w, 0)
  const ofStep = (effective + 2) / (n + effective + 5)
  const one = 2 / ((n + 1.3) ** 2 + effective)
  return {
    weights, effective, ofStep, one,
    ofShape: (4 + effective / n) / (n + 4 + 2 * effective / n),
    many: Math.min(1 - one, 2 * (effective - 2 + 1 / effective) / ((n + 2) ** 2 + effective)),
    damping: 1 + 2 * Math.max(0, Math.sqrt((effective - 1) / (n + 1)) - 1) + ofStep,
    /** mean length of n normal numbers */
    usual: Math.sqrt(n) * (1 - 1 / (4 * n) + 1 / (21 * n * n)),
  }
}

function adapt(evolution: Evolution): void {
  const { vertices, values, mean, sigma, covariance, stepPath, shapePath, generation } = evolution
  const n = mean.length
  const { weights, effective, ofStep, one, ofShape, many, damping, usual } = ratesFor(n, values.length)
  const order = [...values.keys()].sort((a, b) => values[a]! - values[b]!)
  const ys = weights.map((_, r) => vertices[order[r]!]!.map((x, i) => (x - mean[i]!) / sigma))
  const y = mean.map((_, i) => weights.reduce((sum, w, r) => sum + w * ys[r]![i]!, 0))
  const z = solved(triangleOf(covariance, n), y)

  evolution.mean = mean.map((x, i) => x + sigma * y[i]!)
  evolution.stepPath = stepPath.map((p, i) => (1 - ofStep) * p + Math.sqrt(ofStep * (2 - ofStep) * effective) * z[i]!)
  const length = Math.hypot(...evolution.stepPath)
  const steady = length / Math.sqrt(1 - (1 - ofStep) ** (2 * (generation + 1))) < (1.4 + 2 / (n + 1)) * usual ? 1 : 0
  evolution.shapePath = shapePath.map((p, i) => (1 - ofShape) * p + steady * Math.sqrt(ofShape * (2 - ofShape) * effective) * y[i]!)
  const kept = 1 - one - many + (1 - steady) * one * ofShape * (2 - ofShape)
  evolution.covariance = covariance.map((c, at) => {
    const [i, j] = [Math.floor(at / n), at % n]
    const spread = weights.reduce((sum, w, r) => sum + w * ys[r]![i]! * ys[r]![j]!, 0)
    return kept * c + one * evolution.shapePath[i]! * evolution.shapePath[j]! + many * spread
  })
  evolution.sigma = Math.min(1, sigma * Math.exp(ofStep / damping * (length / usual - 1)))
  evolution.generation++
}
