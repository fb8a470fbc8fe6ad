import type { MethodId } from '../index'
import type { SourceId } from '../sources'

/** A published value, and how the current build comes to it. */
export interface Check {
  method: MethodId
  what: string
  unit?: string
  /** as printed; or a published closed form, evaluated */
  published: string | (() => number)
  source: SourceId
  /** table, page or equation within the source */
  place?: string
  /** quoted from memory rather than from the page */
  memory?: true
  /** largest difference allowed: of the value's own unit, or relative; left out: half of the last digit printed, or 1e-9 relative of a closed form */
  within?: number | { relative: number }
  compute: () => number
}

/** Half of the last printed digit: what rounding may have taken. */
function printedHalf(text: string): number {
  const [digits = '', exponent = '0'] = text.toLowerCase().split('e')
  const decimals = digits.split('.')[1]?.length ?? 0
  return 0.5 * 10 ** (Number(exponent) - decimals)
}

/** The published value as a number. */
export const publishedOf = ({ published }: Check): number => typeof published === 'string' ? Number(published) : published()

/** The largest difference that a check allows, in the value's own unit. */
export function allowedOf(check: Check): number {
  const { published, within } = check
  if (typeof within === 'number') return within
  const relative = within?.relative ?? (typeof published === 'string' ? null : 1e-9)
  // A value that ends halfway between two printed ones may be computed a rounding error beyond.
  return relative === null ? printedHalf(published as string) * (1 + 1e-9) : relative * Math.abs(publishedOf(check))
}
