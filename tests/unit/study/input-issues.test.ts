import { describe, expect, it } from 'vitest'
import { defaultInputs } from '#shared/schemas/candidates'
import type { CandidateInputs } from '#shared/schemas/candidates'
import { defaultRequirements } from '#shared/schemas/requirements'
import type { Requirements } from '#shared/schemas/requirements'
import { inputIssues, targetIssues } from '#shared/study'

const issues = (inputs: Partial<CandidateInputs>) => inputIssues({ ...defaultInputs, ...inputs })
const paths = (inputs: Partial<CandidateInputs>) => issues(inputs).map(issue => issue.path)

describe('contradictions within a row', () => {
  it('finds none in the defaults', () => expect(issues({})).toEqual([]))
  it('refuses an order that QAM does not have', () => expect(paths({ order: 24 })).toEqual(['order']))
  it('refuses an order that cross QAM does not have', () =>
    expect(issues({ family: 'cross-qam', order: 16 })).toEqual([{ path: 'order', message: 'Cross QAM has 32, 128 or 512 points.' }]))
  it('asks for the rings of APSK', () => expect(paths({ family: 'apsk' })).toEqual(['rings']))
  it('asks for the ratios that the rings need', () => expect(paths({ family: 'apsk', rings: [4, 12] })).toEqual(['ratios']))
  it('names the ring that is wrong', () => expect(paths({ family: 'apsk', rings: [4, 1], ratios: [2] })).toEqual(['rings.1']))
  it('names the ratio that is wrong', () => expect(paths({ family: 'apsk', rings: [4, 12], ratios: [0.5] })).toEqual(['ratios.0']))
  it('names phases by the row\'s field', () => expect(paths({ family: 'apsk', rings: [4, 12], ratios: [2], phasesDeg: [0] })).toEqual(['phasesDeg']))
  it('names both of two points that coincide', () =>
    expect(issues({ family: 'custom', points: [[1, 0], [0, 1], [1, 0]] })[0]!.message).toBe('All points are different: points 1 and 3 coincide.'))
  it.each(['D4', 'E8'] as const)('takes 256 points of %s', lattice => expect(issues({ family: 'lattice', lattice, order: 256 })).toEqual([]))
  it('refuses a factor of 2,048 points of E8', () =>
    expect(paths({ family: 'product', factors: [{ family: 'lattice', lattice: 'E8', order: 2048 }, { family: 'pam', order: 2 }] })).toEqual(['factors']))
  it('takes 1,024 points of E8', () => expect(issues({ family: 'lattice', lattice: 'E8', order: 1024 })).toEqual([]))
  it('refuses 4,096 points of E8, which would take minutes', () => expect(issues({ family: 'lattice', lattice: 'E8', order: 4096 })).toEqual([
    { path: 'order', message: '4,096 points of E8 would take minutes: at most 1,803 are allowed.' },
  ]))
  it('refuses a code rate below 1 with an uncoded basis', () => expect(issues({ codeRate: 0.5 })).toEqual([{
    path: 'codeRate',
    message: 'A code rate below 1 with an uncoded basis is refused: it would charge for the code and credit nothing. Use 1, or the basis rate threshold or entered.',
  }]))
  it('takes a code rate below 1 with an entered basis', () => expect(issues({ codeRate: 0.5, basis: 'entered', enteredEsN0Db: 9 })).toEqual([]))
  it('asks for what an entered scheme consists of', () =>
    expect(paths({ family: 'entered', basis: 'entered' })).toEqual(['enteredEsN0Db', 'enteredNetBits', 'backOff']))
  it('asks for an entered back-off', () => expect(paths({ backOff: 'entered' })).toEqual(['backOffDb']))
  it('asks for the spacing of a fixed minimum distance', () => expect(paths({ normalisation: 'minimumDistance' })).toEqual(['spacing']))
  it('refuses an SNR range that runs backwards', () => expect(paths({ snrStart: 10, snrStop: 9 })).toEqual(['snrStop']))
  it('takes an SNR range of 1,001 values', () => expect(issues({ snrStart: 0, snrStop: 100, snrStep: 0.1 })).toEqual([]))
  it('refuses an SNR range of 1,002 values', () => expect(paths({ snrStart: 0, snrStop: 100.1, snrStep: 0.1 })).toEqual(['snrStep']))
})

