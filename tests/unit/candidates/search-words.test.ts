import { describe, expect, it } from 'vitest'
import { freeOf, progressText, searchOutcome, searchShare } from '~/utils/candidates/search-words'
import { defaultInputs } from '#shared/schemas/candidates'
import type { Search, SearchProgress } from '#shared/schemas/searches'

const progress: SearchProgress = {
  what: 'BER at 12.30 dB', unit: null, startValue: 2e-3, value: 1e-3, evaluations: 400, startsDone: 3, starts: 20, budget: null,
  converged: true, low: null, high: null,
}
const search: Search = {
  id: '1', studyId: '2', candidateId: '3', kind: 'labels', state: 'done', definition: { kind: 'labels', seed: 1, starts: 20 }, progress,
  error: null, resultId: '4', createdBy: 'Noor', createdAt: '2026-01-01T00:00:00.000Z', updatedAt: '2026-01-01T00:00:00.000Z',
}

describe('what a search may move', () => {
  it('are ratios and phases of rings', () => expect(freeOf({ ...defaultInputs, family: 'apsk', rings: [4, 12], ratios: [2.57] })).toEqual(['ratios', 'phases']))
  it('are points of one\'s own', () => expect(freeOf({ ...defaultInputs, family: 'custom', points: [[0], [1]] })).toEqual(['points']))
  it('is the offset of a lattice, zero unless entered', () => expect(freeOf({ ...defaultInputs, family: 'lattice', lattice: 'D4' })).toEqual(['offset']))
  it('is nothing in a square grid', () => expect(freeOf(defaultInputs)).toEqual([]))
})

describe('the words for a search', () => {
  it('set the best against the start', () => expect(progressText(progress)).toBe('BER at 12.30 dB: 1.00e−3, from 2.00e−3 at the start'))
  it('say that nothing is better yet', () => expect(progressText({ ...progress, value: 2e-3 })).toBe('BER at 12.30 dB: 2.00e−3 as at the start'))
  it('count evaluations where these are limited', () => expect(searchShare({ ...progress, budget: 800 })).toEqual({ value: 400, max: 800, of: 'evaluations' }))
  it('count starts else', () => expect(searchShare(progress)).toEqual({ value: 3, max: 20, of: 'starts' }))
  it('tell where the result stands', () => expect(searchOutcome(search, '16-QAM'))
    .toBe('Search of labels for 16-QAM has ended: BER at 12.30 dB: 1.00e−3, from 2.00e−3 at the start. It stands in a new row behind its origin.'))
  it('tell that it has not settled, and between what it lay', () => expect(searchOutcome({
    ...search, kind: 'parameters', progress: { ...progress, what: 'required Es/N0', unit: 'dB', startValue: 21, value: 20.5, converged: false, low: 20.4, high: 20.6 },
  }, null)).toContain('It has not settled: the last steps lay between 20.400 dB and 20.600 dB.'))
})
