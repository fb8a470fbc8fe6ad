/** Row distance of the hexagonal lattice with minimum distance 1. */
const rowHeight = Math.sqrt(3) / 2

/** Squared distances closer than this are equal; different ones of the lattice differ by more at the offsets that matter. */
const tie = 1e-9

/**
 * How far the radius that holds the M nearest points to an offset may differ from that of a disc of equal area,
 * the offset's own length (up to 0.58) included.
 */
const rim = 1.7

/** The lattice around the origin, split into what every set of M nearest points contains and what it may contain. */
interface Lattice {
  inner: number[][]
  outer: number[][]
  /** Σ x, Σ y and Σ (x² + y²) over the inner points */
  sums: [number, number, number]
}

interface Cut {
  /** the chosen outer points */
  rimPoints: number[][]
  /** mean of all points */
  centre: [number, number]
  /** mean energy about that mean, at minimum distance 1 */
  energy: number
}

/**
 * The M points of A2 (minimum distance 1) with the least energy about their own mean, recentred on that mean.
 * The best set consists of the M lattice points nearest to its own mean: replacing one by a nearer one would lower the
 * energy. So each start walks from offset to mean until it stays, and the starts cover the twelfth of the cell that symmetry leaves.
 * @param order M, 2 to 4096
 * @returns points by distance from the mean, ties by angle
 * @see methods §12; Graham and Sloane, Discrete Comput. Geom. 5 (1990)
 */
export function leastEnergyCut(order: number): number[][] {
  const lattice = latticeFor(order)
  const seen = new Set<string>()
  let best: Cut | null = null
  for (const start of starts(order <= 512 ? 6 : 12)) {
    let offset = start
    for (;;) {
      const cut = nearest(lattice, order, offset)
      if (!best || cut.energy < best.energy - 1e-12) best = cut
      const key = cut.centre.map(x => Math.round(x * 1e9)).join()
      // Walks that meet go on together.
      if (seen.has(key)) break
      seen.add(key)
      offset = cut.centre
    }
  }
  const [cx, cy] = best!.centre
  return byDistance([...lattice.inner, ...best!.rimPoints].map(([x, y]) => [x! - cx, y! - cy]))
}

/**
 * Offsets over the triangle between a lattice point, the middle of an edge and the middle of a lattice triangle.
 * For every M up to 300, 6 steps find what 24 find; up to 4096, 12 find what 32 find.
 */
function starts(steps: number): [number, number][] {
  const result: [number, number][] = []
  for (let a = 0; a <= steps; a++) {
    for (let b = 0; b <= a; b++) result.push([a / steps / 2, b / steps * Math.sqrt(3) / 6])
  }
  return result
}

function latticeFor(order: number): Lattice {
  const radius = Math.sqrt(order * rowHeight / Math.PI)
  const lattice: Lattice = { inner: [], outer: [], sums: [0, 0, 0] }
  const rows = Math.ceil((radius + rim) / rowHeight)
  const columns = Math.ceil(radius + rim) + 1
  for (let row = -rows; row <= rows; row++) {
    for (let column = -columns; column <= columns; column++) {
      const point = [column + (row % 2 === 0 ? 0 : 0.5), row * rowHeight]
      const square = point[0]! ** 2 + point[1]! ** 2
      if (Math.sqrt(square) > radius + rim) continue
      const inside = Math.sqrt(square) < radius - rim
      lattice[inside ? 'inner' : 'outer'].push(point)
      if (inside) [point[0]!, point[1]!, square].forEach((term, n) => lattice.sums[n]! += term)
    }
  }
  return lattice
}

/** The M lattice points nearest to an offset. */
function nearest({ inner, outer, sums }: Lattice, order: number, [ox, oy]: [number, number]): Cut {
  const wanted = order - inner.length
  const squares = Float64Array.from(outer, ([x, y]) => (x! - ox) ** 2 + (y! - oy) ** 2)
  const threshold = squares.slice().sort()[wanted - 1]!
  const rimPoints = outer.filter((_, n) => squares[n]! < threshold - tie)
  if (rimPoints.length < wanted) {
    const tied = outer.filter((_, n) => Math.abs(squares[n]! - threshold) <= tie)
    tied.sort((a, b) => angleOf(a[0]! - ox, a[1]! - oy) - angleOf(b[0]! - ox, b[1]! - oy))
    rimPoints.push(...tied.slice(0, wanted - rimPoints.length))
  }
  let [x, y, square] = sums
  for (const point of rimPoints) {
    x += point[0]!
    y += point[1]!
    square += point[0]! ** 2 + point[1]! ** 2
  }
  const centre: [number, number] = [x / order, y / order]
  return { rimPoints, centre, energy: square / order - centre[0] ** 2 - centre[1] ** 2 }
}

/** Angle from 0 up to 2π; rounding below the axis counts as on it. */
function angleOf(x: number, y: number): number {
  const angle = Math.atan2(y, x)
  return angle < -tie ? angle + 2 * Math.PI : angle
}

function byDistance(points: number[][]): number[][] {
  return points
    .map(point => ({ point, square: Math.round((point[0]! ** 2 + point[1]! ** 2) / tie), angle: angleOf(point[0]!, point[1]!) }))
    .sort((a, b) => a.square - b.square || a.angle - b.angle)
    .map(({ point }) => point)
}
