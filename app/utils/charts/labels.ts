import { along, inFrame } from './along'
import type { Frame } from './along'
import type { Place } from './curves'

/** A name put at its curve: `at` is the point of the curve, the text begins or ends at `x`. */
export type Label = { id: string, text: string, x: number, y: number, anchor: 'start' | 'end', at: Place, box: Frame }

export const lettering = { size: 11, advance: 6.6, height: 14 }
const longest = 24
const reaches = [9, 24, 44, 70, 104, 150]

export const shortened = (text: string, length = longest) => text.length <= length ? text : `${text.slice(0, length - 1)}…`

const overlap = (a: Frame, b: Frame) => a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom
const inside = (box: Frame, frame: Frame) => box.left >= frame.left && box.right <= frame.right && box.top >= frame.top && box.bottom <= frame.bottom

const candidatesOf = (id: string, text: string, line: readonly Place[]): Label[] => {
  const width = text.length * lettering.advance
  return along(line, 14, 8).flatMap(at => reaches.flatMap(reach => (['start', 'end'] as const).map((anchor) => {
    const x = at[0] + (anchor === 'start' ? reach : -reach)
    const left = anchor === 'start' ? x : x - width
    return {
      id, text, x, y: at[1], anchor, at,
      box: { left: left - 3, right: left + width + 3, top: at[1] - lettering.height / 2, bottom: at[1] + lettering.height / 2 },
    }
  })))
}

/** Points of the drawing's lines, by bands as high as a text: a text meets those of at most three bands. */
class Dots {
  private readonly bands = new Map<number, Place[]>()
  private readonly bandOf = (y: number) => Math.floor(y / lettering.height)

  constructor(lines: readonly (readonly Place[])[], frame: Frame) {
    for (const dot of lines.flatMap(line => along(inFrame(line, frame), 5, 0))) {
      const band = this.bands.get(this.bandOf(dot[1]))
      if (band) band.push(dot)
      else this.bands.set(this.bandOf(dot[1]), [dot])
    }
  }

  * around({ top, bottom }: Frame) {
    for (let band = this.bandOf(top); band <= this.bandOf(bottom); band++) yield this.bands.get(band) ?? []
  }
}

/** What a place costs: lines under the text most, then lines that the leader crosses, then the leader's length. */
const costOf = ({ box, at, x, anchor, y }: Label, dots: Dots) => {
  let cost = Math.abs(x - at[0]) / 40
  const near = anchor === 'start' ? at[0] + 4 : x
  const far = anchor === 'start' ? x : at[0] - 4
  for (const band of dots.around(box)) {
    for (const [u, v] of band) {
      if (u > box.left && u < box.right && v > box.top && v < box.bottom) cost += 3
      else if (u > near && u < far && Math.abs(v - y) < 3) cost += 0.6
    }
  }
  return cost
}

/**
 * Puts each name at its own line, in the frame, without touching another name or what is taken already.
 * @param lines what to name, corners in pixels
 * @param crossed all lines of the drawing, which texts and leaders rather keep clear of
 * @param frame of the drawing, pixels
 * @param taken boxes to keep clear of
 * @returns labels of the lines that are in the frame and found a place
 */
export function placeLabels(
  lines: readonly { id: string, text: string, line: readonly Place[] }[],
  crossed: readonly (readonly Place[])[],
  frame: Frame,
  taken: readonly Frame[],
): Label[] {
  const seen = lines.map(({ id, text, line }) => ({ id, text: shortened(text), line: inFrame(line, frame) }))
  const dots = new Dots(crossed, frame)
  const labels: Label[] = []
  for (const { id, text, line } of seen.sort((a, b) => (a.line[0]?.[0] ?? 0) - (b.line[0]?.[0] ?? 0))) {
    let best: Label | null = null
    let least = Infinity
    for (const label of candidatesOf(id, text, line)) {
      if (!inside(label.box, frame) || [...taken, ...labels.map(l => l.box)].some(box => overlap(box, label.box))) continue
      const cost = costOf(label, dots)
      if (cost < least) {
        best = label
        least = cost
      }
    }
    if (best) labels.push(best)
  }
  return labels
}
