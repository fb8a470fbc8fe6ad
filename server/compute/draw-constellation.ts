import { boundShares, decisionCells, serExactByPoint, serMapByPoint } from '#shared/modulation'
import type { Geometry } from '#shared/modulation'
import type { CandidateConstellation } from '#shared/schemas/values'
import type { CanonicalInputs, CanonicalPoints } from '#shared/study/canonical-inputs'
import { modelOf } from './error-rates'
import type { RowModel } from './error-rates'
import { labelledGeometryOf, noiseDensityAt } from './points'
import { availableAt, settingOf } from './setting'

/** What the close-up is drawn from: the points alone, and the row where it can be computed. */
export interface DrawnRow { points: CanonicalPoints, row: CanonicalInputs | null }

/** Free space around the outermost point, as a part of its distance from the axes. */
const space = 0.35

const range = (count: number) => Array.from({ length: count }, (_, i) => i)

function errorsOf({ decision, channel, phaseErrorDeg }: RowModel, geometry: Geometry, n0: number): number[] | null {
  if (channel || phaseErrorDeg || geometry.constellation.dimensions > 2) return null
  return [...decision === 'map' ? serMapByPoint(geometry.constellation, n0) : serExactByPoint(geometry, n0)]
}

/** Available Es/N0 of a row in dB, and there each neighbour's share of the bound and each point's errors. */
function errorsAt(row: CanonicalInputs | null, geometry: Geometry) {
  const model = row && modelOf(row)
  if (!model) return { availableEsN0Db: null, shares: null, errorByPoint: null }
  const availableEsN0Db = availableAt(row, settingOf(row))
  const n0 = noiseDensityAt(geometry.constellation, availableEsN0Db)
  // MAP decisions move the boundaries, and with them the terms of their bound.
  const shares = model.decision === 'map' ? null : boundShares(geometry, n0)
  return { availableEsN0Db, shares, errorByPoint: errorsOf(model, geometry, n0) }
}

/**
 * What the close-up of a row draws, at unit mean energy: points [x, y] (y = 0 for one dimension), decision cells cut to
 * a box of half the side `box`, relevant neighbours with their distances and, where decisions are by minimum distance, their shares of the bound.
 */
export function drawConstellation({ points: canonical, row }: DrawnRow): CandidateConstellation {
  const geometry = labelledGeometryOf(canonical)
  const { offsets, neighbours, distances, minimumDistance } = geometry
  const { order, dimensions, points, meanEnergy, labels, probabilities } = geometry.constellation
  const { availableEsN0Db, shares, errorByPoint } = errorsAt(row, geometry)
  const scale = 1 / Math.sqrt(meanEnergy)
  const farthest = points.reduce((most, x) => Math.max(most, Math.abs(x)), 0)
  const half = farthest * (1 + space)
  return {
    dimensions,
    points: range(order).map(i => [points[i * dimensions]! * scale, dimensions > 1 ? points[i * dimensions + 1]! * scale : 0]),
    cells: dimensions > 2
      ? []
      : decisionCells(geometry, { left: -half, right: half, bottom: -half, top: half }).map(cell => cell.map(corner => corner.map(x => x * scale))),
    box: half * scale,
    neighbours: range(order).map((i) => {
      const [first, end] = [offsets[i]!, offsets[i + 1]!]
      return range(end - first).map(n => ({
        point: neighbours[first + n]!, distance: distances[first + n]! * scale,
        nearest: distances[first + n]! <= minimumDistance * (1 + 1e-9), share: shares?.[first + n] ?? null,
      }))
    }),
    minimumDistance: minimumDistance * scale,
    labels, probabilities: probabilities && [...probabilities], errorByPoint, availableEsN0Db,
  }
}
