import { describe, expect, it } from 'vitest'
import { valueOf } from '#shared/modulation'
import { defaultInputs } from '#shared/schemas/candidates'
import type { CandidateInputs } from '#shared/schemas/candidates'
import { defaultRequirements } from '#shared/schemas/requirements'
import type { Requirements } from '#shared/schemas/requirements'
import type { SearchCreation } from '#shared/schemas/searches'
import { canonicalInputs } from '#shared/study'
import { requiredValues } from '../../../server/compute/required'
import { search } from '../../../server/compute/search'
import type { SearchState, SearchTask } from '../../../server/compute/search'
import { settingOf } from '../../../server/compute/setting'
import { foundInputs } from '../../../server/services/search-results'

const rings: CandidateInputs = { ...defaultInputs, family: 'apsk', rings: [4, 12], ratios: [2.2] }
const parameters: SearchCreation = { kind: 'parameters', free: ['ratios'], bounds: {}, seed: 1, starts: 2, budget: 40 }

function begun(task: SearchTask): SearchState {
  const answer = search(task, null, 0)
  if ('issues' in answer) throw new Error(answer.issues[0]!.message)
  return answer.state
}

function finished(task: SearchTask): SearchState {
  let state = begun(task)
  while (!state.state.done) {
    const answer = search(task, state, 1e6)
    if ('issues' in answer) throw new Error(answer.issues[0]!.message)
    state = answer.state
  }
  return state
}

/** Required Es/N0 of a row, of the row that a search makes of it, and what the search says of both, in dB. */
function searched(inputs: CandidateInputs, requirements: Requirements) {
  const required = (row: CandidateInputs) => {
    const canonical = canonicalInputs(row, requirements)
    return valueOf(requiredValues(canonical, settingOf(canonical).netBits).requiredEsN0Db)
  }
  const task = { asked: parameters, row: canonicalInputs(inputs, requirements) }
  const state = finished(task)
  if (state.kind !== 'parameters') throw new Error('This is a search of parameters.')
  return { start: required(inputs), found: required(foundInputs(state, { ...task, inputs })), startValue: state.state.startValue, value: state.state.best.value }
}

describe('a search of a row by its rate threshold, with a target before decoding', () => {
  const inputs: CandidateInputs = { ...rings, basis: 'rateThreshold', rateKind: 'mutualInformation', codeRate: 2 / 3, decoderGapDb: 1 }
  const requirements = (value: number): Requirements => ({ ...defaultRequirements, target: { ...defaultRequirements.target, quantity: 'ser', value, stage: 'beforeDecoding' } })

  it('finds a row that needs less where the target decides', () => {
    const { start, found } = searched(inputs, requirements(1e-3))
    expect(found).toBeLessThan(start - 0.05)
  })
  it('has the rows\' required SNR as its values where the target decides', () => {
    const { start, found, startValue, value } = searched(inputs, requirements(1e-3))
    expect([startValue, value]).toEqual([expect.closeTo(start, 6), expect.closeTo(found, 6)])
  })
  it('has the rows\' required SNR, decoder gap included, as its values where the threshold decides', () => {
    const { start, found, startValue, value } = searched(inputs, requirements(0.3))
    expect([startValue, value]).toEqual([expect.closeTo(start, 6), expect.closeTo(found, 6)])
  })
})

describe('a search of a row with shaped probabilities', () => {
  const inputs: CandidateInputs = { ...rings, probabilityRule: 'shaped', shapedEntropy: 3.7 }
  const requirements: Requirements = { ...defaultRequirements, target: { ...defaultRequirements.target, quantity: 'ser', value: 1e-3 } }

  it('has as its value the required SNR of the row that it makes', () => {
    const { start, found, value } = searched(inputs, requirements)
    expect(value).toBeLessThan(start - 0.05)
    expect(value).toBeCloseTo(found, 6)
  })
})

describe('a search of labels', () => {
  const at = (esN0Db: number) => search({
    asked: { kind: 'labels', seed: 1, starts: 1 }, row: canonicalInputs(rings, { ...defaultRequirements, available: { from: 'entered', esN0Db } }),
  }, null, 0)

  it('is refused where the bit error rate is too small for a double', () => expect(at(60)).toEqual({
    issues: [{ path: 'requirements.available', message: 'The bit error rate is 0 to a double at this Es/N0: lower the available Es/N0.' }],
  }))
  it('begins where it is not', () => expect(at(15)).toHaveProperty('state.kind', 'labels'))
})
