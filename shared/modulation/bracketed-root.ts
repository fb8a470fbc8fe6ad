import { fromDecibels } from './decibels'

/** Half of what the answer may be wrong by, dB. */
const tolerance = 2e-10

/**
 * Root of the logarithm of an error rate over its target, which is nearly a straight line over the SNR itself (not in dB), so that secants
 * there, kept inside the bracket, need few steps.
 * @param excess positive at `low`, not positive at `high`; of an SNR in dB
 * @param guess where to begin; NaN: in the middle
 * @returns dB
 */
export function bracketedRoot(excess: (db: number) => number, low: number, high: number, guess: number): number {
  let db = guess > low && guess < high ? guess : (low + high) / 2
  let before: { snr: number, value: number } | null = null
  for (let step = 0; step < 200; step++) {
    const value = excess(db)
    if (value === 0) return db
    if (value > 0) low = db
    else high = db
    if (high - low <= tolerance) break
    const snr = fromDecibels(db)
    let following = NaN
    if (before && Number.isFinite(value)) {
      following = 10 * Math.log10(snr - value * (snr - before.snr) / (value - before.value))
    } else if (Number.isFinite(value)) {
      following = db + 1e-3 * Math.sign(value)
    }
    before = Number.isFinite(value) ? { snr, value } : null
    if (Math.abs(following - db) <= tolerance) return following
    db = following > low && following < high ? following : (low + high) / 2
  }
  return (low + high) / 2
}
