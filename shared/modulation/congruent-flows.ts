/** Lengths that differ by less than this part of d_min are equal: it moves no bit error rate above 1e-20 by 1e-10. */
const quantum = 3e-13

/** Places of the table; when it is half full, what it holds is handed on. */
const places = 2 ** 16

/** A flow through an edge at distance h, from near to far along it, with a factor of either sign. */
export type TakeFlow = (h: number, near: number, far: number, factor: number) => void

const double = new Float64Array(1)
const halves = new Uint32Array(double.buffer)

/** Puts flows through edges of the same shape and place together, so that each kind is integrated once: a table by hashing. */
export class CongruentFlows {
  private readonly step: number
  private readonly h = new Float64Array(places)
  private readonly near = new Float64Array(places)
  private readonly far = new Float64Array(places)
  private readonly factor = new Float64Array(places)
  /** places in use, in the order of arrival */
  private readonly used = new Int32Array(places / 2)
  private count = 0

  /**
   * @param minimumDistance d_min, signal units
   * @param take gets the flows together
   */
  constructor(minimumDistance: number, private readonly take: TakeFlow) {
    this.step = quantum * minimumDistance
  }

  /** Adds a flow to those of its kind. */
  add(h: number, near: number, far: number, factor: number): void {
    const { step } = this
    const [kh, k1, k2] = [Math.round(h / step), Math.round(near / step), Math.round(far / step)]
    let place = mixed(mixed(mixed(0, kh), k1), k2) & places - 1
    while (this.h[place] !== 0) {
      if (Math.round(this.h[place]! / step) === kh && Math.round(this.near[place]! / step) === k1 && Math.round(this.far[place]! / step) === k2) {
        this.factor[place]! += factor
        return
      }
      place = place + 1 & places - 1
    }
    this.h[place] = h
    this.near[place] = near
    this.far[place] = far
    this.factor[place] = factor
    this.used[this.count++] = place
    if (this.count === this.used.length) this.flush()
  }

  /** Hands on what the table holds, and empties it. */
  flush(): void {
    for (let n = 0; n < this.count; n++) {
      const place = this.used[n]!
      if (this.factor[place] !== 0) this.take(this.h[place]!, this.near[place]!, this.far[place]!, this.factor[place]!)
      this.h[place] = 0
    }
    this.count = 0
  }
}

/** A hash with the bits of another number mixed in. */
function mixed(hash: number, x: number): number {
  double[0] = x
  let h = Math.imul(hash ^ halves[0]!, 0x9E3779B1) ^ halves[1]!
  h = Math.imul(h ^ h >>> 15, 0x85EBCA6B)
  return h ^ h >>> 13
}
