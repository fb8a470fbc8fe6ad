import { describe, expect, it } from 'vitest'
import { defaultInputs } from '#shared/schemas/candidates'
import type { CandidateInputs } from '#shared/schemas/candidates'
import { defaultRequirements } from '#shared/schemas/requirements'
import type { StoredPart } from '#shared/schemas/parts'
import { canonicalInputs } from '#shared/study'
import { evaluatePart } from '../../../server/compute/evaluate-part'

const part = (name: StoredPart, inputs: Partial<CandidateInputs>, esN0Db = 10) =>
  evaluatePart(name, canonicalInputs({ ...defaultInputs, ...inputs }, { ...defaultRequirements, available: { from: 'entered', esN0Db } }))
const values = (...asked: Parameters<typeof part>) => part(...asked).values as Record<string, number | null>

describe('parts of a row', () => {
  // Gray QPSK at Es/N0 = 10 dB: BER Q(√10) = 7.827e-4
  it('finds the exact BER of Gray QPSK', () => expect(values('bits', { family: 'psk', order: 4 }).berExact).toBeCloseTo(7.827011290012703e-4, 12))
  it('names the remedy where labels are lacking', () => expect(part('bits', { family: 'psk', order: 12 }).errors[0]!.path).toBe('labelling'))
  it('finds the mutual information of BPSK at half a bit', () =>
    // Binary-input AWGN at rate 1/2: Eb/N0 = 0.187 dB, so Es/N0 = −2.823 dB
    expect(values('rates', { family: 'pam', order: 2 }, -2.823).mutualInformation).toBeCloseTo(0.5, 3))
  it('has no rate threshold of an uncoded row', () => expect(values('rates', { family: 'psk', order: 4 }).thresholdMutualInformationDb).toBeNull())
  it('finds the largest rotation of 8-PSK, half a sector', () => expect(values('tolerances', { family: 'psk', order: 8 }).largestRotationDeg).toBeCloseTo(22.5, 9))
  it('knows no gain error that matters to PSK', () => expect(values('tolerances', { family: 'psk', order: 8 }).largestGainDb).toBeNull())
  it('asks for the symbols of a frame', () => expect(part('frames', {}).errors[0]!.path).toBe('frameSymbols'))
  it('finds the frame error rate of 100 QPSK symbols', () =>
    expect(values('frames', { family: 'psk', order: 4, frameSymbols: 100 }).frameErrorRate).toBeCloseTo(1 - (1 - 7.827011290012703e-4) ** 200, 10))
  it('counts the cells that vanish under MAP', () =>
    expect(values('map', { family: 'pam', order: 3, probabilityRule: 'own', probabilities: [0.495, 0.01, 0.495] }, -5).mapVanished).toBe(1))
  it('finds what MAP decisions require for a bit error rate', () => {
    // Equal probabilities: MAP decides by minimum distance. Gray QPSK has BER Q(√(Es/N0)): 1e-6 at 4.753424²
    const inputs = canonicalInputs({ ...defaultInputs, family: 'psk', order: 4 }, { ...defaultRequirements, target: { quantity: 'ber', value: 1e-6, stage: 'afterDecoding' } })
    expect(evaluatePart('map', inputs).values).toMatchObject({ requiredMapEsN0Db: expect.closeTo(20 * Math.log10(4.753424308822899), 6) })
  })
  it('knows no MAP requirement for a bit error rate without labels', () => {
    const inputs = canonicalInputs({ ...defaultInputs, family: 'psk', order: 12 }, { ...defaultRequirements, target: { quantity: 'ber', value: 1e-6, stage: 'afterDecoding' } })
    expect(evaluatePart('map', inputs).values).toMatchObject({ requiredMapEsN0Db: null, serMap: expect.any(Number) })
  })
  it('refuses MAP decisions in more dimensions by the decision', () =>
    expect(part('map', { family: 'orthogonal', order: 4 }).errors.map(error => error.path)).toEqual(['decision']))
  it('refuses information rates with fading', () => expect(part('rates', { channel: 'rayleigh' }).errors[0]!.path).toBe('channel'))
  it('draws BER and information rates over the row\'s range', () => {
    const range = { family: 'psk', order: 4, snrStart: 0, snrStop: 10, snrStep: 5 } as const
    expect([part('curves-ber', range).values, part('curves-rate', range).values]).toMatchObject([
      { esN0Db: [0, 5, 10], berExact: [expect.closeTo(0.1586552539, 9), expect.any(Number), expect.any(Number)] },
      { esN0Db: [0, 5, 10], mutualInformation: [expect.any(Number), expect.any(Number), expect.any(Number)] },
    ])
  })
})
