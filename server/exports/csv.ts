import Papa from 'papaparse'
import { columns, headerOf } from '#shared/columns'
import type { ColumnContext, ComputedColumn } from '#shared/columns'
import type { Candidate } from '#shared/schemas/candidates'
import { verdictText } from './verdict-text'
import type { StudyExport } from './study-export'

/** How text begins that a spreadsheet may take for a formula, on whatever line of it. Papa Parse's own pattern lets through text of several lines. */
const formula = /^\s*[=+\-@]|^[\t\r]/

type Uncertain = ComputedColumn & Required<Pick<ComputedColumn, 'interval'>>
const isUncertain = (column: (typeof columns)[number]): column is Uncertain => column.kind === 'computed' && column.interval !== undefined
/** Columns of which some rows know an interval only: their cell holds the most likely number, but a verdict takes the interval's worse end. */
const uncertain = columns.filter(isUncertain)

const endHeaders = uncertain.flatMap(column => [`${headerOf(column)}, low`, `${headerOf(column)}, high`])

function endsOf(row: Candidate, context: ColumnContext): (number | null)[] {
  return uncertain.flatMap((column) => {
    const interval = column.interval(row, context)
    return [interval?.low ?? null, interval?.high ?? null]
  })
}

/**
 * The grid as CSV (RFC 4180, UTF-8), one header line, full numbers; a page of text at a time.
 * Behind the grid's columns stand the ends of intervals, empty for exact numbers.
 * Text that a spreadsheet would take for a formula gets an apostrophe in front.
 */
export async function* csvOf(data: StudyExport): AsyncGenerator<string> {
  const context = { reference: data.reference, requirements: data.study.requirements }
  const options = { escapeFormulae: formula, newline: '\r\n' }
  yield `${Papa.unparse([[...columns.map(headerOf), ...endHeaders]], options)}\r\n`
  for await (const page of data.rows()) {
    const lines = page.map(row => [
      ...columns.map(c => c.id === 'verdict' ? verdictText(row) : c.value(row, context)), ...endsOf(row, context),
    ])
    yield `${Papa.unparse(lines, options)}\r\n`
  }
}
