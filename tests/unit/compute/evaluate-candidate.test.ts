import { describe, expect, it } from 'vitest'
import { defaultInputs } from '#shared/schemas/candidates'
import type { CandidateInputs } from '#shared/schemas/candidates'
import { defaultRequirements } from '#shared/schemas/requirements'
import type { Requirements } from '#shared/schemas/requirements'
import type { CandidateValues } from '#shared/schemas/values'
import { canonicalInputs } from '#shared/study'
import { evaluateCandidate } from '../../../server/compute/evaluate-candidate'

const evaluated = (inputs: Partial<CandidateInputs>, requirements: Partial<Requirements> = {}) =>
  evaluateCandidate(canonicalInputs({ ...defaultInputs, ...inputs }, { ...defaultRequirements, ...requirements }))
const values = (inputs: Partial<CandidateInputs>, requirements: Partial<Requirements> = {}): CandidateValues =>
  evaluated(inputs, requirements).values!

const entered: Partial<CandidateInputs> = {
  family: 'entered', basis: 'entered', enteredEsN0Db: 9, enteredNetBits: 2, backOff: 'entered', backOffDb: 1.5,
}

describe('one row', () => {
  it('requires the Es/N0 of the exact curve', () => {
    const { requiredEsN0Db } = values({})
    const { values: at } = evaluated({}, { available: { from: 'entered', esN0Db: requiredEsN0Db! } })
    expect(at!.serExact).toBeCloseTo(1e-6, 14)
  })
  it('has a bound penalty above 0', () => expect(values({}).boundPenaltyDb).toBeGreaterThan(0))
  it('takes its back-off off what is available when peak power is the limit', () => {
    const { availableEsN0Db, backOffDb } = values({}, { limitedBy: 'peakPower' })
    expect(availableEsN0Db).toBeCloseTo(20 - backOffDb, 12)
  })
  it('takes nothing off when mean power is the limit', () => expect(values({}).availableEsN0Db).toBe(20))
  it('has the energy of its spacing where N0 is given', () => {
    // Four points at distance 2: Es = 2, N0 = 0.02
    const row = values({ order: 4, normalisation: 'minimumDistance', spacing: 2 }, { available: { from: 'noiseDensity', n0: 0.02 }, limitedBy: 'peakPower' })
    expect(row.availableEsN0Db).toBeCloseTo(20, 12)
  })
  it('has unit minimum distance in signal units as its spacing', () => expect(values({ normalisation: 'minimumDistance', spacing: 1 }).spacing).toBeCloseTo(1, 14))
  it('has the minimum distance of 16-QAM at Es = 1', () => expect(values({}).minimumDistance).toBeCloseTo(2 / Math.sqrt(10), 14))
  it('occupies (1 + α) times the symbol rate', () => expect(values({ rollOff: 0.5 }).occupiedBandwidthHz).toBeCloseTo(1.5e6, 6))
  it('carries k bits a symbol, less the overhead', () => expect(values({}, { overhead: 0.25 }).netBitRate).toBe(3e6))
  it('has no receiver threshold without a link', () => expect(values({}).receiverThresholdDbm).toBeNull())
  it('is computed over its SNR range', () => expect(evaluated({ snrStart: 0, snrStop: 10, snrStep: 5 }).curves!.esN0Db).toEqual([0, 5, 10]))
  it.each([[1e-30, 1e9], [1e12, 1e-9]])('is computed at N0 %d and spacing %d, the ends of what may be entered', (n0, spacing) =>
    expect(evaluated({ normalisation: 'minimumDistance', spacing }, { available: { from: 'noiseDensity', n0 } }).errors).toEqual([]))
  it('marks the ratios of rings so near that their points coincide', () =>
    expect(evaluated({ family: 'apsk', rings: [4, 4], ratios: [1.0000000001] }).errors.map(error => error.path)).toEqual(['ratios']))
  it('keeps a refusal of the core with its place', () =>
    expect(evaluated({ family: 'psk', order: 2 }, { target: { quantity: 'ser', value: 0.5, stage: 'afterDecoding' } }).errors[0]!.path).toBe('requirements.target.value'))
})

describe('an entered scheme', () => {
  it('requires what was entered', () => expect(values(entered).requiredEsN0Db).toBe(9))
  it('needs 10·log10 R less for a bit', () => expect(values(entered).requiredEbN0Db).toBeCloseTo(9 - 10 * Math.log10(2), 12))
  it('has no geometry', () => expect(values(entered).relevantMean).toBeNull())
  it('has no error rates', () => expect(values(entered).serExact).toBeNull())
  it('has no curves', () => expect(evaluated(entered).curves).toBeNull())
  it('has its back-off as entered', () => expect(values(entered, { limitedBy: 'peakPower' }).availableEsN0Db).toBe(18.5))
  it('fails a must-have that it has no number for', () => {
    const mustHaves = [{ id: 'R9', kind: 'papr' as const, value: 5, reason: '' }]
    expect(values(entered, { mustHaves }).checks[0]).toMatchObject({ passes: false, by: null })
  })
})
