import { describe, expect, it } from 'vitest'
import { seededRandom, xoshiro128 } from '../../../shared/modulation/random'

describe('xoshiro128**', () => {
  // Blackman and Vigna's C code from the state 1, 2, 3, 4 (from memory; the first two follow by hand: rotl(2·5, 7)·9 and 0)
  it('starts as its authors\' code does', () => {
    const next = xoshiro128(1, 2, 3, 4)
    expect([next(), next(), next(), next()]).toEqual([11520, 0, 5927040, 70819200])
  })
})

describe('seeded random numbers', () => {
  const mean = (random: () => number, n: number) => Array.from({ length: n }, random).reduce((sum, x) => sum + x, 0) / n
  it('repeat for the same seed', () => expect(seededRandom(5)()).toBe(seededRandom(5)()))
  it('differ for another seed', () => expect(seededRandom(5)()).not.toBe(seededRandom(6)()))
  it('have a mean of one half', () => expect(Math.abs(mean(seededRandom(1), 100_000) - 0.5)).toBeLessThan(0.004))
  it('stay below 1', () => expect(Math.max(...Array.from({ length: 10_000 }, seededRandom(2)))).toBeLessThan(1))
})
