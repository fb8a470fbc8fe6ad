import { ModulationError } from './errors'
import { expNegative } from './exponential'

/**
 * How the noise-free signal arrives. With fading the receiver knows its channel and combines `branches` independent branches of the same
 * mean SNR by maximal ratio; SNR is always the mean per branch.
 */
export type Channel
  = | { kind: 'awgn' }
    | {
      kind: 'rayleigh' | 'rician' | 'nakagami'
      /** L, 1 to 16 */
      branches: number
      /** Rician: K, power of the steady part over that of the scattered part, a plain ratio */
      kFactor?: number
      /** Nakagami: m, from 0.5; 1 is Rayleigh fading */
      m?: number
    }

export type FadingChannel = Exclude<Channel, { kind: 'awgn' }>

/** The power gain g of a fading channel, of mean 1 a branch, by what it does to exponentials. */
export interface Fading {
  /** E exp(−s·g), s ≥ 0 */
  moment: (s: number) => number
  /** −d ln E exp(−s·g)/ds: positive, falling in s */
  slope: (s: number) => number
}

const mostBranches = 16

/**
 * Moment generating function of the combined power gain.
 * @throws ModulationError with path ['branches'], ['kFactor'] or ['m'] for what is missing or outside its range
 * @see methods §6; Simon and Alouini, Digital Communication over Fading Channels, table 2.2 and §9.2
 */
export function fadingOf({ kind, branches, kFactor, m }: FadingChannel): Fading {
  if (!(Number.isInteger(branches) && branches >= 1 && branches <= mostBranches)) {
    throw new ModulationError('Branches are a whole number from 1 to 16.', ['branches'])
  }
  switch (kind) {
    case 'rayleigh': return nakagami(branches, 1)
    case 'nakagami': return nakagami(branches, checked(m, 0.5, 'Nakagami fading needs m, a finite number from 0.5.', 'm'))
    case 'rician': return rician(branches, checked(kFactor, 0, 'Rician fading needs K, a finite ratio from 0.', 'kFactor'))
  }
}

function checked(value: number | undefined, least: number, sentence: string, field: string): number {
  if (value !== undefined && value >= least && value < Infinity) return value
  throw new ModulationError(sentence, [field])
}

function nakagami(branches: number, m: number): Fading {
  const power = m * branches
  return {
    moment: Number.isInteger(power) && power <= mostBranches
      ? s => whole(1 / (1 + s / m), power)
      : s => expNegative(-power * Math.log1p(s / m)),
    slope: s => branches / (1 + s / m),
  }
}

function rician(branches: number, k: number): Fading {
  return {
    moment: s => whole((1 + k) / (1 + k + s), branches) * expNegative(-branches * k * s / (1 + k + s)),
    slope: s => branches * (1 + k * (1 + k) / (1 + k + s)) / (1 + k + s),
  }
}

/** A whole power from 1 on, by squaring: error integrals spend their time here. */
function whole(x: number, power: number): number {
  let result = power & 1 ? x : 1
  for (let square = x * x, rest = power >> 1; rest > 0; square *= square, rest >>= 1) {
    if (rest & 1) result *= square
  }
  return result
}
