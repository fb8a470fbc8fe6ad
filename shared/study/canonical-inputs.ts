import type { FamilyId, FamilyParameters, Normalisation } from '../modulation'
import type { CandidateInputs } from '../schemas/candidates'
import type { Requirements, Target } from '../schemas/requirements'
import { canonicalStudy } from './canonical-study'
import type { CanonicalStudy } from './canonical-study'
import { familyParameters, rowSize } from './family-parameters'
import { decidesByMap } from './option-issues'

export type CanonicalBackOff = { by: 'simulated', exceedance: number } | { by: 'entered', db: number } | { by: 'papr' } | { by: 'none' }

/** How the points come about, and what is not as usual about them: labels other than the family's, unequal probabilities. */
export interface CanonicalPoints {
  family: FamilyId
  parameters: FamilyParameters
  normalisation: Normalisation
  labels?: 'natural' | string[]
  probabilities?: { entropy: number } | number[]
}

/** A channel with fading; K in dB. */
export type CanonicalFading = { kind: 'rayleigh' | 'rician' | 'nakagami', branches: number, kDb?: number, m?: number }

/**
 * What a row's result depends on, and nothing else: neither name, role, note and source, nor fields of other families,
 * nor where a number came from. Made in one order, so that its JSON is the same for the same result.
 */
export interface CanonicalInputs {
  /** null: an entered scheme, which has no points */
  constellation: CanonicalPoints | null
  /** net bits per symbol as entered, or null: from the constellation and the code rate */
  netBits: number | null
  codeRate: number
  /** required Es/N0 as entered, dB, or null: from the study's target */
  requiredEsN0Db: number | null
  /** the basis rate threshold: its rate, the decoder's distance from it in dB, and whether the target also holds before decoding */
  threshold?: { kind: CandidateInputs['rateKind'], decoderGapDb: number, stage: Target['stage'] }
  /** left out: minimum distance */
  decision?: 'map'
  /** left out: white Gaussian noise alone */
  channel?: CanonicalFading
  /** r.m.s. carrier phase error in degrees; left out: none */
  phaseErrorDeg?: number
  /** symbols of a frame; left out: none asked for */
  frameSymbols?: number
  /** SNR range in dB */
  range: { start: number, stop: number, step: number }
  rollOff: number
  backOff: CanonicalBackOff
  implementationLossDb: number
  study: CanonicalStudy
}

/** A waveform is simulated for one and two dimensions: a row of more has no back-off where none counts, as mean power is the limit. */
function canonicalBackOff(inputs: CandidateInputs, { limitedBy }: Requirements): CanonicalBackOff {
  const { backOff, backOffDb, backOffExceedance } = inputs
  if (backOff === 'simulated') {
    return limitedBy === 'meanPower' && (rowSize(inputs).dimensions ?? 0) > 2 ? { by: 'none' } : { by: 'simulated', exceedance: backOffExceedance }
  }
  return backOff === 'entered' ? { by: 'entered', db: backOffDb! } : { by: 'papr' }
}

/** How a row's constellation comes about; null for an entered scheme. */
export function canonicalPoints(inputs: CandidateInputs): CanonicalPoints | null {
  const { family, normalisation, spacing, labelling, labels, probabilityRule, shapedEntropy, probabilities } = inputs
  if (family === 'entered') return null
  return {
    family,
    parameters: familyParameters(inputs),
    normalisation: normalisation === 'minimumDistance' ? { normalisation, spacing } : { normalisation },
    ...labelling === 'family' ? {} : { labels: labelling === 'natural' ? labelling : labels! },
    ...probabilityRule === 'equal' ? {} : { probabilities: probabilityRule === 'shaped' ? { entropy: shapedEntropy! } : probabilities! },
  }
}

/** What is not as usual between transmitter and decision; nothing of it for an entered scheme. */
function canonicalOptions(inputs: CandidateInputs, { target }: Requirements): Partial<CanonicalInputs> {
  const { family, basis, rateKind, decoderGapDb, channel, branches, ricianKDb, nakagamiM, phaseErrorDeg, frameSymbols } = inputs
  if (family === 'entered') return {}
  return {
    ...basis === 'rateThreshold' ? { threshold: { kind: rateKind, decoderGapDb: decoderGapDb!, stage: target.stage } } : {},
    ...decidesByMap(inputs) ? { decision: 'map' } : {},
    ...channel === 'awgn' ? {} : { channel: { kind: channel, branches, ...channel === 'rician' ? { kDb: ricianKDb! } : {}, ...channel === 'nakagami' ? { m: nakagamiM! } : {} } },
    ...phaseErrorDeg > 0 ? { phaseErrorDeg } : {},
    ...frameSymbols === null ? {} : { frameSymbols },
  }
}

/**
 * Canonical inputs of a row in its study.
 * @param inputs without contradictions (inputIssues is empty)
 * @throws ModulationError when the study's link lines contradict each other
 */
export function canonicalInputs(inputs: CandidateInputs, requirements: Requirements): CanonicalInputs {
  const { family, basis, snrStart, snrStop, snrStep } = inputs
  const entered = basis === 'entered'
  return {
    constellation: canonicalPoints(inputs),
    netBits: entered ? inputs.enteredNetBits : null,
    codeRate: family === 'entered' ? 1 : inputs.codeRate,
    requiredEsN0Db: entered ? inputs.enteredEsN0Db : null,
    ...canonicalOptions(inputs, requirements),
    range: family === 'entered' ? { start: 0, stop: 0, step: 1 } : { start: snrStart, stop: snrStop, step: snrStep },
    rollOff: inputs.rollOff ?? requirements.rollOff,
    backOff: canonicalBackOff(inputs, requirements),
    implementationLossDb: inputs.implementationLossDb ?? requirements.implementationLossDb,
    study: canonicalStudy(requirements),
  }
}
