import { describe, expect, it } from 'vitest'
import {
  advanceParameterSearch, analyse, apskPresets, createConstellation, createParameterSearch, familyLabels, generate, paprDb, rateThresholdDb, requiredEsN0Db, searchGoal,
} from '../../../shared/modulation'
import type { ParameterSearchRequest, ParameterSearchState } from '../../../shared/modulation'

function finished(state: ParameterSearchState, budgetMs = 1e6): ParameterSearchState {
  let last = state
  while (!last.done) last = advanceParameterSearch(last, budgetMs)
  return last
}

const searched = (request: ParameterSearchRequest) => finished(createParameterSearch(request))
const presetOf = (codeRate: string) => apskPresets.find(preset => preset.title === `16-APSK ${codeRate}`)!
const rings = { family: 'apsk', parameters: { rings: [4, 12], ratios: [2], phases: [Math.PI / 4, Math.PI / 12] }, free: ['ratios'] } as const

// ETSI EN 302 307-1, table 9: ring ratios by code rate
describe.each([['2/3', 8 / 3], ['9/10', 3.6]])('16-APSK for the rate threshold at code rate %s', (codeRate, netBits) => {
  it('comes within 0.02 dB of the standard’s ratio, or below', () => {
    const goal = { kind: 'mutualInformation', netBits } as const
    const found = searched({ ...rings, goal, starts: 2 })
    expect(found.best.value).toBeLessThan(rateThresholdDb(generate('apsk', presetOf(codeRate)), 'mutualInformation', netBits) as number + 0.02)
    expect(found.converged).toBe(true)
  }, 60000)
})

describe('a search', () => {
  const request: ParameterSearchRequest = { ...rings, free: ['ratios', 'phases'], goal: { kind: 'ser', target: 1e-3 } }

  it('lowers the required SNR, counts and says that it converged', () => {
    const found = searched(request)
    expect(found.best.value).toBeLessThan(found.startValue - 0.1)
    expect(found.converged).toBe(true)
    expect(found.interval.high - found.interval.low).toBeLessThan(1e-5)
    expect(found.startsDone).toBe(4)
    expect(found.evaluations).toBeLessThanOrEqual(found.budget)
  })

  it('has as its value the required SNR of what it found', () => {
    const { best } = searched(request)
    expect(requiredEsN0Db({ geometry: analyse(generate('apsk', best.parameters)), kind: 'serExact' }, 1e-3)).toBe(best.value)
  })

  it('finds the ring ratio of the largest minimum distance, for a tiny target', () => {
    // The inner side √2 equals the outer one 2ρ·sin(π/12) at ρ = 2.732.
    const found = searched({ ...rings, goal: { kind: 'ser', target: 1e-29 } })
    expect(Math.abs(found.best.parameters.ratios![0]! - Math.SQRT2 / (2 * Math.sin(Math.PI / 12)))).toBeLessThan(0.06)
  })

  it('goes on from JSON, in slices, to the same end', () => {
    const whole = searched(request)
    let state = createParameterSearch(request)
    while (!state.done) state = advanceParameterSearch(JSON.parse(JSON.stringify(state)) as ParameterSearchState, 0)
    expect(state).toEqual(whole)
  })

  it('leaves the state it was given as it was', () => {
    const state = createParameterSearch(request)
    const before = JSON.stringify(state)
    advanceParameterSearch(state, 20)
    expect(JSON.stringify(state)).toBe(before)
  })

  it('out of budget is not converged, and not worse than its start', () => {
    const found = searched({ ...request, budget: 5 })
    expect(found.evaluations).toBe(5)
    expect(found.converged).toBe(false)
    expect(found.best.value).toBeLessThanOrEqual(found.startValue)
  })

  it('returns an optimal start', () => {
    const found = searched({ ...rings, goal: { kind: 'ser', target: 1e-3 } })
    const again = searched({ ...rings, parameters: found.best.parameters, goal: { kind: 'ser', target: 1e-3 } })
    expect(again.best.value).toBeLessThanOrEqual(found.best.value)
    expect(again.best.value).toBeCloseTo(found.best.value, 4)
  })

  it('keeps to its bounds', () => {
    const found = searched({ ...rings, bounds: { ratios: [1.5, 2.2] }, goal: { kind: 'ser', target: 1e-3 } })
    expect(found.best.parameters.ratios![0]).toBeGreaterThanOrEqual(1.5)
    expect(found.best.parameters.ratios![0]).toBeLessThanOrEqual(2.2)
    expect(found.best.parameters.ratios![0]).toBeCloseTo(2.2, 3)
  })

  it('minimises any function of the constellation', () => {
    const goal = (constellation: { points: Float64Array }) => (constellation.points[0]! / constellation.points[8]! - 0.5) ** 2
    const found = finished(createParameterSearch({ ...request, free: ['ratios'] }, goal))
    expect(found.best.value).toBeLessThanOrEqual(found.startValue)
  })
})

