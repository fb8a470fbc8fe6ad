import { describe, expect, it } from 'vitest'
import { valueOf } from '#shared/modulation'
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
    const { values: at } = evaluated({}, { available: { from: 'entered', esN0Db: valueOf(requiredEsN0Db!) } })
    expect(at!.serExact).toBeCloseTo(1e-6, 14)
  })
  it('has a bound penalty above 0', () => expect(valueOf(values({}).boundPenaltyDb!)).toBeGreaterThan(0))
  it('takes its back-off off what is available when peak power is the limit', () => {
    const { availableEsN0Db, backOffDb } = values({}, { limitedBy: 'peakPower' })
    expect(availableEsN0Db).toBeCloseTo(20 - backOffDb!, 12)
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

describe('a row with options', () => {
  const target = (quantity: 'ser' | 'ber', stage: 'beforeDecoding' | 'afterDecoding' = 'afterDecoding') => ({ target: { quantity, value: 1e-4, stage } })
  const coded: Partial<CandidateInputs> = { basis: 'rateThreshold', codeRate: 0.75, decoderGapDb: 0.8 }

  it('requires less for a bit error rate than for the same symbol error rate', () =>
    expect([values({}, target('ber')).requiredBy, valueOf(values({}, target('ber')).requiredEsN0Db!) < valueOf(values({}, target('ser')).requiredEsN0Db!)]).toEqual(['berExact', true]))
  it('adds the decoder\'s gap to its rate threshold', () =>
    expect(valueOf(values(coded).requiredEsN0Db!) - valueOf(values({ ...coded, decoderGapDb: 0 }).requiredEsN0Db!)).toBeCloseTo(0.8, 9))
  it('leaves the decoder\'s gap out of its gap to capacity', () =>
    expect(valueOf(values(coded).gapToCapacityDb!)).toBe(valueOf(values({ ...coded, decoderGapDb: 0 }).gapToCapacityDb!)))
  it('has no gap to capacity over fading', () => expect(values({ channel: 'rayleigh' }, target('ser')).gapToCapacityDb).toBeNull())
  it('requires what a target before decoding asks for, where that is more', () =>
    expect(values(coded, target('ser', 'beforeDecoding')).requiredEsN0Db).toBe(values({}, target('ser')).requiredEsN0Db))
  it('has the SER of binary PSK over Rayleigh fading', () => {
    // Proakis: ½(1 − √(γ/(1+γ))) at γ = 20 dB
    expect(values({ family: 'psk', order: 2, channel: 'rayleigh' }, target('ser')).serExact).toBeCloseTo(0.5 * (1 - Math.sqrt(100 / 101)), 10)
  })
  it('rests on the union bound over fading in more dimensions, and says so', () => {
    const row = values({ family: 'hypercube', order: 16, channel: 'rayleigh' }, target('ser'))
    expect([row.requiredBy, row.serExact, row.requiredEsN0Db]).toEqual(['serUnion', null, row.requiredUnionEsN0Db])
  })
  it('tells the floor that a phase error leaves', () => expect(values({ phaseErrorDeg: 3 }, target('ser')).errorFloor).toBeGreaterThan(0))
  it('has no union bound under a phase error', () => expect(values({ phaseErrorDeg: 3 }, target('ser')).serUnion).toBeNull())
  it('needs less energy with shaped probabilities, for fewer bits', () => {
    const row = values({ probabilityRule: 'shaped', shapedEntropy: 3.5 }, target('ser'))
    expect([row.netBits, valueOf(row.requiredEsN0Db!) < valueOf(values({}, target('ser')).requiredEsN0Db!)]).toEqual([expect.closeTo(3.5, 9), true])
  })
  it('is judged at the unfavourable end of an interval', () => {
    const row = values({ family: 'lattice', lattice: 'D4', order: 24 }, target('ser'))
    const { low } = row.marginDb as { low: number }
    expect(row.checks[0]!.by).toBeCloseTo(low - 1, 12)
  })
  it('has no back-off in more dimensions where mean power is the limit', () => expect(values({ family: 'orthogonal', order: 4 }).backOffDb).toBeNull())
  it('asks for a back-off in more dimensions where peak power is the limit', () =>
    expect(evaluated({ family: 'orthogonal', order: 4 }, { limitedBy: 'peakPower' }).errors[0]!.path).toBe('backOff'))
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
