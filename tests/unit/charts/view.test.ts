import { describe, expect, it } from 'vitest'
import { between, including, magnified, wholeView } from '../../../app/utils/charts/view'
import { capacity, quantityOf } from '../../../app/utils/charts/quantities'
import { sampleCurves } from './sample-curves'

const [ser, rate] = [quantityOf('ser'), quantityOf('rate')]

describe('the whole range', () => {
  it('shows rates from 1 to 1e-9', () => expect(wholeView([sampleCurves()], ser, 1e-6).y).toEqual([-9, 0]))
  it('reaches a thousandth of a smaller target', () => expect(wholeView([sampleCurves()], ser, 1e-8).y).toEqual([-11, 0]))
  it('holds the curves and what is available near them', () => expect(wholeView([sampleCurves({ availableDb: 27 })], ser, 1e-6).x).toEqual([-1, 28]))
  it('leaves out what is available far from them', () => expect(wholeView([sampleCurves({ availableDb: 60 })], ser, 1e-6).x).toEqual([-1, 21]))
  it('shows empty axes without rows', () => expect(wholeView([], ser, 1e-6)).toEqual({ x: [0, 30], y: [-9, 0] }))
  it('shows information rates from 0 to above the highest', () => {
    const places = Array.from({ length: 41 }, (_, n) => n - 10)
    const curves = { esN0Db: places, exact: places.map(db => Math.min(4, capacity(2, db))), union: [], nearest: [], bands: {} }
    expect(wholeView([sampleCurves({ curves })], rate, 1e-6).y).toEqual([0, 4.5])
  })
})

describe('the view', () => {
  const view = { x: [0, 20], y: [-8, 0] } as const
  it('is magnified about a place that stays where it is', () => expect(magnified(view, ser, [5, -2], 2)).toEqual({ x: [2.5, 12.5], y: [-5, -1] }))
  it('lies between the corners of a box, drawn either way', () => expect(between(ser, [12, -6], [8, -2])).toEqual({ x: [8, 12], y: [-6, -2] }))
  it('is never narrower than a fifth of a decibel', () => {
    const { x } = between(ser, [10, -6], [10, -2])
    expect(x[1] - x[0]).toBeCloseTo(0.2, 12)
  })
  it('moves as little as it takes to hold a place', () => expect(including(view, ser, [23, -9])).toEqual({ x: [3, 23], y: [-9, -1] }))
  it('stays where it is for a place that it holds', () => expect(including(view, ser, [7, -3])).toEqual({ x: [0, 20], y: [-8, 0] }))
})
