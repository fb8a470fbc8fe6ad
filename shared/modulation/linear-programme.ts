import { solve } from 'yalps'

/** Coefficients not above this count as 0 for the solver; programmes are scaled so that those that matter are near 1. */
const precision = 1e-11
const objective = -1

/**
 * The largest value of c·x over all x of N dimensions, of any sign, with a_k·x ≤ 1 for every k and c·x ≤ limit.
 * @param c N coefficients
 * @param rows the a_k, N coefficients each; scaled by the caller so that the largest are near 1
 * @param limit above 0, so that there is a largest value
 * @returns from 0 to limit
 * @throws RangeError when the solver gives up
 */
export function largest(c: ArrayLike<number>, rows: readonly ArrayLike<number>[], limit: number): number {
  const constraints = new Map(rows.map((_, k) => [k, { max: 1 }]))
  constraints.set(objective, { max: limit })
  // The solver's variables are not below 0: each coordinate is the difference of two.
  const variables = Array.from({ length: 2 * c.length }, (_, m) => {
    const [n, sign] = [m >> 1, m % 2 === 0 ? 1 : -1]
    return [m, [[objective, sign * c[n]!], ...rows.map((row, k): [number, number] => [k, sign * row[n]!])] as [number, number][]] as const
  })
  const { status, result } = solve({ direction: 'maximize', objective, constraints, variables }, { precision, checkCycles: true })
  if (status !== 'optimal') throw new RangeError(`A linear programme ended ${status}.`)
  return result
}
