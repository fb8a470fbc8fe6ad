/**
 * How far a computed number may be off its true value by the arithmetic of doubles alone.
 * Sums of levels around 100 dB are within a few 1e-14; required SNR is only found to 1e-9 dB.
 */
export const roundingSlack = (x: number): number => 1e-12 * Math.max(1, Math.abs(x))

const withoutNegativeZero = (x: number) => x === 0 ? 0 : x

/**
 * Largest decimal of so many digits that is not above x: how margins are shown.
 * A number that misses a decimal by no more than rounding error counts as that decimal, so 1.1 stays 1.10 and −1.1 stays −1.10.
 * @param x any number; infinities and NaN come back as they are
 * @param digits after the point, 0 to 9
 */
export function floorToDigits(x: number, digits: number): number {
  const scale = 10 ** digits
  const scaled = Math.floor((x + roundingSlack(x)) * scale)
  // Where the scaled number leaves the exact integers there is nothing left to round.
  return Math.abs(scaled) < Number.MAX_SAFE_INTEGER ? withoutNegativeZero(scaled / scale) : x
}

/**
 * Smallest decimal of so many digits that is not below x: how shortfalls are shown.
 * @param x any number; infinities and NaN come back as they are
 * @param digits after the point, 0 to 9
 */
export function ceilToDigits(x: number, digits: number): number {
  return withoutNegativeZero(-floorToDigits(-x, digits))
}

/**
 * Nearest decimal of so many digits: how everything but margins is shown.
 * @param x any number; infinities and NaN come back as they are
 * @param digits after the point, 0 to 100
 */
export function nearestOfDigits(x: number, digits: number): number {
  return withoutNegativeZero(Number(x.toFixed(digits)))
}
