import { analyse, createConstellation, familyLabels, fromDecibels, generate, requiredEsN0Db, serExactByPoint } from '../../modulation'
import type { FamilyId, FamilyParameters, Geometry, SymbolErrorKind } from '../../modulation'

/** A family's constellation, with its labels where it has some. */
export const pointsOf = (id: FamilyId, parameters: FamilyParameters) => generate(id, parameters, { labels: familyLabels(id, parameters) })

/** Geometry of a family's constellation. */
export const geometryOf = (id: FamilyId, parameters: FamilyParameters): Geometry => analyse(pointsOf(id, parameters))

/** Mean energy at d_min = 1. */
export const energyAtUnitDistance = (id: FamilyId, order: number) => 1 / geometryOf(id, { order }).minimumDistance ** 2

/** Required Es/N0, dB. */
export const requiredDb = (id: FamilyId, parameters: FamilyParameters, target: number, kind: SymbolErrorKind = 'serExact') =>
  requiredEsN0Db({ geometry: geometryOf(id, parameters), kind }, target)

/** N0 of a set of unit mean energy at an Es/N0 in dB. */
export const n0At = (db: number) => 1 / fromDecibels(db)

/** Simpson's rule over an even number of steps. */
export function simpson(f: (x: number) => number, from: number, to: number, steps = 20_000): number {
  const step = (to - from) / steps
  let sum = f(from) + f(to)
  for (let n = 1; n < steps; n++) sum += (n % 2 === 0 ? 2 : 4) * f(from + n * step)
  return sum * step / 3
}

/**
 * Error of a point amid k others on a circle, with h standard deviations to each of its cell's k edges.
 * The cell is a regular polygon, so this is 2k·T(h, tan(π/k)).
 */
export function polygonError(k: number, h: number): number {
  const circle = Array.from({ length: k }, (_, i) => [Math.cos(2 * Math.PI * i / k), Math.sin(2 * Math.PI * i / k)])
  return serExactByPoint(analyse(createConstellation([[0, 0], ...circle])), 0.5 / (h * h))[0]!
}

/** Error of the middle point of nine in a grid, with h1 and h2 standard deviations to its cell's edges. */
export function rectangleError(h1: number, h2: number): number {
  const grid = [-2 * h1, 0, 2 * h1].flatMap(x => [-2 * h2, 0, 2 * h2].map(y => [x, y]))
  return serExactByPoint(analyse(createConstellation(grid)), 2)[4]!
}
