import { describe, expect, it } from 'vitest'
import { apskPresets } from '../../shared/modulation'
import { geometryOf } from '../../shared/methods/checks/tools'

// ETSI EN 302 307-1, tables 9 and 10 (from memory): γ by code rate
describe('ETSI EN 302 307-1', () => {
  const ratiosOf = (rings: number) => Object.fromEntries(apskPresets.filter(preset => preset.rings.length === rings).map(preset => [preset.codeRate, preset.ratios]))
  it('16-APSK ring ratios by code rate', () => {
    expect(ratiosOf(2)).toEqual({ '2/3': [3.15], '3/4': [2.85], '4/5': [2.75], '5/6': [2.7], '8/9': [2.6], '9/10': [2.57] })
  })
  it('32-APSK ring ratios by code rate', () => {
    expect(ratiosOf(3)).toEqual({ '3/4': [2.84, 5.27], '4/5': [2.72, 4.87], '5/6': [2.64, 4.64], '8/9': [2.54, 4.33], '9/10': [2.53, 4.3] })
  })
})

// L. Euler; M. de Berg et al., Computational Geometry, theorem 7.3: a Voronoi diagram of n points has at most 3n − 6 edges
describe('Euler\'s relation', () => {
  it('a point has fewer than 6 relevant neighbours on average', () => {
    expect(geometryOf('hexagonal', { order: 256 }).relevantMean).toBeLessThanOrEqual(2 * (3 * 256 - 6) / 256)
  })
})
