import { esN0AtHeight } from './curves'
import type { CurveRow, Place } from './curves'
import type { Quantity } from './quantities'
import type { LineKind } from '../pin-style'

/** What the overlay shows: SNR in dB, and heights: common logarithms of an error rate, or an information rate. */
export type View = { x: readonly [number, number], y: readonly [number, number] }

type Limits = { low: number, high: number, least: number }
const limits = {
  x: { low: -80, high: 160, least: 0.2 },
  errorRate: { low: -320, high: 2, least: 0.3 },
  rate: { low: 0, high: 14, least: 0.05 },
} as const satisfies Record<string, Limits>

const held = ([from, to]: readonly [number, number], { low, high, least }: Limits): [number, number] => {
  const width = Math.min(high - low, Math.max(least, to - from))
  const start = Math.min(high - width, Math.max(low, (from + to - width) / 2))
  return [start, start + width]
}
const inLimits = ({ x, y }: View, { logarithmic }: Quantity): View => ({ x: held(x, limits.x), y: held(y, logarithmic ? limits.errorRate : limits.rate) })

/** The line by which a row is placed: exact where it has that, else its bound. */
const mainKind = ({ curves }: CurveRow): LineKind => curves.exact.length > 0 ? 'exact' : 'union'

const spanned = (rows: readonly CurveRow[], quantity: Quantity, first: (row: CurveRow) => number, last: (row: CurveRow) => number) => rows.flatMap((row) => {
  const { curves: { esN0Db }, shiftDb } = row
  if (esN0Db.length === 0) return []
  const at = (height: number) => esN0AtHeight(row.curves, mainKind(row), quantity, height)
  return [{ start: shiftDb + (at(first(row)) ?? esN0Db[0]!), end: shiftDb + (at(last(row)) ?? esN0Db.at(-1)!) }]
})

/** From where curves begin to where they end, available Es/N0 included where it is near. */
const across = (rows: readonly CurveRow[], spans: readonly { start: number, end: number }[]): [number, number] => {
  const end = Math.max(...spans.map(span => span.end))
  const near = rows.map(row => row.availableDb).filter(available => available <= end + 8)
  return [Math.floor(Math.min(...spans.map(span => span.start)) - 0.5), Math.ceil(Math.max(end, ...near) + 0.5)]
}

const highest = ({ curves }: CurveRow) => Math.max(0, ...curves[curves.exact.length > 0 ? 'exact' : 'union'])

function wholeRates(rows: readonly CurveRow[], quantity: Quantity): View {
  const most = Math.max(1, ...rows.map(highest))
  const spans = spanned(rows, quantity, row => 0.05 * highest(row), row => 0.999 * highest(row))
  const y = [0, Math.ceil((most + 0.1) * 2) / 2] as const
  return spans.length === 0 ? { x: [0, 30], y } : inLimits({ x: across(rows, spans), y }, quantity)
}

/**
 * The view that a reader starts from. Error rates: from 1 to 1e-9, or to a thousandth of a smaller target; SNR from where the
 * curves leave a rate of 0.3 to where the last one leaves the drawing, available Es/N0 included where it is near.
 * Information rates: from 0 to the highest, SNR to where the last one is as good as there.
 * @param target error rate
 */
export function wholeView(rows: readonly CurveRow[], quantity: Quantity, target: number): View {
  if (!quantity.logarithmic) return wholeRates(rows, quantity)
  const foot = Math.min(-9, Math.floor(Math.log10(target)) - 3)
  const spans = spanned(rows, quantity, () => Math.log10(0.3), () => foot)
  return spans.length === 0 ? { x: [0, 30], y: [foot, 0] } : inLimits({ x: across(rows, spans), y: [foot, 0] }, quantity)
}

/** The view magnified about a place of it: a factor above 1 shows less. */
export function magnified({ x, y }: View, quantity: Quantity, about: Place, factor: number): View {
  const scaled = ([from, to]: readonly [number, number], at: number): [number, number] =>
    [at - (at - from) / factor, at + (to - at) / factor]
  return inLimits({ x: scaled(x, about[0]), y: scaled(y, about[1]) }, quantity)
}

/** The view between two opposite corners. */
export function between(quantity: Quantity, a: Place, b: Place): View {
  return inLimits({ x: [Math.min(a[0], b[0]), Math.max(a[0], b[0])], y: [Math.min(a[1], b[1]), Math.max(a[1], b[1])] }, quantity)
}

/** The view moved as little as it takes to hold a place. */
export function including({ x, y }: View, quantity: Quantity, place: Place): View {
  const moved = ([from, to]: readonly [number, number], at: number): [number, number] => {
    const by = Math.min(0, at - from) + Math.max(0, at - to)
    return [from + by, to + by]
  }
  return inLimits({ x: moved(x, place[0]), y: moved(y, place[1]) }, quantity)
}
