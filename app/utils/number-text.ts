/**
 * A number with all its digits as people write it: a true minus sign, and a power of ten where it is far from 1.
 * @param value finite
 */
export function decimalText(value: number): string {
  const rounded = Number(value.toPrecision(15))
  const far = rounded !== 0 && (Math.abs(rounded) < 1e-3 || Math.abs(rounded) >= 1e9)
  return (far ? rounded.toExponential() : String(rounded)).replaceAll('-', '−').replace('e+', 'e')
}

/**
 * The number that a text stands for, or null. Takes a true minus sign for a hyphen.
 * Never guesses about commas: "1,5" might be one and a half or a list.
 */
export function readNumber(text: string): number | null {
  const plain = text.trim().replaceAll('−', '-').replaceAll(/[\u00a0\u202f ]/g, '')
  if (!/^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(plain)) return null
  const value = Number(plain)
  return Number.isFinite(value) ? value : null
}
