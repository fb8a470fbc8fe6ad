import { decibels, fromDecibels } from './decibels'
import { ModulationError } from './errors'

/**
 * Net bits per symbol R = H − (1−r)·k; r·k for equal probabilities.
 * @param entropy H of the points, bit per symbol
 * @param bitsPerSymbol k = log2 M
 * @param codeRate r, above 0 and up to 1 (1: uncoded)
 * @throws ModulationError when nothing is left: a code's redundancy cannot exceed the entropy
 * @see methods §0; Böcherer 2015
 */
export function netBitsPerSymbol(entropy: number, bitsPerSymbol: number, codeRate: number): number {
  if (!(codeRate > 0 && codeRate <= 1)) throw new ModulationError('A code rate is above 0 and up to 1.', ['codeRate'])
  const netBits = entropy - (1 - codeRate) * bitsPerSymbol
  if (!(netBits > 0)) throw new ModulationError('This code rate leaves no net bits: it must exceed 1 − H/k.', ['codeRate'])
  return netBits
}

/**
 * Capacity of N real dimensions with white Gaussian noise, (N/2)·log2(1 + 2·Es/(N·N0)), in bit per symbol.
 * @param dimensions N
 * @param esN0 Es/N0 as a plain ratio
 * @see methods §5; Shannon 1948
 */
export function capacity(dimensions: number, esN0: number): number {
  return dimensions / 2 * Math.log1p(2 * esN0 / dimensions) / Math.LN2
}

/**
 * Es/N0, as a plain ratio, at which the capacity of N real dimensions equals R.
 * @param netBits R, bit per symbol
 * @param dimensions N
 * @see methods §5
 */
export function esN0ForCapacity(netBits: number, dimensions: number): number {
  return dimensions / 2 * Math.expm1(2 * netBits / dimensions * Math.LN2)
}

/**
 * Gap to capacity in dB: required Es/N0 minus the one at which capacity equals R.
 * @param requiredEsN0Db dB
 * @param netBits R, bit per symbol
 * @param dimensions N
 * @see methods §5
 */
export function gapToCapacityDb(requiredEsN0Db: number, netBits: number, dimensions: number): number {
  return requiredEsN0Db - decibels(esN0ForCapacity(netBits, dimensions))
}

/** Eb/N0 in dB from Es/N0 in dB and net bits per symbol R: Eb = Es/R (methods §0). */
export function ebN0Db(esN0Db: number, netBits: number): number {
  return esN0Db - decibels(netBits)
}

/** Epk/N0 in dB from Es/N0 and the constellation's PAPR, both in dB (methods §0). */
export function epkN0Db(esN0Db: number, paprDb: number): number {
  return esN0Db + paprDb
}

/**
 * d_min²/(2·N0) in dB, the axis on which every constellation's error events of minimum distance coincide.
 * @param esN0Db dB
 * @param minimumDistance d_min at Es = 1
 * @see methods §0
 */
export function distanceN0Db(esN0Db: number, minimumDistance: number): number {
  return esN0Db + decibels(minimumDistance * minimumDistance / 2)
}

/**
 * Error vector magnitude that corresponds to an SNR, √(N·N0/(2·Es)), in per cent of the r.m.s. signal.
 * @param esN0Db dB
 * @param dimensions N
 * @see methods §1
 */
export function evmPercentAt(esN0Db: number, dimensions: number): number {
  return 100 * Math.sqrt(dimensions / (2 * fromDecibels(esN0Db)))
}

/** What stays the same from row to row, in Hz (symbol/s) or bit/s. */
export type HeldConstantRate = { heldConstant: 'symbolRate' | 'occupiedBandwidth' | 'netBitRate', value: number }

export type RateInputs = {
  /** R, net bits per symbol */
  netBits: number
  /** N, real dimensions of a symbol */
  dimensions: number
  /** α of the root-raised-cosine pulse, 0 to 1 */
  rollOff: number
  /** share of the bit rate spent on framing, 0 to below 1 */
  overhead: number
  /** D, real dimensions that one symbol interval of one Nyquist band offers */
  dimensionsPerInterval: number
}

export type Rates = { symbolRateHz: number, occupiedBandwidthHz: number, netBitRateBps: number, spectralEfficiency: number }

/**
 * Symbol rate, occupied bandwidth B = Rs·N·(1+α)/D, net bit rate R·Rs·(1 − overhead) and their ratio η in bit/s/Hz,
 * from the one that is held constant, which comes back exactly as it was given.
 * @throws ModulationError when the held value is not positive or a factor is outside its range
 * @see methods §7
 */
export function ratesOf({ heldConstant, value }: HeldConstantRate, inputs: RateInputs): Rates {
  const { netBits, dimensions, rollOff, overhead, dimensionsPerInterval } = inputs
  if (!(value > 0 && value < Infinity)) throw new ModulationError('What is held constant is a number above 0.', ['value'])
  if (!(rollOff >= 0 && rollOff <= 1)) throw new ModulationError('A roll-off is from 0 to 1.', ['rollOff'])
  if (!(overhead >= 0 && overhead < 1)) throw new ModulationError('An overhead is from 0 to below 1.', ['overhead'])
  if (!(netBits > 0)) throw new ModulationError('Net bits per symbol are a number above 0.', ['netBits'])
  const bandwidthPerRate = dimensions * (1 + rollOff) / dimensionsPerInterval
  const bitsPerSymbol = netBits * (1 - overhead)
  const symbolRateHz = heldConstant === 'symbolRate'
    ? value
    : value / (heldConstant === 'occupiedBandwidth' ? bandwidthPerRate : bitsPerSymbol)
  return {
    symbolRateHz,
    occupiedBandwidthHz: heldConstant === 'occupiedBandwidth' ? value : symbolRateHz * bandwidthPerRate,
    netBitRateBps: heldConstant === 'netBitRate' ? value : symbolRateHz * bitsPerSymbol,
    spectralEfficiency: bitsPerSymbol / bandwidthPerRate,
  }
}
