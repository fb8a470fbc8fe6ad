import { integrateAdaptively } from './adaptive-quadrature'
import { berExact } from './bit-error-exact'
import { labelWords } from './bit-error-labels'
import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'
import { requireNoiseDensity } from './errors'
import type { Geometry } from './geometry'
import { onesIn } from './labels/words'
import { coreSpan, overPhase, phaseDensity, phaseMass, requirePhaseError } from './phase-density'
import { phaseTolerance, serWithPhaseError, smoothSpacing } from './phase-error'
import { breaksOf, crossingsOf, turnedEdge } from './turned-point'
import type { TurnedEdge } from './turned-point'
import { diagramEdgesOf, edgesThatMatter, wrongBitsAt } from './wrong-bits'
import type { DiagramEdges } from './wrong-bits'

/** Edges too far away to matter may together take this part of the sum. */
const negligible = 1e-10

/**
 * Exact mean bit error rate under a normal carrier phase error, for two dimensions and any labels.
 * @param geometry decision regions of minimum distance, from analyse, of a constellation with labels
 * @param n0 noise density N0 above 0, signal units squared
 * @param sigmaRad r.m.s. phase error, radians, 0 or more
 * @returns probability; relative error below 1e-7
 * @throws ModulationError with path ['labels'] when there are none; ['dimensions'], ['sigmaRad'], ['n0'] as serWithPhaseError
 * @see methods §3, §6
 */
export function berWithPhaseError(geometry: Geometry, n0: number, sigmaRad: number): number {
  const { constellation } = geometry
  const words = labelWords(constellation)
  requirePhaseError(geometry, sigmaRad)
  requireNoiseDensity(n0)
  if (sigmaRad === 0) return berExact(geometry, n0)
  const diagram = diagramEdgesOf(geometry)
  const density = phaseDensity(sigmaRad)
  // A symbol in error has a wrong bit or more; an edge at distance r carries at most ½·exp(−r²/N0), and k bits a symbol.
  const rate = Math.max(serWithPhaseError(geometry, n0, sigmaRad), Number.MIN_VALUE)
  const reach = n0 * Math.log(diagram.a.length * constellation.bitsPerSymbol / 2 / negligible / rate)
  let sum = 0
  words.forEach((word, i) => {
    const { edges, radius, turn } = turning(constellation, diagram, i)
    const p = probabilityOf(constellation, i)
    sum += p * overPhase(sigmaRad, phaseTolerance / 10, (limit) => {
      const some = edgesThatMatter(diagram, words, word, ...turn(0), Math.sqrt(reach) + 2 * radius * Math.sin(limit / 2))
      const wrong = (phi: number) => {
        const [x, y] = turn(phi)
        return density(phi) * wrongBitsAt(some, words, word, x, y, nearestTo(constellation, x, y), n0, reach)
      }
      const range = { n0, limit, core: coreSpan * sigmaRad, spacing: smoothSpacing(radius, sigmaRad, n0) }
      return integrateAdaptively(wrong, breaksOf(edges, radius, range), phaseTolerance, phaseTolerance / 10 * sum / p)
    })
  })
  return sum / constellation.bitsPerSymbol
}

/**
 * Bit error rate that a normal carrier phase error leaves without noise.
 * @param geometry decision regions of minimum distance, from analyse, of a constellation with labels
 * @param sigmaRad r.m.s. phase error, radians, 0 or more
 * @throws ModulationError as berWithPhaseError
 */
export function berPhaseErrorFloor(geometry: Geometry, sigmaRad: number): number {
  const { constellation } = geometry
  const words = labelWords(constellation)
  requirePhaseError(geometry, sigmaRad)
  if (sigmaRad === 0) return 0
  const diagram = diagramEdgesOf(geometry)
  let sum = 0
  words.forEach((word, i) => {
    const { edges, radius, turn } = turning(constellation, diagram, i)
    const angles = edges.flatMap(edge => crossingsOf(edge, radius)).concat(-Math.PI, Math.PI).sort((a, b) => a - b)
    for (let n = 1; n < angles.length; n++) {
      const [from, to] = [angles[n - 1]!, angles[n]!]
      const bits = onesIn[word ^ words[nearestTo(constellation, ...turn((from + to) / 2))]!]!
      if (bits > 0) sum += probabilityOf(constellation, i) * bits * phaseMass(sigmaRad, from, to)
    }
  })
  return sum / constellation.bitsPerSymbol
}

/** Point i as it turns against all edges. */
function turning(constellation: Constellation, { a, ax, ay, ex, ey, h, t1, t2 }: DiagramEdges, i: number) {
  const [x, y] = [constellation.points[2 * i]!, constellation.points[2 * i + 1]!]
  const edges: TurnedEdge[] = Array.from(a, (_, e) => {
    const [dx, dy] = [x - ax[e]!, y - ay[e]!]
    const foot = dy * ex[e]! - dx * ey[e]!
    return turnedEdge(constellation, i, ex[e]!, ey[e]!, h[e]! - (dx * ex[e]! + dy * ey[e]!), t1[e]! - foot, t2[e]! - foot)
  })
  const turn = (phi: number): [number, number] => {
    const [c, s] = [Math.cos(phi), Math.sin(phi)]
    return [c * x - s * y, s * x + c * y]
  }
  return { edges, radius: Math.hypot(x, y), turn }
}

function nearestTo({ points, order }: Constellation, x: number, y: number): number {
  let best = 0
  let least = Infinity
  for (let j = 0; j < order; j++) {
    const square = (points[2 * j]! - x) ** 2 + (points[2 * j + 1]! - y) ** 2
    if (square < least) {
      best = j
      least = square
    }
  }
  return best
}
