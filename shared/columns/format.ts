import type { Interval } from '../modulation/estimate'
import { ceilToDigits, floorToDigits } from '../modulation/rounding'

/**
 * How a number is shown: decimals after the point, a plus sign where the sign carries meaning,
 * powers of ten for probabilities, a fraction for code rates, or as many digits as it has.
 */
export type NumberFormat = '0.00' | '+0.00' | '0.0' | '0.000' | '0.00e-0' | 'integer' | 'fraction' | 'plain'
/** Margins round down, so that no row looks better than it is. */
export type Rounding = 'nearest' | 'down' | 'up'

const trueMinus = (text: string) => text.replace(/-/g, '−')

const decimals: Partial<Record<NumberFormat, number>> = { '0.00': 2, '+0.00': 2, '0.0': 1, '0.000': 3, 'integer': 0 }

const directed = (value: number, digits: number, round: Rounding) =>
  round === 'down' ? floorToDigits(value, digits) : round === 'up' ? ceilToDigits(value, digits) : value

const exponent = (value: number, round: Rounding) => {
  const [before = '0', power = '0'] = value.toExponential(15).split('e')
  const [digits = '0', carried = '0'] = directed(Number(before), 2, round).toExponential(2).split('e')
  return trueMinus(`${digits}e${Number(power) + Number(carried)}`)
}

/** A fraction of small whole numbers where the value is one within 1e-9, such as 3/4 or 9/10; else its decimals. */
function fraction(value: number): string {
  for (let below = 1; below <= 64; below++) {
    const above = Math.round(value * below)
    if (Math.abs(value - above / below) < 1e-9) return below === 1 ? plain(above) : trueMinus(`${above}/${below}`)
  }
  return plain(value)
}

/** Every digit that a number has, with a true minus sign: what copying a cell gives. */
export function plain(value: number): string {
  return trueMinus(String(Object.is(value, -0) ? 0 : value))
}

/**
 * A number as a cell shows it.
 * @param value in the column's unit; infinities show as ∞
 * @param round down for margins: the largest shown decimal that is not above the value
 */
export function formatNumber(value: number, format: NumberFormat, round: Rounding = 'nearest'): string {
  if (Number.isNaN(value)) return ''
  if (!Number.isFinite(value)) return value > 0 ? '∞' : '−∞'
  if (format === '0.00e-0') return exponent(value, round)
  if (format === 'fraction') return fraction(value)
  const digits = decimals[format]
  if (digits === undefined) return plain(value)
  const rounded = directed(value, digits, round)
  const text = Math.abs(rounded).toFixed(digits)
  const negative = rounded < 0 && Number(text) !== 0
  return `${negative ? '−' : format.startsWith('+') ? '+' : ''}${text}`
}

/** An interval's ends as a cell shows them, rounded away from its value so that it is never shown too narrow: 20.79…20.91. */
export const formatEnds = ({ low, high }: Pick<Interval, 'low' | 'high'>, format: NumberFormat): string =>
  `${formatNumber(low, format, 'down')}…${formatNumber(high, format, 'up')}`

/** Whether an interval is too narrow to show: both of its ends read alike. */
const isNarrow = ({ low, high }: Interval, format: NumberFormat) => formatNumber(low, format, 'down') === formatNumber(high, format, 'up')

/**
 * An estimate in a cell: its interval comes first, so that the digits of a column stand below each other. One that the digits shown
 * do not tell from a number is shown as that.
 */
export const formatEstimate = (interval: Interval, format: NumberFormat, round: Rounding = 'nearest'): string =>
  `${isNarrow(interval, format) ? '' : `(${formatEnds(interval, format)}) `}${formatNumber(interval.value, format, round)}`

/** An estimate with all its digits: what copying gives. */
export const plainEstimate = ({ value, low, high }: Interval): string => `${plain(value)} (${plain(low)}…${plain(high)})`
