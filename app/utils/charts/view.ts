import { esN0AtLogRate } from './curves'
import type { CurveRow, Place } from './curves'

/** What the overlay shows: SNR in dB, and common logarithms of the rate. */
export type View = { x: readonly [number, number], y: readonly [number, number] }

const limits = { x: { low: -80, high: 160, least: 0.2 }, y: { low: -320, high: 2, least: 0.3 } }

const held = ([from, to]: readonly [number, number], { low, high, least }: { low: number, high: number, least: number }): [number, number] => {
  const width = Math.min(high - low, Math.max(least, to - from))
  const start = Math.min(high - width, Math.max(low, (from + to - width) / 2))
  return [start, start + width]
}
const inLimits = ({ x, y }: View): View => ({ x: held(x, limits.x), y: held(y, limits.y) })

/**
 * The view that a reader starts from: rates from 1 to 1e-9, or to a thousandth of a smaller target; SNR from where the
 * curves leave a rate of 0.3 to where the last one leaves the drawing, available Es/N0 included where it is near.
 * @param target error rate
 */
export function wholeView(rows: readonly CurveRow[], target: number): View {
  const foot = Math.min(-9, Math.floor(Math.log10(target)) - 3)
  const starts: number[] = []
  const ends: number[] = []
  for (const { curves, shiftDb } of rows) {
    const first = curves.esN0Db[0]
    const last = curves.esN0Db.at(-1)
    if (first === undefined || last === undefined) continue
    starts.push(shiftDb + (esN0AtLogRate(curves, 'serExact', Math.log10(0.3)) ?? first))
    ends.push(shiftDb + (esN0AtLogRate(curves, 'serExact', foot) ?? last))
  }
  if (starts.length === 0) return { x: [0, 30], y: [foot, 0] }
  const end = Math.max(...ends)
  const near = rows.map(row => row.availableDb).filter(available => available <= end + 8)
  return inLimits({ x: [Math.floor(Math.min(...starts) - 0.5), Math.ceil(Math.max(end, ...near) + 0.5)], y: [foot, 0] })
}

/** The view magnified about a place of it: a factor above 1 shows less. */
export function magnified({ x, y }: View, about: Place, factor: number): View {
  const scaled = ([from, to]: readonly [number, number], at: number): [number, number] =>
    [at - (at - from) / factor, at + (to - at) / factor]
  return inLimits({ x: scaled(x, about[0]), y: scaled(y, about[1]) })
}

/** The view between two opposite corners. */
export function between(a: Place, b: Place): View {
  return inLimits({ x: [Math.min(a[0], b[0]), Math.max(a[0], b[0])], y: [Math.min(a[1], b[1]), Math.max(a[1], b[1])] })
}

/** The view moved as little as it takes to hold a place. */
export function including({ x, y }: View, place: Place): View {
  const moved = ([from, to]: readonly [number, number], at: number): [number, number] => {
    const by = Math.min(0, at - from) + Math.max(0, at - to)
    return [from + by, to + by]
  }
  return inLimits({ x: moved(x, place[0]), y: moved(y, place[1]) })
}
