import { describe, expect, it } from 'vitest'
import { bandOf, esN0AtHeight, heightAt, lineOf } from '../../../app/utils/charts/curves'
import { tableLines } from '../../../app/utils/charts/curves-table'
import { capacity, curvesOf, quantityOf } from '../../../app/utils/charts/quantities'
import { valueOf } from '../../../shared/modulation/estimate'
import { q } from '../../../shared/modulation/gaussian'
import { sampleCurves } from './sample-curves'

const { curves } = sampleCurves()
const [ser, rate] = [quantityOf('ser'), quantityOf('rate')]

describe('reading a curve', () => {
  it('gives a computed point as it is', () => expect(heightAt(curves, 'exact', ser, 10)).toBeCloseTo(-3, 12))
  // halfway between the ratios 1 and 10 lies 5.5, or 7.4036 dB; halfway between 10⁻¹ and 10⁻³ lies 10⁻²
  it('is linear in log rate over the SNR as a ratio', () => expect(heightAt(curves, 'exact', ser, 10 * Math.log10(5.5))).toBeCloseTo(-2, 12))
  it('gives nothing outside the computed range', () => expect([heightAt(curves, 'exact', ser, -0.1), heightAt(curves, 'exact', ser, 20.1)]).toEqual([null, null]))
  it('gives nothing where the rate is too small for a number', () => {
    expect(heightAt(sampleCurves({}, [0.1, 1e-3, 0]).curves, 'exact', ser, 15)).toBeNull()
  })
  it('finds the SNR of a rate between computed points', () => expect(esN0AtHeight(curves, 'exact', ser, -2)).toBeCloseTo(7.403626894942439, 10))
  it('finds none for a rate that the curve does not reach', () => expect(esN0AtHeight(curves, 'exact', ser, -7)).toBeNull())
  it('is within 0.5 % of Q(√SNR) halfway between 1 dB steps', () => {
    const places = [16, 17]
    const rates = places.map(db => q(Math.sqrt(10 ** (db / 10))))
    const read = 10 ** heightAt({ esN0Db: places, exact: rates, union: rates, nearest: rates, bands: {} }, 'exact', ser, 16.5)!
    expect(Math.abs(read / q(Math.sqrt(10 ** 1.65)) - 1)).toBeLessThan(0.005)
  })
  it('draws points between the computed ones', () => {
    const line = lineOf(sampleCurves({ shiftDb: 3 }), 'exact', ser)
    expect([line.length, line[0], line[20], line.at(-1)]).toEqual([41, [3, -1], [13, -3], [23, -6]])
  })
  it('ends a line where the rate is too small for a number', () => expect(lineOf(sampleCurves({}, [0.1, 1e-3, 0]), 'exact', ser).at(-1)?.[0]).toBe(10))
})

describe('the table of the drawing', () => {
  it('has a line for each computed SNR on the axis drawn', () => {
    expect(tableLines([sampleCurves(), sampleCurves({ id: 'b', shiftDb: -5 })], ser, 100).map(line => line.snrDb)).toEqual([-5, 0, 5, 10, 15, 20])
  })
  it('gives the computed rates in the order exact, bound, approximation', () => {
    expect(tableLines([sampleCurves()], ser, 100)[2]!.rates[0]!.map(rate => valueOf(rate!).toExponential(3))).toEqual(['1.000e-6', '2.000e-6', '5.000e-7'])
  })
  it('leaves lines out above its limit', () => expect(tableLines([sampleCurves()], ser, 2).map(line => line.snrDb)).toEqual([0, 20]))
})

describe('information rates', () => {
  // Capacity of two dimensions stands for a smooth curve.
  const places = [0, 1, 2, 3, 4, 5, 6]
  const rates = places.map(db => capacity(2, db))
  const information = { esN0Db: places, exact: rates, union: [], nearest: [], bands: {} }
  it('are read between computed points to 1e-4 bit', () => expect(heightAt(information, 'exact', rate, 2.5)).toBeCloseTo(capacity(2, 2.5), 4))
  it('give the SNR at which they rise to a rate', () => expect(esN0AtHeight(information, 'exact', rate, capacity(2, 3.3))).toBeCloseTo(3.3, 3))
  it('give nothing where a row has no such curve', () => expect(heightAt(information, 'union', rate, 3)).toBeNull())
  it('are 1 bit in two dimensions at 0 dB', () => expect(capacity(2, 0)).toBe(1))
  it('are drawn solid for the mutual information and dashed for the bit-metric rate', () => {
    const { exact, union } = curvesOf({ esN0Db: [0], mutualInformation: [1], bitMetricRate: [0.9] })
    expect([exact, union]).toEqual([[1], [0.9]])
  })
})

describe('an estimated curve', () => {
  const estimated = curvesOf({ esN0Db: [0, 10], serUnion: [0.3, 0.02], serNearest: [0.1, 0.01], serExact: [0.1, 0.01], serLow: [0.05, 0.005], serHigh: [0.2, 0.02] })
  it('has an area from its low to its high end', () => {
    const band = bandOf({ curves: estimated, shiftDb: 0 }, 'exact', ser)!
    expect([band.low[0]![1], band.high[0]![1]].map(height => 10 ** height).map(value => value.toFixed(3))).toEqual(['0.050', '0.200'])
  })
  it('stands in the table with its interval', () => {
    expect(tableLines([sampleCurves({ curves: estimated })], ser, 100)[0]!.rates[0]![0]).toEqual({ value: 0.1, low: 0.05, high: 0.2 })
  })
  it('has no area where it is exact', () => expect(bandOf(sampleCurves(), 'exact', ser)).toBeNull())
})
