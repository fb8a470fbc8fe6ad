import { insideCircle, turnsLeft } from './geometry-predicates'

/**
 * A Delaunay triangulation as directed edges. Edge e runs from origin[e] to origin[e ^ 1]; next[e] and previous[e]
 * are the edges that follow it counterclockwise and clockwise about its origin. origin[e] is −1 where an edge was removed.
 */
export interface Triangulation {
  origin: Int32Array
  next: Int32Array
  previous: Int32Array
}

/**
 * Delaunay triangulation of planar points by divide and conquer, O(M log M), with exact decisions, so that
 * collinear and cocircular sets need no special case. Collinear points give the path along them.
 * @param xy coordinates of M ≥ 2 different points, point after point
 * @see Guibas and Stolfi, "Primitives for the manipulation of general subdivisions", ACM Trans. Graphics 4 (1985)
 */
export function triangulate(xy: Float64Array): Triangulation {
  const order = xy.length / 2
  // Live edges stay planar at every moment: at most 3M − 3, of two directions each; removed ones are used again.
  const capacity = 6 * order
  const origin = new Int32Array(capacity).fill(-1)
  const next = new Int32Array(capacity)
  const previous = new Int32Array(capacity)
  const free: number[] = []
  let used = 0

  const target = (e: number) => origin[e ^ 1]!
  const leftNext = (e: number) => previous[e ^ 1]!

  function makeEdge(from: number, to: number): number {
    let e = free.pop()
    if (e === undefined) {
      e = used
      used += 2
    }
    origin[e] = from
    origin[e ^ 1] = to
    next[e] = previous[e] = e
    next[e ^ 1] = previous[e ^ 1] = e ^ 1
    return e
  }

  function splice(a: number, b: number): void {
    const afterA = next[a]!
    const afterB = next[b]!
    next[a] = afterB
    next[b] = afterA
    previous[afterB] = a
    previous[afterA] = b
  }

  function connect(a: number, b: number): number {
    const e = makeEdge(target(a), origin[b]!)
    splice(e, leftNext(a))
    splice(e ^ 1, b)
    return e
  }

  function remove(e: number): void {
    splice(e, previous[e]!)
    splice(e ^ 1, previous[e ^ 1]!)
    origin[e] = origin[e ^ 1] = -1
    free.push(e & ~1)
  }

  const leftOf = (point: number, e: number) => turnsLeft(xy, point, origin[e]!, target(e))
  const rightOf = (point: number, e: number) => turnsLeft(xy, point, target(e), origin[e]!)

  const sorted = Int32Array.from({ length: order }, (_, i) => i)
    .sort((a, b) => xy[2 * a]! - xy[2 * b]! || xy[2 * a + 1]! - xy[2 * b + 1]!)

  /** Triangulates sorted[from … to − 1]; the outer edges at its leftmost and rightmost point. */
  function divide(from: number, to: number): [number, number] {
    if (to - from === 2) {
      const e = makeEdge(sorted[from]!, sorted[from + 1]!)
      return [e, e ^ 1]
    }
    if (to - from === 3) return triangle(sorted[from]!, sorted[from + 1]!, sorted[from + 2]!)
    const middle = (from + to) >> 1
    return merge(divide(from, middle), divide(middle, to))
  }

  function triangle(p: number, s: number, t: number): [number, number] {
    const a = makeEdge(p, s)
    const b = makeEdge(s, t)
    splice(a ^ 1, b)
    if (turnsLeft(xy, p, s, t)) {
      connect(b, a)
      return [a, b ^ 1]
    }
    if (turnsLeft(xy, p, t, s)) {
      const c = connect(b, a)
      return [c ^ 1, c]
    }
    return [a, b ^ 1]
  }

  function merge([leftOuter, leftInner]: [number, number], [rightInner, rightOuter]: [number, number]): [number, number] {
    // The lower common tangent.
    for (;;) {
      if (leftOf(origin[rightInner]!, leftInner)) leftInner = leftNext(leftInner)
      else if (rightOf(origin[leftInner]!, rightInner)) rightInner = next[rightInner ^ 1]!
      else break
    }
    let base = connect(rightInner ^ 1, leftInner)
    if (origin[leftInner] === origin[leftOuter]) leftOuter = base ^ 1
    if (origin[rightInner] === origin[rightOuter]) rightOuter = base
    // The rising bubble: its circle passes through the base edge and meets the next point of the left or the right part.
    for (;;) {
      let left = next[base ^ 1]!
      const leftValid = rightOf(target(left), base)
      if (leftValid) {
        while (insideCircle(xy, target(base), origin[base]!, target(left), target(next[left]!))) {
          const after = next[left]!
          remove(left)
          left = after
        }
      }
      let right = previous[base]!
      const rightValid = rightOf(target(right), base)
      if (rightValid) {
        while (insideCircle(xy, target(base), origin[base]!, target(right), target(previous[right]!))) {
          const after = previous[right]!
          remove(right)
          right = after
        }
      }
      if (!leftValid && !rightValid) return [leftOuter, rightOuter]
      const takeRight = !leftValid
        || (rightValid && insideCircle(xy, target(left), origin[left]!, origin[right]!, target(right)))
      base = takeRight ? connect(right, base ^ 1) : connect(base ^ 1, left ^ 1)
    }
  }

  divide(0, order)
  return { origin: origin.subarray(0, used), next: next.subarray(0, used), previous: previous.subarray(0, used) }
}
