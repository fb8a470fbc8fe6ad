import { decisionCells } from '#shared/modulation'
import type { CandidateConstellation } from '#shared/schemas/values'
import type { CanonicalPoints } from '#shared/study/canonical-inputs'
import { geometryOf } from './points'

/** Free space around the outermost point, as a part of its distance from the axes. */
const space = 0.35

/**
 * What the close-up of a row draws, at unit mean energy: points [x, y] (y = 0 for one dimension), decision cells cut to
 * a box of half the side `box`, relevant neighbours with their distances.
 */
export function drawConstellation(constellation: CanonicalPoints): CandidateConstellation {
  const geometry = geometryOf(constellation)
  const { offsets, neighbours, distances, minimumDistance } = geometry
  const { order, dimensions, points, meanEnergy } = geometry.constellation
  const scale = 1 / Math.sqrt(meanEnergy)
  const farthest = points.reduce((most, x) => Math.max(most, Math.abs(x)), 0)
  const half = farthest * (1 + space)
  const indices = Array.from({ length: order }, (_, i) => i)
  return {
    points: indices.map(i => [points[i * dimensions]! * scale, dimensions === 2 ? points[i * dimensions + 1]! * scale : 0]),
    cells: decisionCells(geometry, { left: -half, right: half, bottom: -half, top: half })
      .map(cell => cell.map(corner => corner.map(x => x * scale))),
    box: half * scale,
    neighbours: indices.map(i => Array.from({ length: offsets[i + 1]! - offsets[i]! }, (_, n) => {
      const entry = offsets[i]! + n
      return {
        point: neighbours[entry]!, distance: distances[entry]! * scale,
        nearest: distances[entry]! <= minimumDistance * (1 + 1e-9),
      }
    })),
    minimumDistance: minimumDistance * scale,
  }
}
