import type { CandidateInputs } from '../schemas/candidates'
import type { Entry } from './column'
import { commaAmong, numberText, parseNumber } from './entry'
import { plain } from './format'

const pieces = (text: string) => text.split(/[\s;,]+/).filter(piece => piece !== '')

/** Rings and ratios in one text: "4+12 at 2.57", "4+12+16 at 2.53, 4.30". */
export function ringsText({ rings, ratios }: Pick<CandidateInputs, 'rings' | 'ratios'>): string {
  if (!rings) return ''
  const at = ratios?.length ? ` at ${ratios.map(plain).join(', ')}` : ''
  return rings.join('+') + at
}

/** How many ratios the rings have: one for each outside the first of more than one point; none that is known without rings. */
const ratiosOf = (rings: readonly string[] | null): number | null => rings && rings.length - (rings[0] === '1' ? 2 : 1)

/**
 * Reads rings and ratios: "4+12 at 2.57" sets both, "5+11" the rings alone, "at 2.2" or "2.2" the ratios alone.
 * Whether they fit together is for the family's rules to say, but two ratios where there is room for one are a decimal comma.
 */
export function parseRings(text: string): Entry {
  const typed = text.trim()
  if (typed === '') return { change: { rings: null, ratios: null } }
  const [before = '', after, ...rest] = typed.split(/\s*(?:\bat\b|@)\s*/i)
  if (rest.length > 0) return { refused: 'Enter rings and ratios as 4+12 at 2.57.' }
  const ratiosOnly = after === undefined && !before.includes('+') && (before.includes('.') || before.includes(','))
  const ringTexts = ratiosOnly || before === '' ? null : before.split('+').map(piece => piece.trim())
  const ratioTexts = ratiosOnly ? pieces(before) : after === undefined ? null : pieces(after)
  const comma = ratioTexts && commaAmong(ratiosOnly ? before : after ?? '')
  if (comma && ratioTexts.length !== ratiosOf(ringTexts)) return { refused: comma }
  const rings = ringTexts?.map(parseNumber)
  const ratios = ratioTexts?.map(parseNumber)
  if (rings?.some(n => n === null) || ratios?.some(n => n === null) || ratios?.length === 0) {
    return { refused: 'Enter rings and ratios as 4+12 at 2.57, or 4+12+16 at 2.53, 4.30.' }
  }
  return { change: { ...(rings ? { rings: rings as number[] } : {}), ...(ratios ? { ratios: ratios as number[] } : {}) } }
}

/** "0 to 40 step 1", in dB. */
export const snrRangeText = ({ snrStart, snrStop, snrStep }: Pick<CandidateInputs, 'snrStart' | 'snrStop' | 'snrStep'>) =>
  `${plain(snrStart)} to ${plain(snrStop)} step ${plain(snrStep)}`

/** Most SNR values that one row may have. */
export const snrValuesLimit = 1001

/** Reads "0 to 40 step 1"; "0 40 1" does as well, and the step may be left out to stay as it is. */
export function parseSnrRange(text: string): Entry {
  const numbers = pieces(text.replace(/\b(from|to|step|dB)\b|…|\.\.\./gi, ' ')).map(parseNumber)
  const [start, stop, step] = numbers
  if (numbers.length < 2 || numbers.length > 3 || numbers.some(n => n === null)) return { refused: 'Enter the SNR range as 0 to 40 step 1.' }
  if (typeof start !== 'number' || typeof stop !== 'number') return { refused: 'Enter the SNR range as 0 to 40 step 1.' }
  if (stop < start) return { refused: `The SNR range runs backwards: its stop ${plain(stop)} is below its start ${plain(start)}.` }
  if (typeof step !== 'number') return { change: { snrStart: start, snrStop: stop } }
  const count = Math.floor((stop - start) / step + 1e-9) + 1
  if (step > 0 && count > snrValuesLimit) {
    return { refused: `This SNR range makes ${count.toLocaleString('en')} values; at most 1,001 are allowed: take a larger step.` }
  }
  return { change: { snrStart: start, snrStop: stop, snrStep: step } }
}

/** A list of numbers, such as ring phases; nothing typed leaves it to the family. */
export const parseNumberList = (field: 'phasesDeg' | 'ratios' | 'offset') => (text: string): Entry => {
  if (text.trim() === '') return { change: { [field]: null } }
  const numbers = pieces(text).map(parseNumber)
  return numbers.some(n => n === null)
    ? { refused: 'Enter numbers separated by spaces or commas.' }
    : { change: { [field]: numbers as number[] } }
}

export const numberListText = (numbers: readonly number[] | null) => numbers?.map(numberText).join(', ') ?? ''

/** Points as text: one a line, its coordinates separated by spaces. */
export const pointsText = (points: readonly (readonly number[])[] | null) =>
  points?.map(point => point.map(plain).join(' ')).join('\n') ?? ''

/**
 * Reads custom points, one a line, coordinates separated by spaces, commas or semicolons; blank lines are skipped.
 * Where spaces or semicolons separate them, a comma within a number is a decimal comma.
 * @returns the change, or a sentence that names the line
 */
export function parsePoints(text: string): Entry {
  const lines = text.split(/\r?\n/).map((line, index) => ({ number: index + 1, line: line.trim(), coordinates: pieces(line) })).filter(line => line.coordinates.length > 0)
  if (lines.length === 0) return { change: { points: null } }
  const points: number[][] = []
  for (const { number, line, coordinates } of lines) {
    const comma = /[\s;]/.test(line) ? commaAmong(line) : null
    if (comma) return { refused: `Line ${number}: ${comma}` }
    const values = coordinates.map(parseNumber)
    const bad = values.indexOf(null)
    if (bad >= 0) return { refused: `Line ${number}: “${coordinates[bad]}” is not a number.` }
    const first = points[0]
    if (first && first.length !== values.length) {
      return { refused: `Line ${number} has ${values.length} coordinates and the first point ${first.length}: give every point the same number.` }
    }
    points.push(values as number[])
  }
  return { change: { points } }
}
