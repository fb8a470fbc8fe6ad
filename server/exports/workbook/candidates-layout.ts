import { columns } from '#shared/columns'
import type { CellValue, Column, ColumnContext, NumberFormat } from '#shared/columns'
import { ceilToDigits, floorToDigits } from '#shared/modulation/rounding'
import { verdictKinds } from '#shared/modulation/verdict'
import type { Candidate } from '#shared/schemas/candidates'
import { mustHaveKinds } from '#shared/schemas/requirements'
import type { MustHave, Requirements } from '#shared/schemas/requirements'
import { verdictText } from '../verdict-text'
import { columnLetters } from './addresses'

export const candidatesSheetName = 'Candidates'
/** Titles and units stand above the first candidate. */
export const firstRow = 3

export interface SheetColumn {
  id: string
  title: string
  unit: string
  format: NumberFormat
  width: number
  value: (row: Candidate, context: ColumnContext) => CellValue
}

/** The candidates' sheet: its columns in order, and the letters of each by its id. */
export interface CandidatesLayout {
  columns: SheetColumn[]
  letters: (id: string) => string
}

const roundedDigits = { '0.00': 2, '+0.00': 2, '0.0': 1 } as const
const digitsOf = ({ id, format }: Column) => {
  if (!(format in roundedDigits)) throw new Error(`The export does not know how the column ${id} rounds.`)
  return roundedDigits[format as keyof typeof roundedDigits]
}

/** Columns that the grid shows rounded down or up: the sheet has them so, and their exact numbers further right. */
export const roundedColumns = columns.filter(c => c.round !== 'nearest').map(c => ({ id: c.id, round: c.round, digits: digitsOf(c) }))
export const exactId = (id: string) => `${id}Exact`
export const byId = (mustHave: Pick<MustHave, 'kind'>) => `${mustHave.kind}By`

const rounded = (column: Column): SheetColumn['value'] => {
  const round = column.round === 'down' ? floorToDigits : ceilToDigits
  const digits = digitsOf(column)
  return (row, context) => {
    const value = column.value(row, context)
    return typeof value === 'number' ? round(value, digits) : value
  }
}

const valueOf = (column: Column): SheetColumn['value'] =>
  column.id === 'verdict' ? verdictText : column.round === 'nearest' ? column.value : rounded(column)

const gridColumn = (column: Column): SheetColumn => ({
  id: column.id, title: column.title, unit: column.unit ?? '—', format: column.format, width: Math.min(40, Math.max(11, column.width)),
  value: valueOf(column),
})

const rowNumber = (): SheetColumn => {
  let count = 0
  return { id: 'rowNumber', title: 'Row', unit: '—', format: 'integer', width: 6, value: () => ++count }
}

/** What the row was computed with: its own or the study's. */
const usedColumns: SheetColumn[] = [
  { id: 'lossUsed', title: 'Implementation loss used', unit: 'dB', format: '0.00', width: 14, value: row => row.values?.implementationLossDb ?? null },
  { id: 'rollOffUsed', title: 'Roll-off used', unit: '—', format: 'plain', width: 11, value: row => row.values?.rollOff ?? null },
]

const exactColumns: SheetColumn[] = columns.filter(c => c.round !== 'nearest').map(column => ({
  id: exactId(column.id), title: `${column.title}, exact`, unit: column.unit ?? '—', format: 'plain', width: 20, value: column.value,
}))

/** How far a row is on the right side of a must-have (negative: on the wrong one). The margin's is the exact surplus. */
const byColumns = (mustHaves: readonly MustHave[]): SheetColumn[] => mustHaves.filter(m => m.kind !== 'margin').map(mustHave => ({
  id: byId(mustHave), title: `${mustHave.id}: ${verdictKinds[mustHave.kind].words} to spare`, unit: mustHaveKinds[mustHave.kind].unit,
  format: 'plain', width: 20, value: row => row.values?.checks.find(check => check.kind === mustHave.kind)?.by ?? null,
}))

const identifier: SheetColumn = { id: 'identifier', title: 'Identifier', unit: '—', format: 'plain', width: 24, value: row => row.id }

/** Columns of the candidates' sheet: the grid's, then what its formulas need and nobody else shows. */
export function candidatesLayout({ mustHaves }: Requirements): CandidatesLayout {
  const all = [rowNumber(), ...columns.map(gridColumn), ...usedColumns, ...exactColumns, ...byColumns(mustHaves), identifier]
  const lettersById = new Map(all.map((column, i) => [column.id, columnLetters(i + 1)]))
  return {
    columns: all,
    letters: (id) => {
      const found = lettersById.get(id)
      if (found === undefined) throw new Error(`The export's formulas need the column ${id}.`)
      return found
    },
  }
}
