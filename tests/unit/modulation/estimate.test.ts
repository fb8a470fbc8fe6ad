import { describe, expect, it } from 'vitest'
import { highOf, lowOf, mapEstimate, valueOf } from '../../../shared/modulation/estimate'

describe('an estimate', () => {
  it('that is exact is its own ends', () => expect([lowOf(3), valueOf(3), highOf(3)]).toEqual([3, 3, 3]))
  it('keeps its ends in order under a falling function', () =>
    expect(mapEstimate({ value: 2, low: 1, high: 3 }, x => -x)).toEqual({ value: -2, low: -3, high: -1 }))
  it('that is exact stays so', () => expect(mapEstimate(2, x => x * x)).toBe(4))
})
