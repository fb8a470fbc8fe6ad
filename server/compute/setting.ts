import { netBitsPerSymbol, normalise, paprDb } from '#shared/modulation'
import { ratesOf } from '#shared/modulation/efficiency'
import type { Rates } from '#shared/modulation/efficiency'
import type { CandidateValues } from '#shared/schemas/values'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { linkValues } from './link-values'
import { backOffOf, geometryOf } from './points'

/** An entered scheme counts as one symbol of two real dimensions, as on an I/Q carrier, at unit mean energy. */
const entered = { dimensions: 2, meanEnergy: 1 } as const

/** What a row is used with, whatever error rate follows: rates, back-off and energy. */
export interface Setting {
  netBits: number
  dimensions: number
  /** Es in signal units squared after the normalisation */
  meanEnergy: number
  backOff: Pick<CandidateValues, 'backOffDb' | 'backOffErrorDb'>
  rates: Rates
}

function netBitsOf({ netBits, constellation, codeRate }: CanonicalInputs): number {
  if (netBits !== null || !constellation) return netBits!
  const { entropy, bitsPerSymbol } = geometryOf(constellation).constellation
  return netBitsPerSymbol(entropy, bitsPerSymbol, codeRate)
}

function backOffValues({ backOff, constellation, rollOff }: CanonicalInputs): Setting['backOff'] {
  if (backOff.by === 'none') return { backOffDb: null, backOffErrorDb: null }
  if (backOff.by === 'entered' || !constellation) return { backOffDb: backOff.by === 'entered' ? backOff.db : 0, backOffErrorDb: null }
  if (backOff.by === 'papr') return { backOffDb: paprDb(geometryOf(constellation).constellation), backOffErrorDb: null }
  const { backOffDb, standardErrorDb } = backOffOf(constellation, rollOff, backOff.exceedance)
  return { backOffDb, backOffErrorDb: standardErrorDb }
}

/**
 * Net bits, rates and back-off of a row.
 * @throws ModulationError for a code rate that leaves no net bits
 */
export function settingOf(inputs: CanonicalInputs): Setting {
  const { constellation, rollOff, study: { overhead, dimensionsPerInterval, heldConstant } } = inputs
  const points = constellation && geometryOf(constellation).constellation
  const netBits = netBitsOf(inputs)
  const dimensions = points?.dimensions ?? entered.dimensions
  return {
    netBits, dimensions,
    meanEnergy: points ? normalise(points, constellation.normalisation).meanEnergy : entered.meanEnergy,
    backOff: backOffValues(inputs),
    rates: ratesOf({ heldConstant: heldConstant.kind, value: heldConstant.value }, { netBits, dimensions, rollOff, overhead, dimensionsPerInterval }),
  }
}

/** Available Es/N0 of a row in dB, in the case that decides; which one that is does not depend on the required Es/N0. */
export function availableAt(inputs: CanonicalInputs, { backOff, rates, meanEnergy }: Setting): number {
  return linkValues(inputs, { requiredEsN0Db: 0, backOffDb: backOff.backOffDb ?? 0, symbolRateHz: rates.symbolRateHz, meanEnergy }).availableEsN0Db
}
