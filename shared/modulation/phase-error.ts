import { integrateAdaptively } from './adaptive-quadrature'
import { quickEdgeFlow } from './edge-flow'
import { requireNoiseDensity } from './errors'
import type { Geometry } from './geometry'
import { coreSpan, overPhase, phaseDensity, phaseMass, requirePhaseError } from './phase-density'
import { serExact } from './symbol-error-exact'
import { turnedClassesOf } from './turned-classes'
import type { TurnedClass } from './turned-classes'
import { breaksOf, crossingsOf, turnedDistance, turnedFoot } from './turned-point'

/** Where the composite rule stops, as part of the rate. */
export const phaseTolerance = 1e-8

/** An edge whose exponent exceeds the nearest one's by this much adds less than 1e-12 of it. */
const negligibleExponent = 30

/** Breaks of an integrand that jumps where an edge is crossed are kept apart by this part of σ only. */
const jumpSpacing = 1e-9

/**
 * An integrand that the noise makes smooth needs no breaks nearer to each other than a few times the angle over which noise or phase error
 * spread: 21 nodes do for that.
 * @param radius of the point
 */
export const smoothSpacing = (radius: number, sigma: number, n0: number): number => 3 * Math.min(sigma, Math.sqrt(n0 / 2) / radius)

/**
 * Exact mean symbol error rate under a normal carrier phase error, for two dimensions: the sent point turns against unmoved cells.
 * It need not fall with the SNR, and ends at a floor.
 * @param geometry decision regions of minimum distance, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @param sigmaRad r.m.s. phase error, radians, 0 or more
 * @returns probability; relative error below 1e-7
 * @throws ModulationError with path ['dimensions'] unless there are two, ['sigmaRad'] or ['n0'] for what is no angle or density
 * @see methods §6
 */
export function serWithPhaseError(geometry: Geometry, n0: number, sigmaRad: number): number {
  requirePhaseError(geometry, sigmaRad)
  requireNoiseDensity(n0)
  return sigmaRad === 0 ? serExact(geometry, n0) : meanOverClasses(geometry, n0, sigmaRad, errorAt, smoothSpacing)
}

/**
 * The part of serWithPhaseError in which the phase error alone would not have led to an error: it falls with the SNR throughout, and with
 * serPhaseErrorFloor it bounds the whole.
 * @param geometry decision regions of minimum distance, from analyse
 * @param n0 noise density N0 above 0, signal units squared
 * @param sigmaRad r.m.s. phase error above 0, radians
 */
export function serInsideWithPhaseError(geometry: Geometry, n0: number, sigmaRad: number): number {
  const inside: ErrorAt = (point, phi, density) => isOutside(point, phi) ? 0 : errorAt(point, phi, density)
  return meanOverClasses(geometry, n0, sigmaRad, inside, (_, sigma) => jumpSpacing * sigma)
}

/**
 * Symbol error rate that a normal carrier phase error leaves without noise.
 * @param geometry decision regions of minimum distance, from analyse
 * @param sigmaRad r.m.s. phase error, radians, 0 or more
 * @throws ModulationError as serWithPhaseError
 * @see methods §4, §6; for PSK about 2·Q(π/(M·σ))
 */
export function serPhaseErrorFloor(geometry: Geometry, sigmaRad: number): number {
  requirePhaseError(geometry, sigmaRad)
  if (sigmaRad === 0) return 0
  return turnedClassesOf(geometry).reduce((sum, point) => {
    const angles = point.edges.flatMap(edge => crossingsOf(edge, point.radius)).concat(-Math.PI, Math.PI).sort((a, b) => a - b)
    let missed = 0
    for (let n = 1; n < angles.length; n++) {
      const [from, to] = [angles[n - 1]!, angles[n]!]
      if (isOutside(point, (from + to) / 2)) missed += phaseMass(sigmaRad, from, to)
    }
    return sum + point.weight * missed
  }, 0)
}

type ErrorAt = (point: TurnedClass, phi: number, n0: number) => number

function meanOverClasses(
  geometry: Geometry, n0: number, sigma: number, error: ErrorAt, spacing: (radius: number, sigma: number, n0: number) => number,
): number {
  const density = phaseDensity(sigma)
  let sum = 0
  for (const point of turnedClassesOf(geometry)) {
    sum += point.weight * overPhase(sigma, phaseTolerance / 10, limit => integrateAdaptively(
      phi => density(phi) * error(point, phi, n0),
      breaksOf(point.edges, point.radius, { n0, limit, core: coreSpan * sigma, spacing: spacing(point.radius, sigma, n0) }),
      phaseTolerance, phaseTolerance / 10 * sum / point.weight,
    ))
  }
  return sum
}

function isOutside({ edges, radius }: TurnedClass, phi: number): boolean {
  return edges.some(edge => turnedDistance(edge, radius, phi) < 0)
}

/** Error probability after a turn: the signed sum over the cell's edges, seen from where the point now is. */
function errorAt({ edges, radius }: TurnedClass, phi: number, n0: number): number {
  let sum = 0
  let least = Infinity
  for (const edge of edges) {
    const h = turnedDistance(edge, radius, phi)
    if (h < 0) sum = 1
    least = Math.min(least, squareTo(h, edge.t1 - turnedFoot(edge, radius, phi), edge.t2 - turnedFoot(edge, radius, phi)))
  }
  for (const edge of edges) {
    const h = turnedDistance(edge, radius, phi)
    const foot = turnedFoot(edge, radius, phi)
    if (squareTo(h, edge.t1 - foot, edge.t2 - foot) > least + negligibleExponent * n0) continue
    sum += quickEdgeFlow(h, edge.t1 - foot, edge.t2 - foot, n0)
  }
  return sum
}

/** Square of the least distance to an edge. */
function squareTo(h: number, t1: number, t2: number): number {
  const t = t1 > 0 ? t1 : t2 < 0 ? t2 : 0
  return h * h + t * t
}
