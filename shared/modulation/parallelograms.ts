/** Points that complete a parallelogram but for this part of its diagonal are on its corner. */
const rounding = 1e-13

/**
 * Whether two points are the ends of a parallelogram's diagonal that is not the shorter one, for parallelograms with a third point out of a
 * given list. Their half spaces then follow from those of the other two corners: with a_j = a_k + a_l and |a_j|² ≥ |a_k|² + |a_l|²,
 * whoever is nearer to s_i than to s_k and s_l is nearer to s_i than to s_j.
 * @param points M·N coordinates
 */
export function parallelogramsOf(points: Float64Array, dimensions: number): (i: number, j: number, corners: readonly number[]) => boolean {
  const order = points.length / dimensions
  // A direction in no simple ratio to any lattice tells points apart by one number.
  const place = (at: (n: number) => number) => {
    let sum = 0
    for (let n = 0; n < dimensions; n++) sum += at(n) * Math.sin(1 + 0.7 * n)
    return sum
  }
  const unsorted = Float64Array.from({ length: order }, (_, i) => place(n => points[i * dimensions + n]!))
  const byPlace = Int32Array.from({ length: order }, (_, i) => i).sort((a, b) => unsorted[a]! - unsorted[b]!)
  const places = unsorted.slice().sort()
  const scale = points.reduce((most, x) => Math.max(most, Math.abs(x)), 0)

  return (i, j, corners) => {
    const square = squareOf(n => points[j * dimensions + n]! - points[i * dimensions + n]!)
    for (const k of corners) {
      // s_l = s_i + s_j − s_k, and the angle at k is not acute.
      const others = squareOf(n => points[k * dimensions + n]! - points[i * dimensions + n]!)
        + squareOf(n => points[j * dimensions + n]! - points[k * dimensions + n]!)
      if (others > square * (1 + 1e-9)) continue
      const wanted = unsorted[i]! + unsorted[j]! - unsorted[k]!
      const reach = rounding * scale * 64
      for (let m = firstFrom(places, wanted - reach); m < order && places[m]! <= wanted + reach; m++) {
        const l = byPlace[m]!
        const off = squareOf(n => points[i * dimensions + n]! + points[j * dimensions + n]! - points[k * dimensions + n]! - points[l * dimensions + n]!)
        if (off <= rounding * rounding * scale * scale * 16) return true
      }
    }
    return false
  }

  function squareOf(difference: (n: number) => number): number {
    let sum = 0
    for (let n = 0; n < dimensions; n++) sum += difference(n) ** 2
    return sum
  }
}

/** Index of the first of rising numbers that is not below a value. */
function firstFrom(rising: Float64Array, value: number): number {
  let [low, high] = [0, rising.length]
  while (low < high) {
    const middle = low + high >> 1
    if (rising[middle]! < value) low = middle + 1
    else high = middle
  }
  return low
}
