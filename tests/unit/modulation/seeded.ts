/** Random numbers from 0 to 1 that are the same in every run: Marsaglia's xorshift, 32 bits. */
export function randomFrom(seed: number): () => number {
  let state = seed * 2654435761 >>> 0 || 1
  return () => {
    state ^= state << 13
    state ^= state >>> 17
    state ^= state << 5
    state >>>= 0
    return state / 2 ** 32
  }
}
