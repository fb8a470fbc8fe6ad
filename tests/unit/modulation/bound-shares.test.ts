import { describe, expect, it } from 'vitest'
import { analyse, boundShares, createConstellation, generate, q } from '../../../shared/modulation'

describe('shares of the union bound', () => {
  const triangle = analyse(createConstellation([[0, 0], [1, 0], [0, 2]]))
  it('are each neighbour\'s Q over the point\'s sum', () => {
    const [near, far] = [q(1 / Math.sqrt(0.4)), q(2 / Math.sqrt(0.4))]
    const [first, second] = boundShares(triangle, 0.2)
    expect(first).toBeCloseTo(near / (near + far), 13)
    expect(second).toBeCloseTo(far / (near + far), 13)
  })
  it('of one point add up to 1', () => {
    const geometry = analyse(generate('apsk', { rings: [4, 12], ratios: [2.7] }))
    const shares = boundShares(geometry, 0.1)
    for (let i = 0; i < 16; i++) {
      expect(shares.subarray(geometry.offsets[i], geometry.offsets[i + 1]).reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 13)
    }
  })
  it('of equal distances are equal', () => expect([...boundShares(analyse(generate('psk', { order: 4 })), 0.3)]).toEqual(Array(8).fill(0.5)))
  it('are numbers where the bound underflows', () => {
    expect([...boundShares(triangle, 1e-6)].map(share => share.toFixed(12))).toEqual([1, 0, 1, 0, 1, 0].map(share => share.toFixed(12)))
  })
  it('refuse N0 = 0', () => expect(() => boundShares(triangle, 0)).toThrow('The noise density N0 is a finite number above 0.'))
})
