import { createConstellation } from '#shared/modulation/constellation'
import { mapCells } from '#shared/modulation/power-diagram'
import type { CandidateConstellation } from '#shared/schemas/values'

export type MapPicture = {
  /** cell of each point as a polygon within the box; empty where it has vanished */
  cells: number[][][]
  /** points outside their own cells, and those whose cells have vanished */
  outside: number[]
  vanished: number[]
}

type Corner = readonly [number, number]

/** What of a polygon lies in the half plane u·x ≤ limit. */
function cut(polygon: readonly Corner[], [ux, uy]: Corner, limit: number): Corner[] {
  return polygon.flatMap((corner, n): Corner[] => {
    const before = polygon.at(n - 1)!
    const [a, b] = [before[0] * ux + before[1] * uy - limit, corner[0] * ux + corner[1] * uy - limit]
    const share = a / (a - b)
    const crossing: Corner[] = (a < 0 && b > 0) || (a > 0 && b < 0)
      ? [[before[0] + share * (corner[0] - before[0]), before[1] + share * (corner[1] - before[1])]]
      : []
    return b <= 0 ? [...crossing, corner] : crossing
  })
}

/**
 * Decision regions of MAP decisions at the row's available Es/N0, as the close-up draws them.
 * @returns null where they are not known: more than two dimensions, or nothing available
 * @see methods §2
 */
export function mapPicture({ points, dimensions, probabilities, availableEsN0Db, box }: CandidateConstellation): MapPicture | null {
  if (dimensions > 2 || availableEsN0Db === null || !probabilities) return null
  const constellation = createConstellation(points.map(point => point.slice(0, dimensions)), { probabilities })
  const { offsets, neighbours, edges, outside, vanished } = mapCells(constellation, constellation.meanEnergy * 10 ** (-availableEsN0Db / 10))
  const indexes = points.map((_, i) => i)
  const cells = indexes.map((i) => {
    if (vanished[i]) return []
    let polygon: Corner[] = [[-box, -box], [box, -box], [box, box], [-box, box]]
    const [x, y] = points[i] as [number, number]
    for (let e = offsets[i]!; e < offsets[i + 1]!; e++) {
      const [u, v] = points[neighbours[e]!] as [number, number]
      const length = Math.hypot(u - x, v - y)
      const towards: Corner = [(u - x) / length, (v - y) / length]
      polygon = cut(polygon, towards, x * towards[0] + y * towards[1] + edges.h[e]!)
    }
    return polygon.map(corner => [...corner])
  })
  return { cells, outside: indexes.filter(i => outside[i]), vanished: indexes.filter(i => vanished[i]) }
}

const listed = 12
const list = (points: readonly number[]) => points.slice(0, listed).join(', ') + (points.length > listed ? ` and ${points.length - listed} more` : '')

/** What MAP decisions do to points that they treat unlike their neighbours, in sentences. */
export function mapSentence({ outside, vanished }: Pick<MapPicture, 'outside' | 'vanished'>): string {
  if (outside.length + vanished.length === 0) return 'Decisions are MAP: every point lies in its own cell.'
  return ['Decisions are MAP.',
    ...outside.length > 0 ? [`Outside ${outside.length === 1 ? 'its own cell lies point' : 'their own cells lie points'} ${list(outside)}.`] : [],
    ...vanished.length > 0 ? [`Never decided on, for want of a cell: ${vanished.length === 1 ? 'point' : 'points'} ${list(vanished)}.`] : [],
  ].join(' ')
}