describe('what cannot stand together in a row', () => {
  const qam = { family: 'qam', order: 16 } as const
  const threshold = { ...qam, basis: 'rateThreshold', codeRate: 0.75, decoderGapDb: 1 } as const
  const shaped = { ...qam, probabilityRule: 'shaped', shapedEntropy: 3.5 } as const
  const space: Partial<CandidateInputs> = { family: 'custom', points: [[1, 0, 0], [0, 1, 0], [0, 0, 1], [0, 0, -1]] }

  it('takes a rate threshold of a code', () => expect(issues(threshold)).toEqual([]))
  it('refuses a rate threshold at code rate 1', () => expect(paths({ ...threshold, codeRate: 1 })).toEqual(['codeRate']))
  it('asks for the decoder gap of a rate threshold', () => expect(paths({ ...threshold, decoderGapDb: null })).toEqual(['decoderGapDb']))
  it('takes shaped probabilities with MAP decisions', () => expect(issues({ ...shaped, decision: 'map' })).toEqual([]))
  it('refuses a shaped entropy above k', () => expect(paths({ ...shaped, shapedEntropy: 4.1 })).toEqual(['shapedEntropy']))
  it('takes a shaped entropy of k', () => expect(issues({ ...shaped, shapedEntropy: 4 })).toEqual([]))
  it('asks for the wanted entropy', () => expect(paths({ ...shaped, shapedEntropy: null })).toEqual(['shapedEntropy']))
  it('asks for probabilities of one\'s own', () => expect(paths({ ...qam, probabilityRule: 'own' })).toEqual(['probabilities']))
  it('names probabilities that do not sum to 1', () =>
    expect(issues({ family: 'psk', order: 2, probabilityRule: 'own', probabilities: [0.5, 0.4] })[0]!.message).toBe('The probabilities have the sum 1, within 1e-9.'))
  it('asks for labels of one\'s own', () => expect(paths({ ...qam, labelling: 'own' })).toEqual(['labels']))
  it('names a label that stands twice', () => expect(paths({ family: 'psk', order: 2, labelling: 'own', labels: ['0', '0'] })).toEqual(['labels.1']))
  it('refuses MAP decisions with fading', () => expect(paths({ ...shaped, decision: 'map', channel: 'rayleigh' })).toEqual(['decision']))
  it('refuses MAP decisions in three dimensions', () =>
    expect(paths({ ...space, probabilityRule: 'own', probabilities: [0.4, 0.2, 0.2, 0.2], decision: 'map' })).toEqual(['decision']))
  it('takes MAP for minimum distance where probabilities are equal', () => expect(issues({ ...qam, decision: 'map', channel: 'rayleigh' })).toEqual([]))
  it('refuses a phase error with fading', () => expect(paths({ ...qam, phaseErrorDeg: 2, channel: 'rayleigh' })).toEqual(['phaseErrorDeg']))
  it('refuses a phase error with MAP decisions', () => expect(paths({ ...shaped, decision: 'map', phaseErrorDeg: 2 })).toEqual(['phaseErrorDeg']))
  it('refuses a phase error in one dimension', () => expect(paths({ family: 'pam', order: 4, phaseErrorDeg: 2 })).toEqual(['phaseErrorDeg']))
  it('refuses a phase error in three dimensions', () => expect(paths({ ...space, phaseErrorDeg: 2 })).toEqual(['phaseErrorDeg']))
  it('refuses a rate threshold with fading', () => expect(paths({ ...threshold, channel: 'rayleigh' })).toEqual(['channel']))
  it('asks for K of Rician fading', () => expect(paths({ ...qam, channel: 'rician' })).toEqual(['ricianKDb']))
  it('asks for m of Nakagami fading', () => expect(paths({ ...qam, channel: 'nakagami' })).toEqual(['nakagamiM']))
})

describe('a target bit error rate', () => {
  const ber: Requirements = { ...defaultRequirements, target: { quantity: 'ber', value: 1e-6, stage: 'afterDecoding' } }
  const asked = (inputs: Partial<CandidateInputs>, requirements = ber) => targetIssues({ ...defaultInputs, ...inputs }, requirements).map(issue => issue.path)
  const threshold = { family: 'psk', order: 12, basis: 'rateThreshold', codeRate: 0.5, decoderGapDb: 1 } as const

  it('is for rows with labels', () => expect(asked({ family: 'qam', order: 16 })).toEqual([]))
  it('names the labels of a row that has none', () => expect(asked({ family: 'psk', order: 12 })).toEqual(['labelling']))
  it('needs no labels behind a decoder', () => expect(asked(threshold)).toEqual([]))
  it('needs labels before a decoder', () => expect(asked(threshold, { ...ber, target: { ...ber.target, stage: 'beforeDecoding' } })).toEqual(['labelling']))
  it('is for two dimensions at most', () => expect(asked({ family: 'custom', points: [[1, 0, 0], [0, 1, 0]] })).toEqual(['basis']))
})
