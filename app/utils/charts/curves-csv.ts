import Papa from 'papaparse'
import { lineKinds } from './curves'
import type { CurveRow } from './curves'
import { snrAxes, snrShiftDb } from './snr-axis'
import type { CandidateValues } from '#shared/schemas/values'

/**
 * All computed points of the rows as CSV (RFC 4180), numbers in full: one line a row and SNR value, that value on every
 * axis, and the three rates. A row without a number has an empty cell.
 */
export function curvesCsv(rows: readonly (CurveRow & { values: CandidateValues })[]): string {
  const head = ['Line', 'Name', ...snrAxes.map(({ title }) => `${title}, dB`), ...lineKinds.map(({ title }) => `SER, ${title.toLowerCase()}`)]
  const lines = rows.flatMap(({ slot, name, curves, values }) => curves.esN0Db.map((esN0Db, i) => [
    slot, name,
    ...snrAxes.map(({ id }) => {
      const shift = snrShiftDb(id, values)
      return shift === null ? '' : esN0Db + shift
    }),
    ...lineKinds.map(({ field }) => curves[field][i]!),
  ]))
  return Papa.unparse([head, ...lines], { escapeFormulae: true, newline: '\r\n' })
}
