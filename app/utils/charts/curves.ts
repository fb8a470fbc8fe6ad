import { bisectLeft } from 'd3'
import type { LineKind } from '../pin-style'
import { heightOf } from './quantities'
import type { Curves, Quantity } from './quantities'

/** A pinned row with curves, as the overlay draws it. */
export type CurveRow = {
  id: string
  name: string
  /** 1 to 12 */
  slot: number
  curves: Curves
  /** dB from Es/N0 to the axis drawn */
  shiftDb: number
  /** on the axis drawn, of the case that decides */
  availableDb: number
  decidingCase: string | null
  /** real dimensions N */
  dimensions: number | null
  /** the row has changed since these curves were computed */
  stale: boolean
}

/** Place in a drawing or on its axes. */
export type Place = readonly [x: number, y: number]

type Sampled = { esN0Db: readonly number[], values: readonly number[] }
const ratio = (db: number) => 10 ** (db / 10)

/** The polynomial of third degree through the four points about a place: rates are smooth in dB. */
function smooth({ esN0Db, values }: Sampled, after: number, at: number): number {
  const first = Math.max(0, Math.min(after - 2, values.length - 4))
  const points = Array.from({ length: Math.min(4, values.length) }, (_, n) => first + n)
  return points.reduce((sum, i) => sum + points.reduce((term, j) => j === i ? term : term * (at - esN0Db[j]!) / (esN0Db[i]! - esN0Db[j]!), values[i]!), 0)
}

/** In the logarithm, linear in the SNR as a ratio: a tail of Q is very nearly so, which keeps 1 dB steps within 0.5 % of the curve. */
function tail({ esN0Db, values }: Sampled, after: number, at: number): number | null {
  const [low, high] = [values[after - 1]!, values[after]!]
  if (!(low > 0) || !(high > 0)) return null
  const from = ratio(esN0Db[after - 1]!)
  const share = (ratio(at) - from) / (ratio(esN0Db[after]!) - from)
  return Math.log10(low) + share * (Math.log10(high) - Math.log10(low))
}

function sampledHeight(curve: Sampled, quantity: Quantity, esN0Db: number): number | null {
  const after = bisectLeft(curve.esN0Db, esN0Db)
  const value = curve.values[after]
  if (value === undefined) return null
  if (curve.esN0Db[after] === esN0Db) return heightOf(quantity, value)
  if (after === 0) return null
  return quantity.logarithmic ? tail(curve, after, esN0Db) : smooth(curve, after, esN0Db)
}

/**
 * Height of a curve between computed points, as it is drawn: an error rate as its common logarithm.
 * @param esN0Db within the row's SNR range
 * @returns null outside the range, and where the rate is too small for a number
 */
export function heightAt(curves: Curves, kind: LineKind, quantity: Quantity, esN0Db: number): number | null {
  return sampledHeight({ esN0Db: curves.esN0Db, values: curves[kind] }, quantity, esN0Db)
}

const crosses = (from: number, to: number, height: number, falling: boolean) => falling ? from >= height && to < height : from < height && to >= height

/**
 * SNR at which a curve comes to a height: where an error rate falls to it, where an information rate rises to it.
 * @returns Es/N0 in dB, null when the curve does not come to that height
 */
export function esN0AtHeight(curves: Curves, kind: LineKind, quantity: Quantity, height: number): number | null {
  const { esN0Db: places } = curves
  for (let i = 1; i < places.length; i++) {
    const [before, after] = [heightAt(curves, kind, quantity, places[i - 1]!), heightAt(curves, kind, quantity, places[i]!)]
    if (before === null || after === null || !crosses(before, after, height, quantity.logarithmic)) continue
    let [low, high] = [places[i - 1]!, places[i]!]
    for (let n = 0; n < 50; n++) {
      const middle = (low + high) / 2
      const there = heightAt(curves, kind, quantity, middle)
      if (there === null || (quantity.logarithmic ? there < height : there >= height)) high = middle
      else low = middle
    }
    return (low + high) / 2
  }
  return null
}

/** Steps between drawn points, in dB: short enough for the eye to see a smooth line. */
const drawnStep = 0.2

function drawn(curve: Sampled, quantity: Quantity, shiftDb: number): Place[] {
  const places = curve.esN0Db
  const line: Place[] = []
  for (let i = 0; i < places.length; i++) {
    const steps = i === 0 ? 1 : Math.min(20, Math.max(1, Math.round((places[i]! - places[i - 1]!) / drawnStep)))
    for (let n = 1; n <= steps; n++) {
      const esN0Db = n === steps ? places[i]! : places[i - 1]! + (places[i]! - places[i - 1]!) * n / steps
      const height = sampledHeight(curve, quantity, esN0Db)
      if (height === null) return line
      line.push([esN0Db + shiftDb, height])
    }
  }
  return line
}

/**
 * One line of a row on the axes drawn, with points between the computed ones. Ends where the rate is too small for a number.
 */
export function lineOf({ curves, shiftDb }: Pick<CurveRow, 'curves' | 'shiftDb'>, kind: LineKind, quantity: Quantity): Place[] {
  return drawn({ esN0Db: curves.esN0Db, values: curves[kind] }, quantity, shiftDb)
}

/** The two edges of the area in which an estimated curve lies; null where the curve is exact. */
export function bandOf({ curves, shiftDb }: Pick<CurveRow, 'curves' | 'shiftDb'>, kind: LineKind, quantity: Quantity): { low: Place[], high: Place[] } | null {
  const band = curves.bands[kind]
  if (!band) return null
  const edge = (values: readonly number[]) => drawn({ esN0Db: curves.esN0Db, values }, quantity, shiftDb)
  return { low: edge(band.low), high: edge(band.high) }
}
