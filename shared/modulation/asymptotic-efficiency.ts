import type { Constellation } from './constellation'
import { decibels } from './decibels'

/**
 * Asymptotic power efficiency d_min²/(4·Eb) in dB against binary antipodal signalling.
 * @param constellation whose mean energy counts
 * @param minimumDistance d_min, signal units
 * @param netBits net bits per symbol R, above 0; Eb = Es/R. Left out: the entropy H, which is R without a code
 * @see methods §1
 */
export function asymptoticEfficiencyDb(
  constellation: Constellation, minimumDistance: number, netBits: number = constellation.entropy,
): number {
  return decibels(minimumDistance * minimumDistance * netBits / (4 * constellation.meanEnergy))
}
