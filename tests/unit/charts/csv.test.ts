import { expect, it } from 'vitest'
import { curvesCsv } from '../../../app/utils/charts/curves-csv'
import { curvesOf, quantityOf } from '../../../app/utils/charts/quantities'
import { sampleRow } from '../columns/sample-row'
import { sampleCurves } from './sample-curves'

const { values } = sampleRow({ netBits: 2, paprDb: 0, minimumDistance: null })
const lines = (name: string) => curvesCsv([{ ...sampleCurves({ name }), values: values! }], quantityOf('ser')).split('\r\n')

it('heads the columns with every axis and every rate', () => expect(lines('QPSK')[0]).toBe(
  'Line,Name,"Es/N0, dB","Eb/N0, dB","Epk/N0, dB","d_min²/(2·N0), dB","SER, exact","SER, union bound","SER, approximation"',
))
it('writes numbers in full and an empty cell for a missing one', () => {
  expect(lines('QPSK')[3]).toBe('1,QPSK,20,16.989700043360187,20,,0.000001,0.000002,5e-7')
})
it('quotes names that hold separators', () => expect(lines('4+12, "wide"')[1]).toMatch(/^1,"4\+12, ""wide""",0,/))
it('keeps a spreadsheet from taking a name for a formula', () => expect(lines('=1+1')[1]).toMatch(/^1,"?'=1\+1"?,0,/))
it('gives the ends of intervals columns of their own', () => {
  const curves = curvesOf({ esN0Db: [0], mutualInformation: [1], bitMetricRate: [0.9], mutualInformationLow: [0.98], mutualInformationHigh: [1.02] })
  const [head, line] = curvesCsv([{ ...sampleCurves({ curves }), values: values! }], quantityOf('rate')).split('\r\n')
  expect([head!.slice(head!.indexOf('"Rate')), line!.slice(line!.indexOf(',,') + 2)]).toEqual([
    '"Rate, mutual information, bit/symbol","Rate, mutual information, bit/symbol, low","Rate, mutual information, bit/symbol, high","Rate, bit-metric rate, bit/symbol"',
    '1,0.98,1.02,0.9',
  ])
})
