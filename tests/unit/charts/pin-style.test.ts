import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { lineDash, pinSlots, pinStyle } from '../../../app/utils/pin-style'
import { contrast, distance, seen } from './colour-sight'
import type { Colour } from './colour-sight'

const sheetFile = (name: string) => readFileSync(fileURLToPath(new URL(`../../../app/assets/css/${name}`, import.meta.url)), 'utf8')
const slots = Array.from({ length: pinSlots }, (_, i) => i + 1)
/** Values of a variable on the light sheet and on the dark one. */
const valuesOf = (file: string, name: string) => {
  const [, ...values] = new RegExp(`--${name}: var\\(--if-light, ([\\d ]+)\\) var\\(--if-dark, ([\\d ]+)\\);`).exec(file)!
  return values.map((value): Colour => {
    const [red, green, blue] = value.split(' ').map(Number)
    return [red!, green!, blue!]
  })
}
const pins = sheetFile('pins.css')
const tokens = sheetFile('sheet.css')

describe.each([['light', 0], ['dark', 1]] as const)('inks on the %s sheet', (_, sheet) => {
  const inks = slots.map(slot => valuesOf(pins, `pin-${slot}`)[sheet]!)
  const pairs = inks.flatMap((a, i) => inks.slice(i + 1).map(b => [a, b] as const))
  it.each(['normal', 'deuteranopia', 'protanopia'] as const)('lie 0.09 apart in OKLab for %s sight', (sight) => {
    expect(Math.min(...pairs.map(([a, b]) => distance(seen(a, sight), seen(b, sight))))).toBeGreaterThan(0.09)
  })
  it('reach a contrast of 3 on the paper', () => {
    expect(Math.min(...inks.map(ink => contrast(ink, valuesOf(tokens, 'paper')[sheet]!)))).toBeGreaterThan(3)
  })
})

describe('a pinned row\'s style', () => {
  it('has a marker of its own in every slot', () => expect(new Set(slots.map(slot => pinStyle(slot).marker)).size).toBe(12))
  it('has a marker name of its own in every slot', () => expect(new Set(slots.map(slot => pinStyle(slot).markerName)).size).toBe(12))
  it('names its ink by a variable', () => expect(pinStyle(3).colour).toBe('rgb(var(--pin-3))'))
  it('draws exact lines solid', () => expect(lineDash('exact', 2)).toBe('none'))
  it('draws bounds dashed', () => expect(lineDash('union', 1)).toBe('7 3'))
  it('draws approximations dotted', () => expect(lineDash('nearest', 1)).toBe('0 4'))
  it('refuses a slot that does not exist', () => expect(() => pinStyle(13)).toThrow(RangeError))
})
