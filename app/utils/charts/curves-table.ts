import { lineKinds, logRateAt } from './curves'
import type { CurveRow } from './curves'

export type TableLine = { snrDb: number, rates: (number | null)[][] }

/**
 * The numbers of the drawing in a table: a line for every SNR value that a row was computed at, at most `most` of them,
 * with each row's three rates there in the order of lineKinds.
 */
export function tableLines(rows: readonly CurveRow[], most: number): TableLine[] {
  const places = [...new Set(rows.flatMap(({ curves, shiftDb }) => curves.esN0Db.map(x => Math.round((x + shiftDb) * 1e6) / 1e6)))].sort((a, b) => a - b)
  const stride = Math.ceil(places.length / most)
  return places.filter((_, i) => i % stride === 0).map(snrDb => ({
    snrDb,
    rates: rows.map(({ curves, shiftDb }) => lineKinds.map(({ field }) => {
      const logRate = logRateAt(curves, field, onGrid(curves.esN0Db, snrDb - shiftDb))
      return logRate === null ? null : 10 ** logRate
    })),
  }))
}

/** The computed place itself, where a sum of decimals has missed it by a rounding. */
const onGrid = (places: readonly number[], esN0Db: number) => places.find(place => Math.abs(place - esN0Db) < 1e-6) ?? esN0Db
