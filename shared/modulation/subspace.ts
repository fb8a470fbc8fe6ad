/** A direction in which all points are this close, as part of the largest difference, is none. */
const flat = 1e-12

/**
 * Points in coordinates of the smallest flat space that holds them all: the same distances in as few dimensions as there are.
 * Gram and Schmidt, the farthest difference first, each taken twice against rounding.
 * @param points M·N coordinates
 * @returns the points as given where they need all N dimensions
 */
export function inOwnSpace(points: Float64Array, dimensions: number): { points: Float64Array, dimensions: number } {
  const order = points.length / dimensions
  const left = Float64Array.from(points, (x, m) => x - points[m % dimensions]!)
  const lengthOf = (i: number) => Math.hypot(...left.subarray(i * dimensions, (i + 1) * dimensions))
  const axes: Float64Array[] = []
  let largest = 0
  while (axes.length < dimensions) {
    let farthest = 0
    for (let i = 1; i < order; i++) if (lengthOf(i) > lengthOf(farthest)) farthest = i
    const length = lengthOf(farthest)
    if (axes.length === 0) largest = length
    if (!(length > flat * largest)) break
    const axis = left.slice(farthest * dimensions, (farthest + 1) * dimensions).map(x => x / length)
    axes.push(axis)
    for (let i = 0; i < order; i++) {
      for (const known of [axis, ...axes]) {
        const along = dot(left.subarray(i * dimensions, (i + 1) * dimensions), known)
        for (let n = 0; n < dimensions; n++) left[i * dimensions + n]! -= along * known[n]!
      }
    }
  }
  if (axes.length === dimensions) return { points, dimensions }
  const origin = points.subarray(0, dimensions)
  const own = Float64Array.from({ length: order * axes.length }, (_, m) => {
    const i = Math.floor(m / axes.length)
    return dot(points.subarray(i * dimensions, (i + 1) * dimensions).map((x, n) => x - origin[n]!), axes[m % axes.length]!)
  })
  return { points: own, dimensions: axes.length }
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0
  for (let n = 0; n < a.length; n++) sum += a[n]! * b[n]!
  return sum
}
