import type { CandidateField, CandidateInputs } from '../schemas/candidates'
import { plain } from './format'
import type { Entry } from './column'

/** The text of a number field; nothing where the input is left to its default. */
export const numberText = (value: number | null) => value === null ? '' : plain(value)

const decimalForm = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i

/**
 * A typed number: plain decimals or powers of ten, with a hyphen or a true minus sign.
 * @returns null when the text is no number
 */
export function parseNumber(text: string): number | null {
  const plainText = text.trim().replace(/[−–]/g, '-').replace(/\s*[x×·]\s*10\^?\s*/i, 'e')
  return decimalForm.test(plainText) ? Number(plainText) : null
}

const commaForm = /^[+−–-]?\d+,\d+$/

/**
 * What to type instead of a number with a decimal comma, which would read as two.
 * @returns null when the text is no such number
 */
export const refusedComma = (text: string): string | null =>
  commaForm.test(text.trim()) ? `“${text.trim()}” has a comma: enter ${text.trim().replace(',', '.')}, with a point.` : null

/** The sentence against the first number with a decimal comma, where spaces or semicolons part the numbers. */
export const commaAmong = (text: string): string | null =>
  text.split(/[\s;]+/).map(piece => refusedComma(piece.replace(/,$/, ''))).find(sentence => sentence !== null) ?? null

/** A number or a fraction such as 3/4. */
export function parseFraction(text: string): number | null {
  const [above = '', below, ...rest] = text.split('/')
  if (below === undefined) return parseNumber(above)
  const [a, b] = [parseNumber(above), parseNumber(below)]
  return rest.length === 0 && a !== null && b !== null && b !== 0 ? a / b : null
}

/** A cleared number cell falls back to nothing, where its input may be left out; the schema says so if it may not. */
export const numberEntry = (field: CandidateField, parse = parseNumber) => (text: string): Entry => {
  if (text.trim() === '') return { change: { [field]: null } }
  const value = parse(text)
  return value === null ? { refused: refusedComma(text) ?? `“${text.trim()}” is not a number.` } : { change: { [field]: value } }
}

export const textEntry = (field: CandidateField) => (text: string): Entry => ({ change: { [field]: text.trim() } })

/** One of a list, typed by its title or its value in the API. */
export const choiceEntry = (field: CandidateField, choices: readonly { value: string, title: string }[], clears = false) => (text: string): Entry => {
  const typed = text.trim().toLowerCase()
  if (typed === '' && clears) return { change: { [field]: null } }
  const found = choices.find(choice => choice.value.toLowerCase() === typed || choice.title.toLowerCase() === typed)
  if (found) return { change: { [field]: found.value } }
  return { refused: `Choose one of: ${choices.map(choice => choice.title).join(', ')}.` }
}

/** The title of a choice. */
export const titleIn = (choices: readonly { value: string, title: string }[], value: string | null) =>
  choices.find(choice => choice.value === value)?.title ?? value ?? ''

/** A column's number field as the inputs have it. */
export const numberOf = (inputs: CandidateInputs, field: CandidateField): number | null => {
  const value = inputs[field]
  return typeof value === 'number' ? value : null
}
