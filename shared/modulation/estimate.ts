/** A number known within an interval: simulated, or held between two bounds. low ≤ value ≤ high. */
export interface Interval {
  value: number
  low: number
  high: number
}

/** A number, exact within its tolerance, or an interval where only that is known. */
export type Estimate = number | Interval

/** Half width of a two-sided interval of 95 %, in standard errors of a normal estimate. */
export const halfWidth = 1.959964

/** Whether only an interval is known. */
export const isInterval = (estimate: Estimate): estimate is Interval => typeof estimate !== 'number'

/** The number itself, or the most likely one of an interval. */
export const valueOf = (estimate: Estimate): number => isInterval(estimate) ? estimate.value : estimate

/** Lower end; the number itself where it is exact. */
export const lowOf = (estimate: Estimate): number => isInterval(estimate) ? estimate.low : estimate

/** Upper end; the number itself where it is exact. */
export const highOf = (estimate: Estimate): number => isInterval(estimate) ? estimate.high : estimate

/**
 * What a monotone function makes of an estimate.
 * @param f rising or falling over the whole interval
 */
export function mapEstimate(estimate: Estimate, f: (x: number) => number): Estimate {
  if (!isInterval(estimate)) return f(estimate)
  const ends = [f(estimate.low), f(estimate.high)] as const
  return { value: f(estimate.value), low: Math.min(...ends), high: Math.max(...ends) }
}
