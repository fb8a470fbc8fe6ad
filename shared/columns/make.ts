import type { Candidate, CandidateField, CandidateInputs } from '../schemas/candidates'
import type { CandidateValues } from '../schemas/values'
import { isInterval, mapEstimate, valueOf } from '../modulation/estimate'
import type { Estimate, Interval } from '../modulation/estimate'
import { familyOf } from '../modulation/families'
import type { FamilyParameter } from '../modulation/families'
import type { CellValue, ColumnContext, ComputedColumn, InputColumn } from './column'
import { choiceEntry, numberEntry, numberOf, numberText, textEntry, titleIn } from './entry'
import { formatEnds, formatNumber } from './format'
import type { NumberFormat } from './format'
import { familyChoices } from './words'
import type { Choice } from './words'

type Shared = 'id' | 'title' | 'unit' | 'group' | 'meaning'
type Details = Partial<Pick<InputColumn, 'firstOpening' | 'width' | 'unused' | 'format'>>

/** A column of numbers that the reader enters. */
export const numberInput = (field: CandidateField, about: Pick<InputColumn, Shared>, details: Details = {}): InputColumn => ({
  kind: 'input', type: 'number', fields: [field], format: 'plain', round: 'nearest', firstOpening: false, width: 12,
  text: inputs => numberText(numberOf(inputs, field)),
  parse: numberEntry(field),
  value: row => numberOf(row.inputs, field),
  ...about, ...details,
})

/** A column of words that the reader enters. */
export const textInput = (field: CandidateField, about: Pick<InputColumn, Shared>, details: Details = {}): InputColumn => ({
  kind: 'input', type: 'text', fields: [field], format: 'plain', round: 'nearest', firstOpening: false, width: 24,
  text: inputs => String(inputs[field] ?? ''),
  parse: textEntry(field),
  value: row => String(row.inputs[field] ?? '') || null,
  ...about, ...details,
})

/** A column whose cells are one of a list. `clears`: an empty cell is allowed. */
export const choiceInput = (
  field: CandidateField, choices: readonly Choice[], about: Pick<InputColumn, Shared>, details: Details = {}, clears = false,
): InputColumn => {
  const textOf = (inputs: CandidateInputs) => titleIn(choices, inputs[field] as string | null)
  return {
    kind: 'input', type: 'choice', fields: [field], format: 'plain', round: 'nearest', firstOpening: false, width: 14,
    choices: clears ? [{ value: '', title: '' }, ...choices] : choices,
    text: textOf,
    parse: choiceEntry(field, choices, clears),
    value: row => textOf(row.inputs) || null,
    ...about, ...details,
  }
}

/** Says why a parameter is not used by the row's family, or nothing where it is. */
export const unusedParameter = (parameter: FamilyParameter, what: string) => ({ family }: CandidateInputs): string | null => {
  if (family === 'entered') return `An entered scheme has no ${what}.`
  return familyOf(family).parameters.includes(parameter) ? null : `${titleIn(familyChoices, family)} does not use ${what}.`
}

/** Says that an entered scheme has no points which an input could be about. */
export const unusedByEntered = (what: string) => ({ family }: Pick<CandidateInputs, 'family'>): string | null =>
  family === 'entered' ? `An entered scheme has no ${what}.` : null

type Computed = Pick<ComputedColumn, Shared | 'method' | 'formula' | 'source' | 'tolerance'>
  & Partial<Pick<ComputedColumn, 'firstOpening' | 'width' | 'round' | 'format' | 'value' | 'type' | 'interval'>>
  & { lines?: (values: CandidateValues, row: Candidate, context: ColumnContext) => string[] }

/** A computed column; its lines are asked for only where the row has values. */
export const computed = (about: Computed & Pick<ComputedColumn, 'value' | 'format'>): ComputedColumn => ({
  kind: 'computed', type: 'number', round: 'nearest', firstOpening: false, width: 12,
  ...about,
  lines: (row, context) => row.values && about.lines ? about.lines(row.values, row, context) : [],
})

type NumberKey = { [K in keyof CandidateValues]: CandidateValues[K] extends Estimate | null ? K : never }[keyof CandidateValues]

/** A computed column of a number or an interval of the row. */
export const estimateColumn = (
  estimate: (row: Candidate, context: ColumnContext) => Estimate | null, about: Computed & Pick<ComputedColumn, 'format'>,
): ComputedColumn => computed({
  ...about,
  value: (row, context): CellValue => {
    const known = estimate(row, context)
    return known === null ? null : valueOf(known)
  },
  interval: (row, context): Interval | null => {
    const known = estimate(row, context)
    return known !== null && isInterval(known) ? known : null
  },
})

/** A computed column that shows one of the row's values, divided by `per` to reach the column's unit. */
export const valueColumn = (key: NumberKey, format: NumberFormat, about: Computed, per = 1): ComputedColumn =>
  estimateColumn(({ values }) => {
    const known = values?.[key] ?? null
    return known === null || per === 1 ? known : mapEstimate(known, x => x / per)
  }, { format, ...about })

/** Numbers inside the lines of an explanation: a dash where the row has none, the ends behind one of which only an interval is known. */
export const shown = (value: Estimate | null | undefined, format: NumberFormat = '0.00', round: 'nearest' | 'down' = 'nearest') => {
  if (value === null || value === undefined) return '—'
  return formatNumber(valueOf(value), format, round) + (isInterval(value) ? ` (${formatEnds(value, format)})` : '')
}
