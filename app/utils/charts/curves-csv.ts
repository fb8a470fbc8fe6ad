import Papa from 'papaparse'
import type { CurveRow } from './curves'
import type { Quantity } from './quantities'
import { snrAxes, snrShiftDb } from './snr-axis'
import type { CandidateValues } from '#shared/schemas/values'

type Column = { title: string, value: (row: CurveRow, i: number) => number | string }

/** A column for each kind of line, and two more for the ends of its intervals where some row has them. */
const columnsOf = (rows: readonly CurveRow[], { title, unit, kinds }: Quantity): Column[] => kinds.flatMap(({ id, title: kind }) => {
  const name = `${title}, ${kind.toLowerCase()}${unit ? `, ${unit}` : ''}`
  const ends = rows.some(({ curves }) => curves.bands[id])
  return [
    { title: name, value: ({ curves }, i) => curves[id][i] ?? '' },
    ...ends
      ? [
          { title: `${name}, low`, value: ({ curves }: CurveRow, i: number) => curves.bands[id]?.low[i] ?? '' },
          { title: `${name}, high`, value: ({ curves }: CurveRow, i: number) => curves.bands[id]?.high[i] ?? '' },
        ]
      : [],
  ] satisfies Column[]
})

/**
 * All computed points of the rows as CSV (RFC 4180), numbers in full: one line a row and SNR value, that value on every
 * axis, and the rates; the ends of an interval where only that is known. A row without a number has an empty cell.
 */
export function curvesCsv(rows: readonly (CurveRow & { values: CandidateValues })[], quantity: Quantity): string {
  const columns = columnsOf(rows, quantity)
  const head = ['Line', 'Name', ...snrAxes.map(({ title }) => `${title}, dB`), ...columns.map(({ title }) => title)]
  const lines = rows.flatMap(row => row.curves.esN0Db.map((esN0Db, i) => [
    row.slot, row.name,
    ...snrAxes.map(({ id }) => {
      const shift = snrShiftDb(id, row.values)
      return shift === null ? '' : esN0Db + shift
    }),
    ...columns.map(({ value }) => value(row, i)),
  ]))
  return Papa.unparse([head, ...lines], { escapeFormulae: true, newline: '\r\n' })
}
