/** Uniform numbers in [0, 1) with 32 random bits each. */
export type Random = () => number

/**
 * Seeded generator xoshiro128**, its state filled by SplitMix32: the same seed gives the same numbers everywhere.
 * @param seed any integer; its low 32 bits count
 * @see Blackman and Vigna, Scrambled linear pseudorandom number generators, 2021
 */
export function seededRandom(seed: number): Random {
  let mix = seed | 0
  const split = () => {
    mix = mix + 0x9E3779B9 | 0
    let z = mix ^ mix >>> 16
    z = Math.imul(z, 0x21F0AAAD)
    z = Math.imul(z ^ z >>> 15, 0x735A2D97)
    return z ^ z >>> 15
  }
  let a = split()
  let b = split()
  let c = split()
  let d = split()
  return () => {
    const scrambled = Math.imul(b, 5)
    const result = Math.imul(scrambled << 7 | scrambled >>> 25, 9)
    const shifted = b << 9
    c ^= a
    d ^= b
    b ^= c
    a ^= d
    c ^= shifted
    d = d << 11 | d >>> 21
    return (result >>> 0) / 4294967296
  }
}
