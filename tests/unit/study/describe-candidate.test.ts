import { describe, expect, it } from 'vitest'
import { defaultInputs } from '#shared/schemas/candidates'
import type { CandidateInputs } from '#shared/schemas/candidates'
import { describeCandidate } from '#shared/study'

const named = (inputs: Partial<CandidateInputs>) => describeCandidate({ ...defaultInputs, ...inputs })

describe('default name of a row', () => {
  it('names QAM by its order', () => expect(named({ family: 'qam', order: 16 })).toBe('16-QAM'))
  it('names PSK by its order', () => expect(named({ family: 'psk', order: 8 })).toBe('8-PSK'))
  it('names APSK by its rings and ratios', () => expect(named({ family: 'apsk', rings: [4, 12], ratios: [2.57] })).toBe('4+12 at 2.57'))
  it('gives ring ratios two decimals at least', () => expect(named({ family: 'apsk', rings: [6, 10], ratios: [2] })).toBe('6+10 at 2.00'))
  it('gives ring ratios four decimals at most', () => expect(named({ family: 'apsk', rings: [6, 10], ratios: [2.123456] })).toBe('6+10 at 2.1235'))
  it('names rings without a ratio by themselves', () => expect(named({ family: 'apsk', rings: [1, 7], ratios: null })).toBe('1+7'))
  it('names every ratio', () => expect(named({ family: 'apsk', rings: [4, 12, 16], ratios: [2.84, 5.27] })).toBe('4+12+16 at 2.84, 5.27'))
  it('names hexagonal sets', () => expect(named({ family: 'hexagonal', order: 16 })).toBe('hexagonal 16'))
  it('names cross QAM', () => expect(named({ family: 'cross-qam', order: 32 })).toBe('cross 32'))
  it('names a coded row with its code rate', () => expect(named({ order: 64, basis: 'rateThreshold', codeRate: 0.75 })).toBe('64-QAM r 3/4'))
  it('names a shaped row with its entropy', () => expect(named({ order: 64, probabilityRule: 'shaped', shapedEntropy: 5.2 })).toBe('64-QAM H 5.2'))
  it('names custom points by their number', () => expect(named({ family: 'custom', points: [[1, 0], [-1, 0]] })).toBe('custom 2'))
  it('names an entered scheme by its source', () => expect(named({ family: 'entered', enteredSource: 'Lab report 7' })).toBe('Lab report 7'))
})
