import { ceilToDigits, floorToDigits, nearestOfDigits, roundingSlack } from './rounding'

/**
 * Kinds of must-have: the words and the unit that a verdict uses, digits shown and how they round (in the grid's columns alike), and on
 * which side the limit lies.
 * PAPR is the constellation's own, not the shaped waveform's.
 */
export const verdictKinds = {
  margin: { words: 'margin', unit: 'dB', digits: 2, round: 'down', sense: 'atLeast', signed: true },
  netBitRate: { words: 'net bit rate', unit: 'Mbit/s', digits: 1, round: 'nearest', sense: 'atLeast', signed: false },
  occupiedBandwidth: { words: 'occupied bandwidth', unit: 'MHz', digits: 2, round: 'nearest', sense: 'atMost', signed: false },
  spectralEfficiency: { words: 'spectral efficiency', unit: 'bit/s/Hz', digits: 2, round: 'nearest', sense: 'atLeast', signed: false },
  papr: { words: 'PAPR', unit: 'dB', digits: 2, round: 'nearest', sense: 'atMost', signed: false },
} as const
export type VerdictKind = keyof typeof verdictKinds

/** A must-have: a limit in its kind's unit, with the reason it is asked for. */
export type VerdictLimit = { id: string, kind: VerdictKind, value: number, reason: string }

/**
 * A row's unrounded numbers, each in its kind's unit; null where the row has no such number.
 * With link cases, margin is the deciding case's (the worst surplus), requiredMargin that case's own
 * requirement where it has one, and decidingCase its name.
 */
export type VerdictValues = Record<VerdictKind, number | null> & { requiredMargin?: number | null, decidingCase?: string | null }

/** One must-have judged: `by` is how much it holds (positive) or fails (negative), in the kind's unit; null when unknown. */
export type VerdictCheck = { id: string, kind: VerdictKind, passes: boolean, by: number | null, sentence: string }

export type Verdict = { passes: boolean, checks: VerdictCheck[], text: string }

/** A decimal with a true minus sign, and a plus sign where the sign carries meaning. */
const decimal = (x: number, digits: number, signed: boolean) => {
  const sign = x < 0 ? '−' : signed ? '+' : ''
  return `${sign}${Math.abs(x).toFixed(digits)}`
}

const limitOf = (mustHave: VerdictLimit, values: VerdictValues) =>
  mustHave.kind === 'margin' ? values.requiredMargin ?? mustHave.value : mustHave.value

/** Most digits that a value is shown with, where fewer would hide that it misses its limit: beyond are rounding errors. */
const mostDigits = 12

interface Shown { value: number, by: number, digits: number }

/** Digits to which a number can be rounded up or down; with more of them, doubles end before the decimals do. */
const mostDirectedDigits = 9

/**
 * A value and its distance from the limit as they are shown. The value is rounded as the grid does, margins down and others to the
 * nearest; what is to spare rounds down and what is short or over rounds up, so that neither looks better than it is.
 * Where the nearest would hide that a value misses its limit, it has more digits.
 */
function shownNumbers(value: number, distance: number, misses: (value: number) => boolean, kind: VerdictKind): Shown {
  const { digits, round } = verdictKinds[kind]
  const missed = misses(value)
  const by = (digits: number) => (digits > mostDirectedDigits ? nearestOfDigits : missed ? ceilToDigits : floorToDigits)(distance, digits)
  if (round === 'down') return { value: floorToDigits(value, digits), by: by(digits), digits }
  const hidden = (digits: number) => nearestOfDigits(distance, digits) === 0 || !misses(nearestOfDigits(value, digits))
  let needed: number = digits
  while (missed && hidden(needed) && needed < mostDigits) needed++
  return { value: nearestOfDigits(value, needed), by: by(needed), digits: needed }
}

const judge = (mustHave: VerdictLimit, values: VerdictValues): VerdictCheck => {
  const { id, kind } = mustHave
  const { words, unit, sense, signed } = verdictKinds[kind]
  const value = values[kind]
  if (value === null || Number.isNaN(value)) {
    return { id, kind, passes: false, by: null, sentence: `${words} is not known for this row` }
  }
  const limit = limitOf(mustHave, values)
  const over = (x: number) => sense === 'atLeast' ? x - limit : limit - x
  const misses = (x: number) => over(x) < -roundingSlack(limit)
  const by = over(value)
  const passes = !misses(value)
  const shown = shownNumbers(value, Math.abs(by), misses, kind)
  const where = kind === 'margin' && values.decidingCase ? ` (${values.decidingCase})` : ''
  const side = passes ? 'to spare' : sense === 'atLeast' ? 'short' : 'over'
  return { id, kind, passes, by: by === 0 ? 0 : by, sentence: `${words} ${decimal(shown.by, shown.digits, false)} ${unit} ${side} at ${decimal(shown.value, shown.digits, signed)} ${unit}${where}` }
}

/**
 * Whether a row meets every must-have, on unrounded numbers, in words:
 * "passes", or "fails R2: net bit rate 4.1 Mbit/s short at 16.0 Mbit/s" with one part for each that fails.
 * A number that misses its limit by rounding error alone meets it; one that the row does not have fails.
 * @see methods §7
 */
export function verdict(values: VerdictValues, mustHaves: readonly VerdictLimit[]): Verdict {
  const checks = mustHaves.map(mustHave => judge(mustHave, values))
  const failing = checks.filter(check => !check.passes)
  return {
    passes: failing.length === 0,
    checks,
    text: failing.length === 0 ? 'passes' : `fails ${failing.map(check => `${check.id}: ${check.sentence}`).join('; ')}`,
  }
}
