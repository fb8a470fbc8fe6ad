import { describe, expect, it } from 'vitest'
import { esN0AtLogRate, lineOf, logRateAt } from '../../../app/utils/charts/curves'
import { tableLines } from '../../../app/utils/charts/curves-table'
import { q } from '../../../shared/modulation/gaussian'
import { sampleCurves } from './sample-curves'

const { curves } = sampleCurves()

describe('reading a curve', () => {
  it('gives a computed point as it is', () => expect(logRateAt(curves, 'serExact', 10)).toBeCloseTo(-3, 12))
  // halfway between the ratios 1 and 10 lies 5.5, or 7.4036 dB; halfway between 10⁻¹ and 10⁻³ lies 10⁻²
  it('is linear in log rate over the SNR as a ratio', () => expect(logRateAt(curves, 'serExact', 10 * Math.log10(5.5))).toBeCloseTo(-2, 12))
  it('gives nothing outside the computed range', () => expect([logRateAt(curves, 'serExact', -0.1), logRateAt(curves, 'serExact', 20.1)]).toEqual([null, null]))
  it('gives nothing where the rate is too small for a number', () => {
    expect(logRateAt(sampleCurves({}, [0.1, 1e-3, 0]).curves, 'serExact', 15)).toBeNull()
  })
  it('finds the SNR of a rate between computed points', () => expect(esN0AtLogRate(curves, 'serExact', -2)).toBeCloseTo(7.403626894942439, 10))
  it('finds none for a rate that the curve does not reach', () => expect(esN0AtLogRate(curves, 'serExact', -7)).toBeNull())
  it('is within 0.5 % of Q(√SNR) halfway between 1 dB steps', () => {
    const places = [16, 17]
    const rates = places.map(db => q(Math.sqrt(10 ** (db / 10))))
    const read = 10 ** logRateAt({ esN0Db: places, serExact: rates, serUnion: rates, serNearest: rates }, 'serExact', 16.5)!
    expect(Math.abs(read / q(Math.sqrt(10 ** 1.65)) - 1)).toBeLessThan(0.005)
  })
  it('draws points between the computed ones', () => {
    const line = lineOf(sampleCurves({ shiftDb: 3 }), 'serExact')
    expect([line.length, line[0], line[20], line.at(-1)]).toEqual([41, [3, -1], [13, -3], [23, -6]])
  })
  it('ends a line where the rate is too small for a number', () => expect(lineOf(sampleCurves({}, [0.1, 1e-3, 0]), 'serExact').at(-1)?.[0]).toBe(10))
})

describe('the table of the drawing', () => {
  it('has a line for each computed SNR on the axis drawn', () => {
    expect(tableLines([sampleCurves(), sampleCurves({ id: 'b', shiftDb: -5 })], 100).map(line => line.snrDb)).toEqual([-5, 0, 5, 10, 15, 20])
  })
  it('gives the computed rates in the order exact, bound, approximation', () => {
    expect(tableLines([sampleCurves()], 100)[2]!.rates[0]!.map(rate => rate!.toExponential(3))).toEqual(['1.000e-6', '2.000e-6', '5.000e-7'])
  })
  it('leaves lines out above its limit', () => expect(tableLines([sampleCurves()], 2).map(line => line.snrDb)).toEqual([0, 20]))
})
