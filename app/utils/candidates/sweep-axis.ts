import { apskPresets } from '#shared/modulation/families'
import { presetFields } from '#shared/schemas/sweeps'
import type { SweepAxis, SweepField } from '#shared/schemas/sweeps'
import { presetSource } from '#shared/study/apsk-presets'
import { commaAmong, parseFraction, parseNumber } from '#shared/columns/entry'
import { backOffChoices, familyChoices, normalisationChoices } from '#shared/columns/words'
import type { Choice } from '#shared/columns/words'

/** Ring sets of the standard: "16-APSK 9/10, at 2.57". */
const presetChoices: readonly Choice[] = apskPresets.map(({ title, ratios }) =>
  ({ value: title, title: `${title} at ${ratios.map(ratio => ratio.toFixed(2)).join(', ')}` }))
const presetsOf = (order: string) => ({ title: `all of ${order}`, values: presetChoices.map(({ value }) => value).filter(value => value.startsWith(order)) })

/** One parameter that a sweep can vary, in the reader's words. */
export interface SweepParameter {
  value: SweepField
  title: string
  example: string
  /** where its values are words of a list */
  choices?: readonly Choice[]
  /** several of the list that are ticked together */
  sets?: readonly { title: string, values: readonly string[] }[]
  /** what its words stand for, or in which rows it counts */
  hint?: string
}

export const sweepParameters: readonly SweepParameter[] = [
  { value: 'order', title: 'Order M', example: '4, 8, 16, 32' },
  {
    value: 'preset', title: 'ETSI APSK rings', example: '', choices: presetChoices, sets: [presetsOf('16-APSK'), presetsOf('32-APSK')],
    hint: `Rings, ratios and phases of ${presetSource}.`,
  },
  { value: 'rings', title: 'Rings', example: '4+12; 5+11; 1+5+10' },
  { value: 'ratios.0', title: 'First ring ratio', example: '2.0 to 3.2 step 0.05' },
  { value: 'ratios.1', title: 'Second ring ratio', example: '4.0 to 5.4 step 0.1' },
  { value: 'ratios.2', title: 'Third ring ratio', example: '6.0 to 7.0 step 0.1' },
  { value: 'family', title: 'Family', example: '', choices: familyChoices.filter(choice => choice.value !== 'entered') },
  { value: 'rollOff', title: 'Roll-off α', example: '0.05, 0.15, 0.25' },
  { value: 'backOff', title: 'Back-off from', example: '', choices: backOffChoices },
  { value: 'backOffDb', title: 'Entered back-off, dB', example: '2 to 8 step 0.5' },
  { value: 'implementationLossDb', title: 'Implementation loss, dB', example: '0 to 3 step 0.5' },
  { value: 'normalisation', title: 'Normalisation', example: '', choices: normalisationChoices },
  { value: 'spacing', title: 'Spacing, signal units', example: '0.5, 1, 2' },
  { value: 'codeRate', title: 'Code rate r', example: '1/2, 2/3, 3/4, 5/6', hint: 'Rates below 1 count in rows whose basis is a rate threshold or entered.' },
  { value: 'decoderGapDb', title: 'Decoder gap, dB', example: '0.5 to 1.5 step 0.25', hint: 'Counts in rows whose basis is a rate threshold.' },
  { value: 'shapedEntropy', title: 'Wanted entropy H, bit/symbol', example: '3 to 4 step 0.1', hint: 'Counts in rows of shaped probabilities.' },
  { value: 'branches', title: 'Branches L', example: '1, 2, 4', hint: 'Counts in rows of a fading channel.' },
  { value: 'phaseErrorDeg', title: 'Carrier phase error, °', example: '0 to 6 step 1' },
]

export type AxisEntry = { field: SweepField, text: string }

/** Parameters that cannot be varied beside these: themselves, and what a preset sets beside the preset. */
export const takenBy = (fields: readonly SweepField[]): SweepField[] => [
  ...fields,
  ...fields.includes('preset') ? presetFields : [],
  ...fields.some(field => presetFields.includes(field)) ? ['preset' as const] : [],
]

const range = /^(.+?)\s+to\s+(.+?)\s+step\s+(.+)$/i

/** Orders are whole numbers, which a comma may part; "2,57" of anything else is one number with a decimal comma. */
const commaIn = (field: SweepField, text: string): string | null => field === 'order' ? null : commaAmong(text)

const listOf = (field: SweepField, text: string): SweepAxis | { refused: string } => {
  const pieces = text.split(/[;,\s]+/).filter(piece => piece !== '')
  const values = pieces.map(field === 'codeRate' ? parseFraction : parseNumber)
  const bad = values.indexOf(null)
  return bad >= 0 ? { refused: `“${pieces[bad]}” is not a number.` } : { field, values: values as number[] }
}

const ringsOf = (field: SweepField, text: string): SweepAxis | { refused: string } => {
  const sets = text.split(/[;,]+/).map(set => set.trim()).filter(set => set !== '')
  const values = sets.map(set => set.split('+').map(parseNumber))
  const bad = values.findIndex(rings => rings.includes(null))
  return bad >= 0 ? { refused: `“${sets[bad]}” is no set of rings: enter them as 4+12.` } : { field, values: values as number[][] }
}

const wordsOf = (field: SweepField, text: string, choices: readonly Choice[]): SweepAxis | { refused: string } => {
  const values = text.split(',').filter(word => word !== '')
  const unknown = values.find(word => !choices.some(choice => choice.value === word))
  return unknown ? { refused: `“${unknown}” is not one of the list.` } : { field, values }
}

/**
 * Reads the values of one parameter: a list ("4, 8, 16"), a range ("2 to 3 step 0.05"), sets of rings ("4+12; 5+11"),
 * or words of a list by their values.
 */
export function parseAxis({ field, text }: AxisEntry): SweepAxis | { refused: string } {
  const typed = text.trim()
  if (typed === '') return { refused: 'Enter at least one value.' }
  const choices = sweepParameters.find(parameter => parameter.value === field)?.choices
  if (choices) return wordsOf(field, typed, choices)
  if (field === 'rings') return ringsOf(field, typed)
  const comma = commaIn(field, typed)
  if (comma) return { refused: comma }
  const parts = range.exec(typed)
  if (!parts) return listOf(field, typed)
  const [start, stop, step] = parts.slice(1).map(part => parseNumber(part))
  return typeof start === 'number' && typeof stop === 'number' && typeof step === 'number'
    ? { field, start, stop, step }
    : { refused: 'Enter a range as 2 to 3 step 0.05.' }
}
