/** Row distance of the hexagonal lattice with minimum distance 1. */
const rowHeight = Math.sqrt(3) / 2

/** Squared distances closer than this are equal; different ones of the lattice differ by far more in the range of M. */
const tie = 1e-9

interface Cut {
  points: number[][]
  /** mean of the points */
  centre: number[]
  /** mean energy about that mean, at minimum distance 1 */
  energy: number
}

/**
 * The M points of A2 (minimum distance 1) with the least energy about their own mean, recentred on that mean.
 * The best set consists of the M lattice points nearest to its own mean: replacing any of them by a nearer one would lower the
 * energy. So each start walks from offset to mean until it stays, and the starts cover the twelfth of the cell that symmetry leaves.
 * @param order M, 2 to 4096
 * @returns points in the order of their distance from the offset, ties by angle
 * @see methods §12; Graham and Sloane, Discrete Comput. Geom. 5 (1990)
 */
export function leastEnergyCut(order: number): number[][] {
  const lattice = latticeDisc(Math.sqrt(order * rowHeight / Math.PI) + 2)
  let best: Cut | null = null
  for (const start of starts(order)) {
    const cut = settled(lattice, order, start)
    if (!best || cut.energy < best.energy - 1e-12) best = cut
  }
  const [cx, cy] = best!.centre as [number, number]
  return best!.points.map(([x, y]) => [x! - cx, y! - cy])
}

/** Offsets over the triangle between a lattice point, the middle of an edge and the middle of a lattice triangle. */
function starts(order: number): number[][] {
  const steps = order <= 256 ? 12 : 6
  const result: number[][] = []
  for (let a = 0; a <= steps; a++) {
    for (let b = 0; b <= a; b++) result.push([a / steps / 2, b / steps * Math.sqrt(3) / 6])
  }
  return result
}

/** Lattice points within a radius of the origin. */
function latticeDisc(radius: number): number[][] {
  const points: number[][] = []
  const rows = Math.ceil(radius / rowHeight)
  for (let row = -rows; row <= rows; row++) {
    const shift = row % 2 === 0 ? 0 : 0.5
    const reach = Math.ceil(radius) + 1
    for (let column = -reach; column <= reach; column++) {
      const [x, y] = [column + shift, row * rowHeight]
      if (x * x + y * y <= radius * radius) points.push([x, y])
    }
  }
  return points
}

/** Takes the nearest points to the offset, then to their mean, until the energy no longer falls. */
function settled(lattice: number[][], order: number, start: number[]): Cut {
  let cut = nearest(lattice, order, start)
  for (;;) {
    const following = nearest(lattice, order, cut.centre)
    if (following.energy >= cut.energy - 1e-12) return cut
    cut = following
  }
}

function nearest(lattice: number[][], order: number, [ox, oy]: number[]): Cut {
  const measured = lattice.map(([x, y]) => {
    const [u, v] = [x! - ox!, y! - oy!]
    const angle = Math.atan2(v, u)
    return { point: [x!, y!], square: Math.round((u * u + v * v) / tie), angle: angle < -tie ? angle + 2 * Math.PI : angle }
  })
  measured.sort((a, b) => a.square - b.square || a.angle - b.angle)
  const points = measured.slice(0, order).map(({ point }) => point)
  const centre = [0, 1].map(n => points.reduce((sum, point) => sum + point[n]!, 0) / order)
  const energy = points.reduce((sum, [x, y]) => sum + (x! - centre[0]!) ** 2 + (y! - centre[1]!) ** 2, 0) / order
  return { points, centre, energy }
}
