import { describe, expect, it } from 'vitest'
import { defaultInputs } from '#shared/schemas/candidates'
import type { CandidateInputs } from '#shared/schemas/candidates'
import { defaultRequirements } from '#shared/schemas/requirements'
import type { LinkLine, Requirements } from '#shared/schemas/requirements'
import { canonicalInputs, snrGrid } from '#shared/study'

const json = (inputs: Partial<CandidateInputs>, requirements: Requirements = defaultRequirements) =>
  JSON.stringify(canonicalInputs({ ...defaultInputs, ...inputs }, requirements))

const lines = (name: string, transmit: number): LinkLine[] => [
  { id: 'p', name, source: '', kind: 'power', unit: 'dBm', valueDb: transmit },
  { id: 'g', name: 'Antenna', source: '', kind: 'gain', valueDb: 30 - transmit },
  { id: 'n', name: 'Noise', source: '', kind: 'noiseFigure', noiseFigureDb: 5 },
]
const linked = (common: LinkLine[]): Requirements => ({
  ...defaultRequirements, available: { from: 'link', lines: common, cases: [{ id: 'c', name: 'Clear', requiredMarginDb: null, lines: [] }] },
})

describe('canonical inputs', () => {
  it('leave out name, role and note', () => expect(json({ name: 'Other', role: 'chosen', roleReason: 'why', note: 'what' })).toBe(json({})))
  it('leave out the fields of other families', () => expect(json({ rings: [4, 12], ratios: [3], points: [[1], [2]] })).toBe(json({})))
  it('leave out the spacing of another normalisation', () => expect(json({ spacing: 2 })).toBe(json({})))
  it('leave out an entered back-off that is not used', () => expect(json({ backOffDb: 3 })).toBe(json({})))
  it('leave out the reason of a must-have', () => {
    const [mustHave] = defaultRequirements.mustHaves
    expect(json({}, { ...defaultRequirements, mustHaves: [{ ...mustHave!, reason: 'because' }] })).toBe(json({}))
  })
  it('take what is inherited from the study as if it were the row\'s own', () => expect(json({ rollOff: 0.25, implementationLossDb: 0 })).toBe(json({})))
  it('know −0 as 0', () => expect(json({ snrStart: -0 })).toBe(json({})))
  it('depend on what the link lines come to alone', () => expect(json({}, linked(lines('Power', 10)))).toBe(json({}, linked(lines('Amplifier', 20)))))
  it('depend on the order', () => expect(json({ order: 64 })).not.toBe(json({})))
  it('depend on the study\'s target', () => {
    const target = { ...defaultRequirements.target, value: 1e-5 }
    expect(json({}, { ...defaultRequirements, target })).not.toBe(json({}))
  })
  it('leave out labels that are the family\'s', () => expect(json({ labels: ['0', '1'] })).toBe(json({})))
  it('depend on natural labels', () => expect(json({ labelling: 'natural' })).not.toBe(json({})))
  it('leave out what another channel would need', () => expect(json({ ricianKDb: 3, nakagamiM: 2, branches: 4 })).toBe(json({})))
  it('depend on the branches of a fading channel', () => expect(json({ channel: 'rayleigh', branches: 2 })).not.toBe(json({ channel: 'rayleigh' })))
  it('leave out MAP decisions among equal probabilities', () => expect(json({ decision: 'map' })).toBe(json({})))
  it('leave out the stage of the target without a decoder', () =>
    expect(json({}, { ...defaultRequirements, target: { ...defaultRequirements.target, stage: 'beforeDecoding' } })).toBe(json({})))
  it('refuse link lines that contradict each other', () =>
    expect(() => json({}, linked(lines('Power', 10).slice(1)))).toThrow('A link case needs a power line'))
})

describe('values of a range', () => {
  it('do not drift', () => expect(snrGrid(0, 0.3, 0.1)).toEqual([0, 0.1, 0.2, 0.3]))
  it('end before a stop between two of them', () => expect(snrGrid(0, 2.5, 1)).toEqual([0, 1, 2]))
  it('are 1,001 at most', () => expect(() => snrGrid(0, 1001, 1)).toThrow(RangeError))
})
