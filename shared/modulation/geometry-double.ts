/**
 * Twofold precision for the circle test: numbers are pairs of doubles, good for about 31 digits. Dekker, Numer. Math. 18 (1971).
 * The second half of a result waits in `low`, so that hot loops allocate nothing.
 */
let low = 0

/** 2^27 + 1 splits a double into two halves of 26 bits. */
const splitter = 134217729

/** a·b; the rounding error goes to `low`. */
function product(a: number, b: number): number {
  const p = a * b
  const ca = splitter * a
  const ah = ca - (ca - a)
  const al = a - ah
  const cb = splitter * b
  const bh = cb - (cb - b)
  const bl = b - bh
  low = al * bl - (((p - ah * bh) - al * bh) - ah * bl)
  return p
}

/** (a + al)·(b + bl). */
function times(a: number, al: number, b: number, bl: number): number {
  const p = product(a, b)
  const rest = low + (a * bl + al * b)
  const sum = p + rest
  low = rest - (sum - p)
  return sum
}

/** (a + al) + (b + bl). */
function plus(a: number, al: number, b: number, bl: number): number {
  const s = a + b
  const virtual = s - a
  const rest = ((a - (s - virtual)) + (b - virtual)) + al + bl
  const sum = s + rest
  low = rest - (sum - s)
  return sum
}

/** x² + y². */
function square(x: number, xl: number, y: number, yl: number): number {
  const a = times(x, xl, x, xl)
  const al = low
  const b = times(y, yl, y, yl)
  return plus(a, al, b, low)
}

/** x·v − u·y. */
function cross(x: number, xl: number, y: number, yl: number, u: number, ul: number, v: number, vl: number): number {
  const a = times(x, xl, v, vl)
  const al = low
  const b = times(u, ul, y, yl)
  return plus(a, al, -b, -low)
}

/**
 * The determinant of the circle test for a, b, c seen from d, in twofold precision: positive when d is inside.
 * @returns the determinant, off by less than 1e-28 of the sum of its terms' sizes
 */
export function circleDeterminant(
  ax: number, ay: number, bx: number, by: number, cx: number, cy: number, dx: number, dy: number,
): number {
  const px = plus(ax, 0, -dx, 0), pxl = low
  const py = plus(ay, 0, -dy, 0), pyl = low
  const qx = plus(bx, 0, -dx, 0), qxl = low
  const qy = plus(by, 0, -dy, 0), qyl = low
  const rx = plus(cx, 0, -dx, 0), rxl = low
  const ry = plus(cy, 0, -dy, 0), ryl = low
  const p = square(px, pxl, py, pyl), pl = low
  const q = square(qx, qxl, qy, qyl), ql = low
  const r = square(rx, rxl, ry, ryl), rl = low
  const qr = cross(qx, qxl, qy, qyl, rx, rxl, ry, ryl), qrl = low
  const rp = cross(rx, rxl, ry, ryl, px, pxl, py, pyl), rpl = low
  const pq = cross(px, pxl, py, pyl, qx, qxl, qy, qyl), pql = low
  const first = times(p, pl, qr, qrl), firstLow = low
  const second = times(q, ql, rp, rpl), secondLow = low
  const third = times(r, rl, pq, pql), thirdLow = low
  const sum = plus(first, firstLow, second, secondLow)
  return plus(sum, low, third, thirdLow)
}