describe('goals', () => {
  const constellation = generate('apsk', { rings: [4, 12], ratios: [2.7] }, { labels: familyLabels('apsk', { rings: [4, 12], ratios: [2.7] }) })

  it('at the peak the PAPR counts', () => {
    const goal = { kind: 'ser', target: 1e-4 } as const
    const mean = searchGoal(goal, { by: 'mean' })(constellation)
    expect(searchGoal(goal, { by: 'peak', backOff: 'papr' })(constellation)).toBeCloseTo(mean + paprDb(constellation), 12)
  })

  it('a peak limit draws the rings together', () => {
    const goal = { kind: 'ser', target: 1e-5 } as const
    const mean = searched({ ...rings, parameters: { rings: [5, 11], ratios: [2] }, goal })
    const peak = searched({ ...rings, parameters: { rings: [5, 11], ratios: [2] }, goal, limit: { by: 'peak', backOff: 'papr' } })
    const atPeak = ({ best }: ParameterSearchState) => searchGoal(goal, { by: 'peak', backOff: 'papr' })(generate('apsk', best.parameters))
    expect(atPeak(peak)).toBeLessThanOrEqual(atPeak(mean) + 1e-6)
  })

  it('a simulated back-off is the same every time, so that a search converges', () => {
    const limit = { by: 'peak', backOff: { rollOff: 0.25, exceedance: 1e-3, seed: 7 } } as const
    const found = searched({ ...rings, goal: { kind: 'ser', target: 1e-4 }, limit, starts: 2, budget: 150 })
    expect(found.best.value).toBeLessThan(found.startValue)
    expect(searchGoal(found.request.goal, limit)(generate('apsk', found.best.parameters))).toBe(found.best.value)
  }, 30000)

  it('the bit error rate takes the family’s labels', () => {
    const found = searched({ ...rings, goal: { kind: 'ber', target: 1e-4 }, starts: 2, budget: 60 })
    expect(found.labels).toEqual(familyLabels('apsk', rings.parameters))
    expect(found.best.value).toBeLessThan(found.startValue)
  }, 30000)
})

describe('free points', () => {
  const goal = { kind: 'ser', target: 1e-3 } as const
  const ring = generate('psk', { order: 8 }).points
  const points = Array.from({ length: 8 }, (_, i) => [...ring.subarray(2 * i, 2 * i + 2)])
  const request: ParameterSearchRequest = { family: 'custom', parameters: { points }, free: ['points'], goal, starts: 2 }

  it('eight points leave their ring for something better than seven about one, and than the densest lattice', () => {
    const found = searched(request)
    const required = searchGoal(goal, { by: 'mean' })
    expect(found.best.value).toBeLessThan(required(generate('apsk', { rings: [1, 7], ratios: [] })))
    expect(found.best.value).toBeLessThan(required(generate('hexagonal', { order: 8 })))
    expect(found.converged).toBe(true)
  }, 60000)

  it('go on from JSON, in slices, to the same end', () => {
    let state = createParameterSearch({ ...request, budget: 150 })
    while (!state.done) state = advanceParameterSearch(JSON.parse(JSON.stringify(state)) as ParameterSearchState, 0)
    expect(JSON.stringify(state)).toBe(JSON.stringify(searched({ ...request, budget: 150 })))
  })

  it('the farthest point stays, which leaves no turn and no scale', () => {
    const points = [[0.1, 0.2], [3, 0], [-1, 1], [0, -1]]
    const found = searched({ family: 'custom', parameters: { points }, free: ['points'], goal: { kind: 'ser', target: 1e-3 }, budget: 50 })
    expect(found.variables).toHaveLength(6)
    expect(found.best.parameters.points![1]).toEqual([3, 0])
  })
})

describe('the offset of a lattice', () => {
  const goal = { kind: 'ser', target: 1e-3 } as const

  it.each([['A2', 2], ['D4', 4]] as const)('begins at zero in %s where none is given', (lattice, dimensions) => {
    const { best } = createParameterSearch({ family: 'lattice', parameters: { order: 16, lattice }, free: ['offset'], goal })
    expect(best.parameters.offset).toEqual(new Array(dimensions).fill(0))
  })

  it('moves to where 16 points of A2 need less', () => {
    const found = searched({ family: 'lattice', parameters: { order: 16, lattice: 'A2' }, free: ['offset'], goal, starts: 2, budget: 60 })
    expect(found.best.value).toBeLessThan(found.startValue - 0.1)
  })
})

describe('refusals', () => {
  const goal = { kind: 'ser', target: 1e-3 } as const
  it.each([
    ['a parameter that the family lacks', { family: 'psk', parameters: { order: 8 }, free: ['ratios'], goal }, ['free']],
    ['no points to begin at', { family: 'custom', parameters: {}, free: ['points'], goal }, ['points']],
    ['bounds that leave the start out', { ...rings, bounds: { ratios: [3, 4] }, goal }, ['bounds', 'ratios']],
    ['nothing free', { ...rings, free: [], goal }, ['free']],
    ['an empty budget', { ...rings, budget: 0, goal }, ['budget']],
    ['a single start', { ...rings, starts: 1, goal }, ['starts']],
    ['a bit error rate without labels', { family: 'custom', parameters: { points: [[1], [2], [4], [5]] }, free: ['points'], goal: { kind: 'ber', target: 1e-3 } }, ['labels']],
  ] as [string, ParameterSearchRequest, (string | number)[]][])('%s', (_, request, path) => {
    expect(() => createParameterSearch(request)).toThrow(expect.objectContaining({ path }))
  })

  it('a start that is none of the family', () => {
    expect(() => createParameterSearch({ ...rings, parameters: { rings: [4, 12], ratios: [0.5] }, goal })).toThrow(expect.objectContaining({ path: ['ratios', 0] }))
  })

  it('points of a line in one dimension are searched too', () => {
    expect(searched({ family: 'custom', parameters: { points: [[-3], [-0.5], [1.5], [3.5]] }, free: ['points'], goal }).best.value)
      .toBeLessThan(requiredEsN0Db({ geometry: analyse(createConstellation([[-3], [-1], [1], [3]])), kind: 'serExact' }, 1e-3) + 0.001)
  })
})
