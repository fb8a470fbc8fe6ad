import type { FamilyId, FamilyParameters, Normalisation } from '../modulation'
import type { CandidateInputs } from '../schemas/candidates'
import type { Requirements } from '../schemas/requirements'
import { canonicalStudy } from './canonical-study'
import type { CanonicalStudy } from './canonical-study'
import { familyParameters } from './family-parameters'

export type CanonicalBackOff = { by: 'simulated', exceedance: number } | { by: 'entered', db: number } | { by: 'papr' }

/**
 * What a row's result depends on, and nothing else: neither name, role, note and source, nor fields of other families,
 * nor where a number came from. Made in one order, so that its JSON is the same for the same result.
 */
export interface CanonicalInputs {
  /** null: an entered scheme, which has no points */
  constellation: { family: FamilyId, parameters: FamilyParameters, normalisation: Normalisation } | null
  /** net bits per symbol as entered, or null: from the constellation and the code rate */
  netBits: number | null
  codeRate: number
  /** required Es/N0 as entered, dB, or null: from the study's target */
  requiredEsN0Db: number | null
  /** SNR range in dB */
  range: { start: number, stop: number, step: number }
  rollOff: number
  backOff: CanonicalBackOff
  implementationLossDb: number
  study: CanonicalStudy
}

function canonicalBackOff({ backOff, backOffDb, backOffExceedance }: CandidateInputs): CanonicalBackOff {
  if (backOff === 'simulated') return { by: 'simulated', exceedance: backOffExceedance }
  return backOff === 'entered' ? { by: 'entered', db: backOffDb! } : { by: 'papr' }
}

/**
 * Canonical inputs of a row in its study.
 * @param inputs without contradictions (inputIssues is empty)
 * @throws ModulationError when the study's link lines contradict each other
 */
export function canonicalInputs(inputs: CandidateInputs, requirements: Requirements): CanonicalInputs {
  const { family, normalisation, spacing, basis, snrStart, snrStop, snrStep } = inputs
  const entered = basis === 'entered'
  return {
    constellation: family === 'entered'
      ? null
      : {
          family: family as FamilyId,
          parameters: familyParameters(inputs),
          normalisation: normalisation === 'minimumDistance' ? { normalisation, spacing } : { normalisation },
        },
    netBits: entered ? inputs.enteredNetBits : null,
    codeRate: family === 'entered' ? 1 : inputs.codeRate,
    requiredEsN0Db: entered ? inputs.enteredEsN0Db : null,
    range: family === 'entered' ? { start: 0, stop: 0, step: 1 } : { start: snrStart, stop: snrStop, step: snrStep },
    rollOff: inputs.rollOff ?? requirements.rollOff,
    backOff: canonicalBackOff(inputs),
    implementationLossDb: inputs.implementationLossDb ?? requirements.implementationLossDb,
    study: canonicalStudy(requirements),
  }
}
