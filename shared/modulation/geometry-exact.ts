/**
 * Whether the facet between points i and j, with the triangles' apexes left and right of it, is longer than 1e-9
 * of the distance between two other points: decided in exact integer arithmetic on the given doubles.
 *
 * The facet's length is (d/2)·(cot K + cot L), K and L the angles at the apexes. With dot and cross products of
 * the apexes' sides, squared and cleared of denominators:
 * d²·(dotK·crossL + dotL·crossK)²·10^18 > 4·shortest²·(crossK·crossL)².
 * @param xy coordinates of the points, finite
 * @param i first end of the edge, turning left with `left` over j
 * @param j second end
 * @param left apex on the left of i → j
 * @param right apex on the right of it
 * @param shortest the two points that are nearest each other
 */
export function facetIsLong(
  xy: Float64Array, i: number, j: number, left: number, right: number, shortest: [number, number],
): boolean {
  const [pi, pj, pl, pr, pa, pb] = wholeNumbers([i, j, left, right, ...shortest].map(n => [xy[2 * n]!, xy[2 * n + 1]!])) as Pair[]
  const [dotK, crossK] = products(minus(pi!, pl!), minus(pj!, pl!))
  const [dotL, crossL] = products(minus(pj!, pr!), minus(pi!, pr!))
  const numerator = dotK * crossL + dotL * crossK
  if (numerator <= 0n) return false
  const denominator = crossK * crossL
  return square(minus(pi!, pj!)) * numerator * numerator * 10n ** 18n
    > 4n * square(minus(pa!, pb!)) * denominator * denominator
}

type Pair = [bigint, bigint]

const minus = (a: Pair, b: Pair): Pair => [a[0] - b[0], a[1] - b[1]]
const square = (a: Pair): bigint => a[0] * a[0] + a[1] * a[1]
const products = (a: Pair, b: Pair): Pair => [a[0] * b[0] + a[1] * b[1], a[0] * b[1] - a[1] * b[0]]

/** Doubles as integers over one common power of two, which no homogeneous comparison sees. */
function wholeNumbers(points: number[][]): bigint[][] {
  const parts = points.map(point => point.map(split))
  const lowest = Math.min(...parts.flat().filter(part => part.mantissa !== 0n).map(part => part.exponent))
  return parts.map(point => point.map(part => part.mantissa === 0n ? 0n : part.mantissa << BigInt(part.exponent - lowest)))
}

const view = new DataView(new ArrayBuffer(8))

/** A finite double as mantissa·2^exponent with a whole mantissa: IEEE 754, binary64. */
function split(x: number): { mantissa: bigint, exponent: number } {
  view.setFloat64(0, x)
  const bits = view.getBigUint64(0)
  const biased = Number((bits >> 52n) & 0x7ffn)
  const fraction = bits & 0xfffffffffffffn
  const mantissa = biased === 0 ? fraction : fraction | 0x10000000000000n
  return { mantissa: x < 0 ? -mantissa : mantissa, exponent: Math.max(biased, 1) - 1075 }
}
