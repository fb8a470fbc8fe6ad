/**
 * One cell of a power diagram while half planes cut it, in coordinates relative to its point. It is kept as edges on lines, not as
 * corners, so that edges that run to infinity and parallel lines are nothing special.
 */
export class PowerCell {
  /** number of edges */
  count = 0
  /** no place is left */
  empty = false
  /** no place of the cell is farther from the point; Infinity while the cell is not closed */
  radius = Infinity
  readonly owner: Int32Array
  /** unit vectors towards the owners */
  private readonly ux: Float64Array
  private readonly uy: Float64Array
  private readonly distance: Float64Array
  /** signed distances of the lines */
  readonly h: Float64Array
  /** ends along the lines from the foot, to the left of the vector to the owner */
  readonly t1: Float64Array
  readonly t2: Float64Array

  /**
   * @param capacity most edges that a cell can have
   * @param onLine whether points have one coordinate, so that a cell is closed by two edges
   * @param flat a triangle no higher than this is a line, as far as the coordinates can say
   */
  constructor(capacity: number, private readonly onLine: boolean, private readonly flat: number) {
    const numbers = () => new Float64Array(capacity)
    this.owner = new Int32Array(capacity)
    this.ux = numbers()
    this.uy = numbers()
    this.distance = numbers()
    this.h = numbers()
    this.t1 = numbers()
    this.t2 = numbers()
  }

  /** The whole plane again. */
  reset(): void {
    this.count = 0
    this.empty = false
    this.radius = Infinity
  }

  /**
   * Keeps the half plane on the point's side of one more line.
   * @param owner whose side the other is
   * @param ux unit vector towards the owner
   * @param uy its second coordinate
   * @param distance of the owner
   * @param h signed distance of the line from the point, positive towards the owner
   */
  cut(owner: number, ux: number, uy: number, distance: number, h: number): void {
    if (h >= this.radius || this.empty) return
    let low = -Infinity
    let high = Infinity
    for (let e = 0; e < this.count; e++) {
      const cosine = this.ux[e]! * ux + this.uy[e]! * uy
      const sine = this.ux[e]! * uy - this.uy[e]! * ux
      const room = this.h[e]! - h * cosine
      if (this.parallel(sine, distance, e)) {
        if (cosine > 0 && room <= 0) return
        if (cosine < 0 && room < 0) return this.close()
      } else if (sine > 0) {
        low = Math.max(low, -room / sine)
      } else {
        high = Math.min(high, -room / sine)
      }
    }
    if (low < high) this.add(owner, ux, uy, distance, h, low, high)
    else if (this.lieBeyond(ux, uy, h)) this.close()
  }

  private parallel(sine: number, distance: number, e: number): boolean {
    return Math.abs(sine) * Math.min(distance, this.distance[e]!) <= this.flat
  }

  private close(): void {
    this.count = 0
    this.empty = true
  }

  /**
   * Whether the edges, none of which the line crosses, lie on its other side. One that does not settles it: in a corner where many lines
   * meet, edges are as short as rounding makes them, and on either side.
   */
  private lieBeyond(ux: number, uy: number, h: number): boolean {
    for (let e = 0; e < this.count; e++) {
      const [t1, t2] = [this.t1[e]!, this.t2[e]!]
      const t = t1 === -Infinity ? Math.min(t2, 0) : t2 === Infinity ? Math.max(t1, 0) : (t1 + t2) / 2
      const along = this.h[e]! * (this.ux[e]! * ux + this.uy[e]! * uy) + t * (this.ux[e]! * uy - this.uy[e]! * ux)
      if (along <= h) return false
    }
    return true
  }

  /** Shortens the edges by a line that crosses the cell, and adds the line's own. */
  private add(owner: number, ux: number, uy: number, distance: number, h: number, low: number, high: number): void {
    let kept = 0
    for (let e = 0; e < this.count; e++) {
      const cosine = this.ux[e]! * ux + this.uy[e]! * uy
      const sine = this.ux[e]! * uy - this.uy[e]! * ux
      const room = h - this.h[e]! * cosine
      let [t1, t2] = [this.t1[e]!, this.t2[e]!]
      if (this.parallel(sine, distance, e)) {
        if (cosine > 0) continue
      } else if (sine > 0) {
        t2 = Math.min(t2, room / sine)
      } else {
        t1 = Math.max(t1, room / sine)
      }
      if (t1 < t2) this.set(kept++, this.owner[e]!, this.ux[e]!, this.uy[e]!, this.distance[e]!, this.h[e]!, t1, t2)
    }
    this.set(kept++, owner, ux, uy, distance, h, low, high)
    this.count = kept
    this.radius = this.onLine ? this.radiusOnLine() : this.radiusInPlane()
  }

  private set(e: number, owner: number, ux: number, uy: number, distance: number, h: number, t1: number, t2: number): void {
    this.owner[e] = owner
    this.ux[e] = ux
    this.uy[e] = uy
    this.distance[e] = distance
    this.h[e] = h
    this.t1[e] = t1
    this.t2[e] = t2
  }

  private radiusOnLine(): number {
    return this.count === 2 ? Math.max(Math.abs(this.h[0]!), Math.abs(this.h[1]!)) : Infinity
  }

  private radiusInPlane(): number {
    let square = 0
    for (let e = 0; e < this.count; e++) {
      const [h, t1, t2] = [this.h[e]!, this.t1[e]!, this.t2[e]!]
      square = Math.max(square, h * h + Math.max(t1 * t1, t2 * t2))
    }
    return Math.sqrt(square)
  }
}
