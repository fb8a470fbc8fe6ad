/**
 * Gray labels by halving: along the coordinate in which the points lie widest they are divided into two equal parts, a bit tells which, and
 * each part is divided further, the second seen in the mirror. A grid gets the reflected Gray code along each coordinate. Any dimension.
 * @param points M points, M a power of two
 * @returns words in the order of the points
 */
export function halvedWords(points: readonly ArrayLike<number>[]): number[] {
  const words = new Array<number>(points.length).fill(0)
  halve(points, points.map((_, i) => i), points.length >> 1, new Array<number>(points[0]!.length).fill(1), words)
  return words
}

function halve(points: readonly ArrayLike<number>[], members: number[], bit: number, mirror: readonly number[], words: number[]): void {
  if (bit === 0) return
  const axis = widest(points, members)
  const along = (i: number) => mirror[axis]! * points[i]![axis]!
  const sorted = members.toSorted((a, b) => along(a) - along(b) || a - b)
  const middle = sorted.length / 2
  const second = sorted.slice(middle)
  for (const i of second) words[i]! += bit
  halve(points, sorted.slice(0, middle), bit >> 1, mirror, words)
  halve(points, second, bit >> 1, mirror.map((sign, n) => n === axis ? -sign : sign), words)
}

/** The coordinate with the greatest extent; of equal ones, to rounding, the first. */
function widest(points: readonly ArrayLike<number>[], members: readonly number[]): number {
  let best = 0
  let extent = 0
  for (let n = 0; n < points[0]!.length; n++) {
    let low = Infinity
    let high = -Infinity
    for (const i of members) {
      low = Math.min(low, points[i]![n]!)
      high = Math.max(high, points[i]![n]!)
    }
    if (high - low > extent * (1 + 1e-9)) {
      best = n
      extent = high - low
    }
  }
  return best
}
