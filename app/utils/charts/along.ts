import type { Place } from './curves'

export type Frame = { left: number, top: number, right: number, bottom: number }

const holds = ({ left, top, right, bottom }: Frame, [x, y]: Place) => x >= left && x <= right && y >= top && y <= bottom

/** The points of a line that lie in a frame, in order. A line of the overlay never comes back once it has left. */
export function inFrame(line: readonly Place[], frame: Frame): Place[] {
  return line.filter(place => holds(frame, place))
}

/**
 * Places along a line at equal distances of arc.
 * @param line corners of the line in pixels
 * @param spacing between two places
 * @param first distance of the first one from the line's beginning
 */
export function along(line: readonly Place[], spacing: number, first: number): Place[] {
  const places: Place[] = []
  let next = first
  let behind = 0
  for (let i = 1; i < line.length; i++) {
    const [x0, y0] = line[i - 1]!
    const [x1, y1] = line[i]!
    const length = Math.hypot(x1 - x0, y1 - y0)
    for (; next <= behind + length && length > 0; next += spacing) {
      const share = (next - behind) / length
      places.push([x0 + share * (x1 - x0), y0 + share * (y1 - y0)])
    }
    behind += length
  }
  return places
}

/** Whether a place is at least so far from every point of a line. */
export function apart([x, y]: Place, line: readonly Place[], distance: number): boolean {
  return line.every(([u, v]) => Math.hypot(u - x, v - y) >= distance)
}

/**
 * Heights for marks that stand on a common line without touching: each takes the lowest level that is free.
 * @param xs places along the line in pixels
 * @param width of a mark
 * @returns level of each mark, from 0
 */
export function levels(xs: readonly number[], width: number): number[] {
  const taken: number[] = []
  const found = xs.map(() => 0)
  for (const i of xs.map((_, n) => n).sort((a, b) => xs[a]! - xs[b]!)) {
    const free = taken.findIndex(right => right <= xs[i]! - width)
    found[i] = free < 0 ? taken.length : free
    taken[found[i]!] = xs[i]!
  }
  return found
}
