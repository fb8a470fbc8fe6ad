/** Uniform numbers in [0, 1) with 32 random bits each. */
export type Random = () => number

/**
 * Generator xoshiro128** from its state of four 32-bit words, not all zero.
 * @returns a function whose every call gives the next whole number from 0 to 2³² − 1
 * @see Blackman and Vigna, Scrambled linear pseudorandom number generators, ACM Trans. Math. Softw. 47 (2021)
 */
export function xoshiro128(a: number, b: number, c: number, d: number): () => number {
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
    return result >>> 0
  }
}

/**
 * Seeded uniform numbers: the same seed gives the same numbers everywhere. A 32-bit mixing sequence fills the state.
 * @param seed any integer; its low 32 bits count
 */
export function seededRandom(seed: number): Random {
  let counter = seed | 0
  const mixed = () => {
    counter = counter + 0x9E3779B9 | 0
    let z = counter ^ counter >>> 16
    z = Math.imul(z, 0x21F0AAAD)
    z = Math.imul(z ^ z >>> 15, 0x735A2D97)
    return z ^ z >>> 15
  }
  const next = xoshiro128(mixed(), mixed(), mixed(), mixed())
  return () => next() / 4294967296
}
