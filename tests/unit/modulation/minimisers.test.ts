import { describe, expect, it } from 'vitest'
import { evolutionFrom, stepEvolution } from '../../../shared/modulation/evolution'
import { simplexAbout, sizeOf, step } from '../../../shared/modulation/nelder-mead'

/** Least value that a minimiser has met after so many evaluations. */
function leastAfter(evaluations: number, take: (f: (place: number[]) => number) => void, f: (place: number[]) => number): number {
  let least = Infinity
  let count = 0
  while (count < evaluations) {
    take((place) => {
      count++
      least = Math.min(least, f(place))
      return f(place)
    })
  }
  return least
}

/** Rosenbrock's valley in the unit square, its end at (0.75, 0.75). */
const valley = ([a, b]: number[]) => {
  const [x, y] = [4 * a! - 2, 4 * b! - 2]
  return (1 - x) ** 2 + 100 * (y - x * x) ** 2
}
/** A bowl a thousand times as steep in one direction as in another, turned. */
const bowl = (place: number[]) => place.reduce((sum, _, i) =>
  sum + 1000 ** (i / (place.length - 1)) * (place[i]! + 0.3 * place[(i + 1) % place.length]! - 0.6) ** 2, 0)

describe('the simplex', () => {
  it('reaches the end of Rosenbrock’s valley', () => {
    const simplex = simplexAbout([0.2, 0.7], 0.1)
    expect(leastAfter(300, f => step(simplex, f), valley)).toBeLessThan(1e-8)
  })
  it('finds a minimum on the border of the cube', () => {
    const simplex = simplexAbout([0.5, 0.5], 0.1)
    expect(leastAfter(200, f => step(simplex, f), ([x, y]) => x! + (y! - 0.3) ** 2)).toBeLessThan(1e-6)
  })
  it('begins with the step as its size, also in a corner', () => {
    const simplex = simplexAbout([1, 0.95], 0.1)
    expect(sizeOf(simplex)).toBeCloseTo(0.1, 15)
    expect(Math.max(...simplex.vertices.flat())).toBe(1)
  })
})

describe('the evolution', () => {
  it('reaches the bottom of a turned, uneven bowl of twelve variables', () => {
    const evolution = evolutionFrom(Array.from({ length: 12 }, () => 0.2), 0.1, 3)
    expect(leastAfter(6000, f => stepEvolution(evolution, f), bowl)).toBeLessThan(1e-10)
  })
  it('finds a minimum on the border of the cube', () => {
    const evolution = evolutionFrom(Array.from({ length: 8 }, () => 0.5), 0.1, 3)
    expect(leastAfter(4000, f => stepEvolution(evolution, f), place => place.reduce((sum, x) => sum + x, 0))).toBeLessThan(1e-4)
  })
  it('of the same seed is the same', () => {
    const [a, b] = [evolutionFrom([0.2, 0.5, 0.9], 0.1, 3), evolutionFrom([0.2, 0.5, 0.9], 0.1, 3)]
    leastAfter(100, f => stepEvolution(a, f), bowl)
    leastAfter(100, f => stepEvolution(b, f), bowl)
    expect(a).toEqual(b)
  })
})
