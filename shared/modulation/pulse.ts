/**
 * Root-raised-cosine pulse at time t, with unit symbol interval and unit energy.
 * @param t in symbol intervals
 * @param rollOff α, 0 (sinc) to 1
 * @see Proakis, Digital Communications, on raised-cosine spectra
 */
export function rootRaisedCosine(t: number, rollOff: number): number {
  const x = Math.abs(t)
  if (x < 1e-9) return 1 - rollOff + 4 * rollOff / Math.PI
  const pole = 1 - (4 * rollOff * x) ** 2
  if (Math.abs(pole) < 1e-7) {
    const angle = Math.PI / (4 * rollOff)
    return rollOff / Math.SQRT2 * ((1 + 2 / Math.PI) * Math.sin(angle) + (1 - 2 / Math.PI) * Math.cos(angle))
  }
  return (Math.sin(Math.PI * x * (1 - rollOff)) + 4 * rollOff * x * Math.cos(Math.PI * x * (1 + rollOff))) / (Math.PI * x * pole)
}

/** Taps that one instant of the waveform takes from the symbols around it, the strong ones apart from the rest. */
export type Taps = { strong: number[], weak: number[] }

/**
 * Taps of the pulse at a time offset from the middle symbol, half-length symbols to either side.
 * @param offset in symbol intervals, 0 to 1
 * @param rollOff α
 * @param halfLength symbols to either side
 * @param threshold a tap from this magnitude on is strong
 */
export function tapsAt(offset: number, rollOff: number, halfLength: number, threshold: number): Taps {
  const taps: Taps = { strong: [], weak: [] }
  for (let symbol = 1 - halfLength; symbol <= halfLength; symbol++) {
    const tap = rootRaisedCosine(offset - symbol, rollOff)
    taps[Math.abs(tap) >= threshold ? 'strong' : 'weak'].push(tap)
  }
  return taps
}
