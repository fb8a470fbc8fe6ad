import type { MethodId } from '../methods'
import type { Interval } from '../modulation/estimate'
import type { PartName } from '../schemas/parts'
import type { Candidate, CandidateChange, CandidateField, CandidateInputs } from '../schemas/candidates'
import type { Requirements } from '../schemas/requirements'
import { formatEnds } from './format'
import type { NumberFormat, Rounding } from './format'

/** What a column may look at beside its row. */
export type ColumnContext = {
  /** the row whose role is reference, if there is one */
  reference: Candidate | null
  requirements: Requirements | null
}

export type CellValue = number | string | null

/** Headings under which columns are chosen, in the order in which they are offered. */
export const columnGroups = [
  'Candidate', 'Verdict', 'Required SNR', 'Amplifier and link', 'Rate and bandwidth', 'Geometry', 'Error rates', 'Information rates',
  'Labels, probabilities, decisions', 'Channel and imperfections', 'More dimensions', 'Signal and model',
] as const
export type ColumnGroup = (typeof columnGroups)[number]

/** What a typed text came to: a change to send, or the sentence that says what is allowed. */
export type Entry = { change: CandidateChange } | { refused: string }

/** The answer to "why this number": a formula, the same with the row's values put in, and what it rests on. */
export type Why = { formula: string, lines: string[], source: string, tolerance: string }

/** A published value that an input cell offers beside free entry: its text there, its title in the list, and all that it sets. */
export type Preset = { text: string, title: string, change: CandidateChange }

interface Base {
  id: string
  title: string
  unit?: string
  group: ColumnGroup
  format: NumberFormat
  round: Rounding
  /** shown before the reader has chosen columns */
  firstOpening: boolean
  /** width of a cell, in characters of the data font */
  width: number
  /** one sentence for the header's tooltip and the Methods page */
  meaning: string
  /** in the column's unit, unrounded; null where the row has no such number */
  value: (row: Candidate, context: ColumnContext) => CellValue
}

export interface InputColumn extends Base {
  kind: 'input'
  type: 'text' | 'number' | 'choice' | 'list' | 'points'
  /** the inputs that the cell shows and changes */
  fields: readonly [CandidateField, ...CandidateField[]]
  choices?: readonly { value: string, title: string }[]
  /** offered beside free entry; one brings its family with it, so that such a cell takes entries in rows of every family */
  presets?: readonly Preset[]
  /** what the cell's editor opens with */
  text: (inputs: CandidateInputs) => string
  /** @param inputs of the row, where what is typed means something for its other inputs */
  parse: (text: string, inputs?: CandidateInputs) => Entry
  /** null: the row's family uses this input; else the sentence that says why not */
  unused?: (inputs: CandidateInputs) => string | null
  /** where the entered value was published, if the product knows */
  source?: (inputs: CandidateInputs) => string | null
}

export interface ComputedColumn extends Base {
  kind: 'computed'
  type: 'text' | 'number'
  /** the part of a row that the number belongs to, which is computed when somebody shows the column; left out: always computed */
  part?: PartName
  /** how the number comes about, on the Methods page */
  method: MethodId
  formula: string
  source: string
  tolerance: string
  /** where only an interval is known, in the column's unit: `value` is then its most likely number; null where the number is exact */
  interval?: (row: Candidate, context: ColumnContext) => Interval | null
  /** the formula with the row's values put in, a line at a time */
  lines: (row: Candidate, context: ColumnContext) => string[]
}

export type Column = InputColumn | ComputedColumn

/** Title with its unit, as headers of the grid and of exports read. */
export const headerOf = (column: Pick<Column, 'title' | 'unit'>) => column.unit ? `${column.title}, ${column.unit}` : column.title

/** How exact a number is of which only an interval is known. */
const estimated = 'an estimate, by seeded simulation between the bounds; its 95 % interval'

/** Why a computed cell holds what it holds; null while there is nothing to explain. */
export function whyOf(column: Column, row: Candidate, context: ColumnContext): Why | null {
  if (column.kind === 'input' || row.values === null) return null
  if (column.part && !row.parts[column.part]?.values) return null
  const interval = column.interval?.(row, context) ?? null
  return {
    formula: column.formula, lines: column.lines(row, context), source: column.source,
    tolerance: interval ? `${estimated}: ${formatEnds(interval, column.format)}${column.unit ? ` ${column.unit}` : ''}` : column.tolerance,
  }
}
