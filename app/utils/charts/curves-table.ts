import type { Interval } from '#shared/modulation/estimate'
import { heightAt } from './curves'
import type { CurveRow } from './curves'
import { valueAtHeight } from './quantities'
import type { Band, Quantity } from './quantities'

export type TableLine = { snrDb: number, rates: (number | Interval | null)[][] }

/**
 * The numbers of the drawing in a table: a line for every SNR value that a row was computed at, at most `most` of them,
 * with each row's rates there in the order of the quantity's kinds, as intervals where only these are known.
 */
export function tableLines(rows: readonly CurveRow[], quantity: Quantity, most: number): TableLine[] {
  const places = [...new Set(rows.flatMap(({ curves, shiftDb }) => curves.esN0Db.map(x => Math.round((x + shiftDb) * 1e6) / 1e6)))].sort((a, b) => a - b)
  const stride = Math.ceil(places.length / most)
  return places.filter((_, i) => i % stride === 0).map(snrDb => ({
    snrDb,
    rates: rows.map(({ curves, shiftDb }) => quantity.kinds.map(({ id }) => {
      const esN0Db = onGrid(curves.esN0Db, snrDb - shiftDb)
      const height = heightAt(curves, id, quantity, esN0Db)
      if (height === null) return null
      const value = valueAtHeight(quantity, height)
      const band = curves.bands[id]
      return band ? within(band, curves.esN0Db.indexOf(esN0Db), value) : value
    })),
  }))
}

/** Between computed places an interval's ends are not known. */
const within = ({ low, high }: Band, i: number, value: number): Interval | number => i < 0 ? value : { value, low: low[i]!, high: high[i]! }

/** The computed place itself, where a sum of decimals has missed it by a rounding. */
const onGrid = (places: readonly number[], esN0Db: number) => places.find(place => Math.abs(place - esN0Db) < 1e-6) ?? esN0Db
