import { describe, expect, it } from 'vitest'
import { along, apart, inFrame, levels } from '../../../app/utils/charts/along'
import type { Place } from '../../../app/utils/charts/curves'
import { placeLabels, shortened } from '../../../app/utils/charts/labels'

const frame = { left: 60, top: 30, right: 560, bottom: 350 }
/** Twelve falling lines, eight pixels apart. */
const lines = Array.from({ length: 12 }, (_, n) => ({
  id: `row ${n}`, text: `4+12 at 2.${57 + n}`,
  line: Array.from({ length: 60 }, (_, i): Place => [120 + 8 * n + 200 * Math.sqrt(i / 60), 30 + i * 5.4]),
}))
const labels = placeLabels(lines, lines.map(({ line }) => line), frame, [])

describe('names at the curves', () => {
  it('find a place each for twelve lines', () => expect(labels).toHaveLength(12))
  it('never touch each other', () => {
    const touching = labels.flatMap((a, i) => labels.slice(i + 1).filter(b =>
      a.box.left < b.box.right && b.box.left < a.box.right && a.box.top < b.box.bottom && b.box.top < a.box.bottom))
    expect(touching).toEqual([])
  })
  it('stay inside the frame', () => {
    expect(labels.filter(({ box }) => box.left < 60 || box.right > 560 || box.top < 30 || box.bottom > 350)).toEqual([])
  })
  it('keep clear of what is taken', () => {
    const whole = { left: 0, top: 0, right: 600, bottom: 400 }
    expect(placeLabels(lines, [], frame, [whole])).toEqual([])
  })
  it('leave out a line outside the frame', () => expect(placeLabels([{ id: 'far', text: 'far', line: [[600, 10], [700, 20]] }], [], frame, [])).toEqual([]))
  it('are shortened when long', () => expect(shortened('an uncommonly long name of a row')).toBe('an uncommonly long name…'))
})

describe('places along a line', () => {
  const corner: Place[] = [[0, 0], [30, 0], [30, 40]]
  it('lie at equal distances of arc', () => expect(along(corner, 20, 10)).toEqual([[10, 0], [30, 0], [30, 20], [30, 40]]))
  it('are those in the frame', () => expect(inFrame(corner, { left: 10, top: 0, right: 40, bottom: 30 })).toEqual([[30, 0]]))
  it('are apart from a line by the nearest of its points', () => expect([apart([30, 10], corner, 10), apart([30, 10], corner, 11)]).toEqual([true, false]))
  it('take the lowest free level on a common line', () => expect(levels([100, 104, 130, 108, 116], 11)).toEqual([0, 1, 0, 2, 0]))
})
