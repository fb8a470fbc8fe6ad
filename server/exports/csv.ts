import Papa from 'papaparse'
import { columns, headerOf } from '#shared/columns'
import { verdictText } from './verdict-text'
import type { StudyExport } from './study-export'

/** How text begins that a spreadsheet may take for a formula, on whatever line of it. Papa Parse's own pattern lets through text of several lines. */
const formula = /^\s*[=+\-@]|^[\t\r]/

/**
 * The grid as CSV (RFC 4180, UTF-8), one header line, full numbers; a page of text at a time.
 * Text that a spreadsheet would take for a formula gets an apostrophe in front.
 */
export async function* csvOf(data: StudyExport): AsyncGenerator<string> {
  const context = { reference: data.reference, requirements: data.study.requirements }
  const options = { escapeFormulae: formula, newline: '\r\n' }
  yield `${Papa.unparse([columns.map(headerOf)], options)}\r\n`
  for await (const page of data.rows()) {
    const lines = page.map(row => columns.map(c => c.id === 'verdict' ? verdictText(row) : c.value(row, context)))
    yield `${Papa.unparse(lines, options)}\r\n`
  }
}
