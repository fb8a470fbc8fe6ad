import type { Candidate } from '#shared/schemas/candidates'
import type { CellValue, Column, ColumnContext } from '#shared/columns'
import { columnOf } from '#shared/columns'
import { parseNumber } from '#shared/columns/entry'

export type Sort = { column: string, descending: boolean }

export const textTests = [
  { value: 'contains', title: 'contains' },
  { value: 'lacks', title: 'does not contain' },
  { value: 'is', title: 'is' },
  { value: 'filled', title: 'has a value' },
  { value: 'blank', title: 'is blank' },
] as const
export const numberTests = [
  { value: 'atLeast', title: 'at least' },
  { value: 'atMost', title: 'at most' },
  { value: 'is', title: 'is' },
  { value: 'filled', title: 'has a value' },
  { value: 'blank', title: 'is blank' },
] as const
export type Test = (typeof textTests)[number]['value'] | (typeof numberTests)[number]['value']

/** One condition on a column; `operand` as typed. */
export type Filter = { column: string, test: Test, operand: string }

export const isNumeric = (column: Column) => column.type === 'number'
export const needsOperand = (test: Test) => test !== 'filled' && test !== 'blank'

const words = new Intl.Collator('en-GB', { numeric: true, sensitivity: 'base' })
const isBlank = (value: CellValue) => value === null || value === '' || (typeof value === 'number' && Number.isNaN(value))

/** Compares two cells; blanks and failures come last in both directions. */
export function compareCells(a: CellValue, b: CellValue, descending: boolean): number {
  const [blankA, blankB] = [isBlank(a), isBlank(b)]
  if (blankA || blankB) return Number(blankA) - Number(blankB)
  const order = typeof a === 'number' && typeof b === 'number' ? a - b : words.compare(String(a), String(b))
  return descending ? -order : order
}

const holdsForNumber = (value: CellValue, test: Test, operand: string) => {
  const limit = parseNumber(operand)
  if (limit === null) return true
  if (typeof value !== 'number') return false
  // A reader who filters for 20.92 means the number shown; 1e-9 covers what typing cannot express.
  if (test === 'is') return Math.abs(value - limit) <= 1e-9 * Math.max(1, Math.abs(limit))
  return test === 'atLeast' ? value >= limit : value <= limit
}

const holdsForText = (value: CellValue, test: Test, operand: string) => {
  const wanted = operand.trim().toLowerCase()
  if (wanted === '') return true
  const text = String(value ?? '').toLowerCase()
  if (test === 'is') return text === wanted
  return test === 'lacks' ? !text.includes(wanted) : text.includes(wanted)
}

/** Whether a cell meets a condition. One without a readable operand does not narrow anything down. */
export function holds(value: CellValue, column: Column, { test, operand }: Filter): boolean {
  if (test === 'filled') return !isBlank(value)
  if (test === 'blank') return isBlank(value)
  return isNumeric(column) ? holdsForNumber(value, test, operand) : holdsForText(value, test, operand)
}

/**
 * The rows that meet every filter, in the order of the sort; rows that compare equal keep the study's order.
 * @param rows in the study's order
 */
export function arrange(rows: readonly Candidate[], sort: Sort | null, filters: readonly Filter[], context: ColumnContext): Candidate[] {
  const conditions = filters.flatMap((filter) => {
    const column = columnOf(filter.column)
    return column ? [{ column, filter }] : []
  })
  const kept = rows.filter(row => conditions.every(({ column, filter }) => holds(column.value(row, context), column, filter)))
  const column = sort && columnOf(sort.column)
  if (!sort || !column) return kept
  return kept
    .map(row => ({ row, value: column.value(row, context) }))
    .sort((a, b) => compareCells(a.value, b.value, sort.descending))
    .map(({ row }) => row)
}

/**
 * What stays of an arrangement when rows come, go or change while the reader has not sorted or filtered again:
 * rows keep their places, gone ones leave, new ones stand behind the row that precedes them in the study.
 */
export function keepArranged(shown: readonly string[], hidden: ReadonlySet<string>, rows: readonly Candidate[]): string[] {
  const present = new Set(rows.map(row => row.id))
  const kept = shown.filter(id => present.has(id))
  const known = new Set(kept)
  const following = new Map<string | null, string[]>()
  let anchor: string | null = null
  for (const { id } of rows) {
    if (known.has(id)) anchor = id
    else if (!hidden.has(id)) following.set(anchor, [...following.get(anchor) ?? [], id])
  }
  return [...following.get(null) ?? [], ...kept.flatMap(id => [id, ...following.get(id) ?? []])]
}
