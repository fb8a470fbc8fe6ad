/**
 * Nelder and Mead's simplex over the unit cube, one step at a time on plain data, so that a search may stop and go on anywhere.
 * Coefficients grow milder with the dimension, without which the simplex stalls beyond some ten variables.
 * @see Nelder and Mead, Comput. J. 7 (1965); Gao and Han, Comput. Optim. Appl. 51 (2012)
 */
export interface Simplex {
  /** n + 1 places of n coordinates from 0 to 1 */
  vertices: number[][]
  /** their values; null: not yet computed */
  values: (number | null)[]
}

/** A simplex about a place: each coordinate once moved by a step, to the inside where the cube ends. */
export function simplexAbout(place: readonly number[], step: number): Simplex {
  const vertices = [[...place], ...place.map((x, n) => place.map((y, m) => m === n ? (x + step <= 1 ? x + step : x - step) : y))]
  return { vertices, values: vertices.map(() => null) }
}

/** Largest extent of a simplex along a coordinate. */
export function sizeOf({ vertices }: Simplex): number {
  return Math.max(...vertices[0]!.map((_, n) => {
    const along = vertices.map(vertex => vertex[n]!)
    return Math.max(...along) - Math.min(...along)
  }))
}

/**
 * One step: a vertex without a value gets one, or the worst vertex moves, or all move towards the best.
 * @param f to be minimised; called at most twice
 */
export function step(simplex: Simplex, f: (place: number[]) => number): void {
  const { vertices, values } = simplex
  const open = values.indexOf(null)
  if (open >= 0) {
    values[open] = f(vertices[open]!)
    return
  }
  const order = [...values.keys()].sort((a, b) => values[a]! - values[b]!)
  const [best, second, worst] = [order[0]!, order.at(-2)!, order.at(-1)!]
  const centre = vertices[0]!.map((_, n) => vertices.reduce((sum, vertex, v) => v === worst ? sum : sum + vertex[n]!, 0) / (vertices.length - 1))
  const mildness = Math.max(2, centre.length)
  const along = (factor: number) => centre.map((x, n) => Math.min(1, Math.max(0, x + factor * (x - vertices[worst]![n]!))))
  const at = (factor: number) => {
    const place = along(factor)
    return { place, value: f(place) }
  }
  const accept = ({ place, value }: { place: number[], value: number }) => {
    vertices[worst] = place
    values[worst] = value
  }

  const reflected = at(1)
  if (reflected.value < values[best]!) {
    const expanded = at(1 + 2 / mildness)
    return accept(expanded.value < reflected.value ? expanded : reflected)
  }
  if (reflected.value < values[second]!) return accept(reflected)
  const depth = 0.75 - 1 / (2 * mildness)
  const outside = reflected.value < values[worst]!
  const contracted = at(outside ? depth : -depth)
  if (contracted.value < Math.min(reflected.value, values[worst]!)) return accept(contracted)
  shrink(simplex, best, 1 - 1 / mildness)
}

function shrink({ vertices, values }: Simplex, best: number, factor: number): void {
  vertices.forEach((vertex, v) => {
    if (v === best) return
    vertices[v] = vertex.map((x, n) => vertices[best]![n]! + factor * (x - vertices[best]![n]!))
    values[v] = null
  })
}
