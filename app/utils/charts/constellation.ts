import type { CandidateConstellation } from '#shared/schemas/values'
import { formatNumber } from '#shared/columns/format'
import type { Place } from './curves'

type Neighbours = CandidateConstellation['neighbours'][number]
type Direction = 'left' | 'right' | 'up' | 'down'
const towards: Record<Direction, Place> = { left: [-1, 0], right: [1, 0], up: [0, 1], down: [0, -1] }

/** All polygons as one path: thousands of cells stay one element. */
export function polygonsPath(polygons: readonly (readonly number[][])[], x: (value: number) => number, y: (value: number) => number): string {
  return polygons.filter(polygon => polygon.length > 2)
    .map(polygon => `M${polygon.map(([u, v]) => `${x(u!).toFixed(2)} ${y(v!).toFixed(2)}`).join('L')}Z`).join('')
}

/** All points as one path of lines without length, which round caps draw as dots. */
export function dotsPath(points: readonly number[][], x: (value: number) => number, y: (value: number) => number): string {
  return points.map(([u, v]) => `M${x(u!).toFixed(2)} ${y(v!).toFixed(2)}h0`).join('')
}

/** Index of the point nearest to a place. */
export function pointAt(points: readonly number[][], [x, y]: Place): number {
  let best = 0
  let least = Infinity
  for (let i = 0; i < points.length; i++) {
    const distance = (points[i]![0]! - x) ** 2 + (points[i]![1]! - y) ** 2
    if (distance < least) {
      least = distance
      best = i
    }
  }
  return best
}

/**
 * The point that an arrow key leads to: the nearest one in that direction, where going aside counts double.
 * @returns `from` itself when no point lies there
 */
export function pointTowards(points: readonly number[][], from: number, direction: Direction): number {
  const [ux, uy] = towards[direction]
  const [x, y] = points[from]! as [number, number]
  let best = from
  let least = Infinity
  for (let i = 0; i < points.length; i++) {
    const [dx, dy] = [points[i]![0]! - x, points[i]![1]! - y]
    const ahead = dx * ux + dy * uy
    const aside = Math.abs(dx * uy - dy * ux)
    // Points that lie more to the side than ahead belong to another arrow.
    if (ahead <= 1e-9 || aside > ahead * 1.0001) continue
    const cost = ahead + 2 * aside
    if (cost < least - 1e-9) {
      least = cost
      best = i
    }
  }
  return best
}

export type HalfPlane = { edge: [Place, Place], hatches: [Place, Place][] }

/**
 * The half plane of a pairwise error as it is drawn: a piece of the bisector with strokes on its far side.
 * @param from point sent, pixels
 * @param to neighbour that is mistaken for it, pixels
 */
export function halfPlane(from: Place, to: Place): HalfPlane {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1])
  const [ux, uy] = [(to[0] - from[0]) / length, (to[1] - from[1]) / length]
  const [mx, my] = [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2]
  const half = Math.min(60, 0.42 * length)
  const at = (t: number): Place => [mx - uy * t, my + ux * t]
  const count = Math.max(2, Math.floor(2 * half / 7))
  const depth = Math.min(6, length / 6)
  return {
    edge: [at(-half), at(half)],
    hatches: Array.from({ length: count }, (_, n) => {
      const [x, y] = at(-half + (n + 0.5) * 2 * half / count)
      return [[x, y], [x + depth * (ux - uy * 0.6), y + depth * (uy + ux * 0.6)]]
    }),
  }
}

/** A point's label, its surroundings and how often it is mistaken, in words. */
export function pointWords(index: number, { neighbours, minimumDistance, labels, errorByPoint, availableEsN0Db }: CandidateConstellation): string {
  const label = labels ? `, label ${labels[index]}` : ''
  const error = errorByPoint && availableEsN0Db !== null
    ? `; mistaken with probability ${formatNumber(errorByPoint[index]!, '0.00e-0')} at the available ${formatNumber(availableEsN0Db, '0.00', 'down')} dB`
    : ''
  return `${pointSentence(index, neighbours[index]!, minimumDistance)}${label}${error}.`
}

/** What a point's surroundings are, in words. */
export function pointSentence(index: number, neighbours: Neighbours, minimumDistance: number): string {
  const nearest = neighbours.filter(neighbour => neighbour.nearest).length
  return `Point ${index}: ${neighbours.length} relevant ${neighbours.length === 1 ? 'neighbour' : 'neighbours'}, `
    + `${nearest === 0 ? 'none' : nearest} at the minimum distance ${formatNumber(minimumDistance, '0.000')}`
}
