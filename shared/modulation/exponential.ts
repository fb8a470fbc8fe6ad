/** exp(x) for x ≤ 0 by table and short polynomial: about three times as fast as Math.exp, where error integrals spend their time. */

const steps = 64
const stepsPerUnit = steps / Math.LN2
/** ln 2/64 in two parts: the first has trailing zeros, so that n·high is exact for every n that occurs. */
const high = 0.010830424695086549
const low = 1.162596423439437e-12

const fractions = Float64Array.from({ length: steps }, (_, i) => 2 ** (i / steps))
const lowestExponent = -1022
const powers = Float64Array.from({ length: 1 - lowestExponent }, (_, i) => 2 ** (i + lowestExponent))

/**
 * Exponential of a number that is not positive; 0 below the least normal double.
 * @param x at most 0
 * @returns exp(x), relative error below 1e-15
 */
export function expNegative(x: number): number {
  if (!(x > -708)) return Number.isNaN(x) ? x : 0
  // Truncation rounds to the nearest here, as x is not positive.
  const n = (x * stepsPerUnit - 0.5) | 0
  const r = (x - n * high) - n * low
  const polynomial = 1 + r * (1 + r * (1 / 2 + r * (1 / 6 + r * (1 / 24 + r * (1 / 120)))))
  return powers[(n >> 6) - lowestExponent]! * (fractions[n & 63]! * polynomial)
}
