/** Ratio of powers or energies to decibels. */
export function decibels(ratio: number): number {
  return 10 * Math.log10(ratio)
}

/** Decibels to a ratio of powers or energies. */
export function fromDecibels(db: number): number {
  return 10 ** (db / 10)
}
