import { columns } from '#shared/columns'
import type { CellValue, Column, ColumnContext, NumberFormat } from '#shared/columns'
import { highOf, lowOf } from '#shared/modulation/estimate'
import type { Estimate } from '#shared/modulation/estimate'
import { ceilToDigits, floorToDigits } from '#shared/modulation/rounding'
import { verdictKinds } from '#shared/modulation/verdict'
import type { Candidate } from '#shared/schemas/candidates'
import { mustHaveKinds } from '#shared/schemas/requirements'
import type { MustHave, Requirements } from '#shared/schemas/requirements'
import type { CandidateValues } from '#shared/schemas/values'
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

const roundedDigits = { '0.000': 3, '0.00': 2, '+0.00': 2, '0.0': 1 } as const
const digitsOf = ({ id, format }: Column) => {
  if (!(format in roundedDigits)) throw new Error(`The export does not know how the column ${id} rounds.`)
  return roundedDigits[format as keyof typeof roundedDigits]
}

/** Columns that the grid shows rounded down or up: the sheet has them so, and their exact numbers further right. */
export const roundedColumns = columns.filter(c => c.round !== 'nearest').map(c => ({ id: c.id, round: c.round, digits: digitsOf(c) }))
export const exactId = (id: string) => `${id}Exact`
export const byId = (mustHave: Pick<MustHave, 'kind'>) => `${mustHave.kind}By`

const unfavourable = (estimate: Estimate | null | undefined, end: (estimate: Estimate) => number) => estimate === null || estimate === undefined ? null : end(estimate)

/** Columns on which a row is judged stand at the unfavourable end of an interval, from which the sheet's formulas go on. */
const judged: Partial<Record<string, (values: CandidateValues) => CellValue>> = {
  margin: values => unfavourable(values.marginDb, lowOf),
  surplus: values => unfavourable(values.surplusDb, lowOf),
  receiverThreshold: values => unfavourable(values.receiverThresholdDbm, highOf),
}

const exactValue = (column: Column): SheetColumn['value'] => {
  const own = judged[column.id]
  return own ? ({ values }) => values && own(values) : column.value
}

const rounded = (column: Column): SheetColumn['value'] => {
  const round = column.round === 'down' ? floorToDigits : ceilToDigits
  const digits = digitsOf(column)
  return (row, context) => {
    const value = exactValue(column)(row, context)
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

/** What the row was computed with: its own or the study's; of an interval the end at which the row is judged. */
const usedColumns: SheetColumn[] = [
  { id: 'requiredUsed', title: 'Required Es/N0 used', unit: 'dB', format: 'plain', width: 20, value: ({ values }) => unfavourable(values?.requiredEsN0Db, highOf) },
  { id: 'lossUsed', title: 'Implementation loss used', unit: 'dB', format: '0.00', width: 14, value: row => row.values?.implementationLossDb ?? null },
  { id: 'rollOffUsed', title: 'Roll-off used', unit: '—', format: 'plain', width: 11, value: row => row.values?.rollOff ?? null },
]

const exactColumns: SheetColumn[] = columns.filter(c => c.round !== 'nearest').map(column => ({
  id: exactId(column.id), title: `${column.title}, exact`, unit: column.unit ?? '—', format: 'plain', width: 20, value: exactValue(column),
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
