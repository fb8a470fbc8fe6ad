import type { Constellation } from './constellation'
import { paprDb } from './constellation'
import { valueOf } from './estimate'
import { analyse } from './geometry'
import type { InformationRateKind } from './information'
import { rateThresholdDb } from './rate-threshold'
import { requiredEsN0Db } from './required-snr'
import { shapedBackOffDb } from './waveform'
import type { BackOffOptions } from './waveform'

/** What required SNR a search lowers: that of an error rate at a target, or the threshold of an information rate at R net bits. */
export type SearchGoal
  = | { kind: 'ser' | 'ber', target: number }
    | { kind: InformationRateKind, netBits: number }

/** What limits the power; at the peak the back-off counts: the PAPR of the points, or that of the shaped waveform with a fixed seed. */
export type SearchLimit = { by: 'mean' } | { by: 'peak', backOff: 'papr' | BackOffOptions }

/**
 * What a search minimises: required Es/N0, plus the back-off where the peak limits the power. Symbol error rates are exact for one and two
 * dimensions and those of the union bound for more, which no simulation blurs.
 * @returns a function of the constellation, in dB
 * @see methods §4, §5, §6
 */
export function searchGoal(goal: SearchGoal, limit: SearchLimit): (constellation: Constellation) => number {
  return constellation => requiredOf(goal, constellation) + backOffOf(limit, constellation)
}

function requiredOf(goal: SearchGoal, constellation: Constellation): number {
  switch (goal.kind) {
    case 'mutualInformation':
    case 'bitMetricRate': return valueOf(rateThresholdDb(constellation, goal.kind, goal.netBits))
    case 'ber': return requiredEsN0Db({ geometry: analyse(constellation), kind: 'berExact' }, goal.target)
    case 'ser': return requiredEsN0Db({ geometry: analyse(constellation), kind: constellation.dimensions > 2 ? 'serUnion' : 'serExact' }, goal.target)
  }
}

function backOffOf(limit: SearchLimit, constellation: Constellation): number {
  if (limit.by === 'mean') return 0
  return limit.backOff === 'papr' ? paprDb(constellation) : shapedBackOffDb(constellation, limit.backOff).backOffDb
}
