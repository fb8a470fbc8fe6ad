import type { Candidate } from '#shared/schemas/candidates'
import type { PartName } from '#shared/schemas/parts'
import type { CandidateValues } from '#shared/schemas/values'
import { formatEstimate, formatNumber, plain, plainEstimate } from '#shared/columns'
import type { Column, ColumnContext } from '#shared/columns'
import { lowOf } from '#shared/modulation/estimate'
import type { Interval } from '#shared/modulation/estimate'
import type { CellSave } from './cell-saves'

/** What a cell is drawn from. */
export type CellView = { row: Candidate, column: Column, context: ColumnContext, save: CellSave | null, stale: boolean }

/** The row's mistake at a cell's inputs, as the server found it. */
export function errorAt(row: Candidate, column: Column): string | null {
  if (column.kind === 'computed') return null
  return row.errors.find(error => column.fields.some(field => error.path.split('.')[0] === field))?.message ?? null
}

const failure = (row: Candidate, column: Column) => {
  const errors = row.state === 'failed' || column.kind === 'input' || !column.part ? row.errors : row.parts[column.part]?.errors ?? []
  return errors[0]?.message ?? 'This row cannot be computed.'
}

/** Of a column that is computed when it is shown: a row without points has none, another one computes it as soon as it is asked. */
const partLacking = (row: Candidate, part: PartName): 'computing' | 'failed' | null => {
  if (row.inputs.family === 'entered') return null
  const state = row.parts[part]?.state ?? 'computing'
  return state === 'computed' ? null : state
}

/** Whether a computed cell has no fresh number, and why. */
const lacking = ({ row, column, stale }: CellView): 'computing' | 'failed' | null => {
  if (column.kind === 'input') return null
  if (stale || row.state === 'computing') return 'computing'
  if (row.state === 'failed') return 'failed'
  return column.part ? partLacking(row, column.part) : null
}

/** Where only an interval of the cell's number is known: that. */
export const intervalOf = ({ row, column, context }: Pick<CellView, 'row' | 'column' | 'context'>): Interval | null =>
  column.kind === 'computed' ? column.interval?.(row, context) ?? null : null

/** What the cell says: its number as shown, the text typed but not saved, or in words why there is none. */
export function cellText(view: CellView): string {
  const { row, column, context, save } = view
  if (save) return save.text
  const without = lacking(view)
  if (without === 'failed' && column.id === 'verdict') return `cannot be computed: ${failure(row, column)}`
  if (without) return without
  const interval = intervalOf(view)
  if (interval) return formatEstimate(interval, column.format, column.round)
  const value = column.value(row, context)
  if (value === null) return ''
  return typeof value === 'number' ? formatNumber(value, column.format, column.round) : value
}

/** The full value, for copying and for the line under the grid. */
export function fullText(view: CellView): string {
  const { row, column, context, save } = view
  if (save || lacking(view)) return cellText(view)
  if (column.kind === 'input') return column.text(row.inputs)
  const interval = intervalOf(view)
  if (interval) return plainEstimate(interval)
  const value = column.value(row, context)
  return typeof value === 'number' ? plain(value) : value ?? ''
}

/** What the row's other cells go on counting with while a typed text stands in one without being taken. */
const kept = (row: Candidate, column: Column) =>
  column.kind === 'input' ? ` Until then the row counts with ${column.text(row.inputs) || 'none'}.` : ''

/** The sentence that goes with a cell: a refusal, the row's mistake, or why the cell is not used. */
export function cellSentence(view: CellView): string | null {
  const { row, column, save } = view
  if (save?.state === 'refused') return save.sentence + kept(row, column)
  if (save) return save.state === 'saving' ? 'Being saved.' : save.sentence
  const without = lacking(view)
  if (without === 'failed') return failure(row, column)
  if (without === 'computing') return 'Being computed.'
  return errorAt(row, column) ?? (column.kind === 'input' ? column.unused?.(row.inputs) ?? null : null)
}

/** A text that its cell may cut off is worth repeating in full. */
const longText = (text: string) => text.length > 24 ? text : null

const estimateHint = (view: CellView) => intervalOf(view) && `An estimate: ${cellText(view)}`

/** What a cell says when the pointer rests on it. */
export const cellHint = (view: CellView): string | null => cellSentence(view) ?? estimateHint(view) ?? longText(cellText(view))

/** Whether a judged cell stands on the right side: the row by its must-haves, a surplus by its own sign. */
const judged: Record<string, (values: CandidateValues) => boolean | null> = {
  verdict: values => values.passes,
  surplus: values => values.surplusDb === null ? null : lowOf(values.surplusDb) >= 0,
}

/** Classes of a cell: what it is, and what state it is in. */
export function cellClasses(view: CellView): string[] {
  const { row, column, save } = view
  const without = lacking(view)
  const classes = [column.kind === 'input' ? 'cell-input' : 'cell-computed']
  if (column.type === 'number') classes.push('cell-number')
  if (without) classes.push(`cell-${without}`)
  if (save) classes.push(save.state === 'saving' ? 'cell-saving' : 'cell-refused')
  else if (errorAt(row, column)) classes.push('cell-refused')
  else if (column.kind === 'input' && column.unused?.(row.inputs)) classes.push('cell-unused')
  const right = without || !row.values ? null : judged[column.id]?.(row.values) ?? null
  if (right !== null) classes.push(right ? 'cell-right-side' : 'cell-wrong-side')
  return classes
}

/** Whether the reader may type into a cell: one that its row's family does not use only for a preset, which brings its family. */
export const isEditable = (row: Candidate, column: Column, canEdit: boolean) =>
  canEdit && column.kind === 'input' && (column.presets !== undefined || !column.unused?.(row.inputs))
