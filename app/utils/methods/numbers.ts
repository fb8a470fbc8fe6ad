/** More digits than a computed value shows, it has not. */
const mostDigits = 12

/**
 * A computed value with two digits more than the published one was printed with.
 * @param published its text, with a true minus sign: `2.040`, `1.35e−7`
 */
export function besidePublished(published: string, computed: number): string {
  const [digits = ''] = published.split('e')
  const decimals = (digits.split('.')[1]?.length ?? 0) + 2
  const exponential = published.includes('e')
  const [before = ''] = (exponential ? computed.toExponential() : String(Math.abs(computed))).split('.')
  const kept = Math.max(0, Math.min(decimals, mostDigits - before.replace('-', '').length))
  const text = exponential ? computed.toExponential(kept) : computed.toFixed(kept)
  return text.replace(/-/g, '−').replace('e+', 'e')
}

/** A difference in two digits. */
export function differenceText(difference: number): string {
  if (difference === 0) return '0'
  const text = Math.abs(difference) < 1e-3 ? difference.toExponential(1) : String(Number(difference.toPrecision(2)))
  return text.replace(/-/g, '−')
}

/** Characters from the decimal point of a number's text on; none for a whole number. */
const tailOf = (text: string): number => {
  const point = text.search(/[.e]/)
  return point < 0 ? 0 : text.length - point
}

/**
 * Space behind each number of a column, in characters, so that points stand below each other where the column is set to the right
 * in a face whose characters are of one width.
 */
export function spaceBehind(texts: readonly string[]): number[] {
  const most = Math.max(0, ...texts.map(tailOf))
  return texts.map(text => most - tailOf(text))
}

/** A source without the title of the paper: who, where and when. */
export const shortSource = (source: string): string => source.replace(/,? “[^”]*”/, '')
