/**
 * Relevant neighbours by clipping in exact rational arithmetic, as slow and as plain as can be: what geometry is tested against.
 * A cell is a cyclic list of lines a·x + b·y ≤ c; corners are where lines meet, so that numbers do not grow from cut to cut.
 */
interface Line { a: bigint, b: bigint, c: bigint, owner: number }
type Corner = [x: bigint, y: bigint, w: bigint]

/** The square that stands for the whole plane, in units of the largest coordinate. */
const horizon = 10n ** 13n

/** Doubles as whole multiples of the least power of two among them. */
export function whole(points: number[][]): bigint[][] {
  let exponent = 0
  for (const x of points.flat()) {
    while (!Number.isInteger(x * 2 ** exponent)) exponent += 1
  }
  return points.map(point => point.map(x => BigInt(x * 2 ** exponent)))
}

/** Neighbours whose facet is longer than 1e-9 of the minimum distance, for each of the points of the plane. */
export function relevantByClipping(points: number[][]): number[][] {
  const exact = whole(points) as [bigint, bigint][]
  const square = (i: number, j: number) => (exact[i]![0] - exact[j]![0]) ** 2n + (exact[i]![1] - exact[j]![1]) ** 2n
  let least: bigint | null = null
  for (let i = 0; i < exact.length; i++) {
    for (let j = 0; j < i; j++) if (least === null || square(i, j) < least) least = square(i, j)
  }
  return exact.map((_, i) => {
    const lines = cell(exact, i)
    return lines.flatMap((line, n) => {
      if (line.owner < 0) return []
      const p = meet(lines[(n + lines.length - 1) % lines.length]!, line)
      const q = meet(line, lines[(n + 1) % lines.length]!)
      const [dx, dy, w] = [p[0] * q[2] - q[0] * p[2], p[1] * q[2] - q[1] * p[2], p[2] * q[2]]
      return (dx * dx + dy * dy) * 10n ** 18n > least! * w * w ? [line.owner] : []
    }).sort((a, b) => a - b)
  })
}

function cell(points: [bigint, bigint][], i: number): Line[] {
  const size = horizon * points.flat().reduce((most, x) => x > most ? x : -x > most ? -x : most, 0n)
  let lines: Line[] = [
    { a: 1n, b: 0n, c: size, owner: -1 }, { a: 0n, b: 1n, c: size, owner: -1 },
    { a: -1n, b: 0n, c: size, owner: -1 }, { a: 0n, b: -1n, c: size, owner: -1 },
  ]
  const [x, y] = points[i]!
  points.forEach(([u, v], owner) => {
    if (owner !== i) lines = cut(lines, { a: 2n * (u - x), b: 2n * (v - y), c: u * u + v * v - x * x - y * y, owner })
  })
  return lines
}

/** The cell on the inner side of one more line. Corner n lies between lines n and n + 1. */
function cut(lines: Line[], line: Line): Line[] {
  const outside = lines.map((_, n) => {
    const [px, py, w] = meet(lines[n]!, lines[(n + 1) % lines.length]!)
    return line.a * px + line.b * py > line.c * w
  })
  if (!outside.includes(true)) return lines
  const result: Line[] = []
  lines.forEach((kept, n) => {
    const before = outside[(n + lines.length - 1) % lines.length]!
    if (!before || !outside[n]!) result.push(kept)
    if (!before && outside[n]!) result.push(line)
  })
  return result
}

/** Where two lines meet, as x/w and y/w with w > 0. */
function meet(p: Line, q: Line): Corner {
  const w = p.a * q.b - q.a * p.b
  const [x, y] = [p.c * q.b - q.c * p.b, p.a * q.c - q.a * p.c]
  return w < 0n ? [-x, -y, -w] : [x, y, w]
}
