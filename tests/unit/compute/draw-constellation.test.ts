import { describe, expect, it } from 'vitest'
import { defaultInputs } from '#shared/schemas/candidates'
import type { CandidateInputs } from '#shared/schemas/candidates'
import { defaultRequirements } from '#shared/schemas/requirements'
import { canonicalInputs } from '#shared/study'
import { drawConstellation } from '../../../server/compute/draw-constellation'

function sharesOf(inputs: Partial<CandidateInputs>) {
  const row = canonicalInputs({ ...defaultInputs, family: 'pam', order: 3, probabilityRule: 'own', probabilities: [0.3, 0.4, 0.3], ...inputs }, defaultRequirements)
  return drawConstellation({ points: row.constellation!, row }).neighbours.map(own => own.map(({ share }) => share))
}

describe('the close-up of a row', () => {
  it('shares the bound of each point among its neighbours', () => expect(sharesOf({ decision: 'minimumDistance' })).toEqual([[1], [0.5, 0.5], [1]]))
  it('tells no shares where MAP decisions move the boundaries', () => expect(sharesOf({ decision: 'map' })).toEqual([[null], [null, null], [null]]))
})
