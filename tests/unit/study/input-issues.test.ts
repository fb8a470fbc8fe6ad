import { describe, expect, it } from 'vitest'
import { defaultInputs } from '#shared/schemas/candidates'
import type { CandidateInputs } from '#shared/schemas/candidates'
import { inputIssues } from '#shared/study'

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
  it('does not offer points of three coordinates', () => expect(issues({ family: 'custom', points: [[1, 0, 0], [0, 1, 0]] })).toEqual([
    { path: 'points', message: 'Points of 3 or more coordinates are not offered so far: enter 1 or 2.' },
  ]))
  it('refuses a code rate below 1 with an uncoded basis', () => expect(issues({ codeRate: 0.5 })).toEqual([{
    path: 'codeRate',
    message: 'A code rate below 1 with an uncoded basis is refused: it would charge for the code and credit nothing. Use 1, or the basis entered.',
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
