import { describe, expect, it } from 'vitest'
import { columnOf, columns, headerOf, whyOf } from '../../../shared/columns'
import { verdictKinds } from '../../../shared/modulation/verdict'
import { candidateChange, candidateInputs } from '../../../shared/schemas/candidates'
import { sampleRow } from './sample-row'

const row = sampleRow({})
const context = { reference: sampleRow({ requiredEsN0Db: 20.5 }), requirements: null }

describe('the columns', () => {
  it('have ids of their own', () => expect(new Set(columns.map(c => c.id)).size).toBe(columns.length))
  it('open as the Candidates page is described', () => expect(columns.filter(c => c.firstOpening).map(headerOf)).toEqual([
    'Name', 'Verdict', 'Surplus, dB', 'Family', 'M', 'Rings/ratios', 'r', 'Basis', 'Required Es/N0, dB', 'Δ to reference, dB',
    'Required Eb/N0, dB', 'PAPR, dB', 'Back-off, dB', 'Available Es/N0, dB', 'Receiver threshold, dBm', 'η, bit/s/Hz', 'Net rate, Mbit/s',
    'Minimum distance at Es = 1', 'Mean nearest neighbours', 'Mean relevant neighbours', 'SER at available, bound',
    'SER at available, approximation', 'SER at available, exact', 'Bound penalty, dB', 'SNR range, dB', 'Note',
  ]))
  it('make every input enterable', () => {
    const entered = new Set(columns.flatMap(c => c.kind === 'input' ? c.fields : []))
    expect(Object.keys(candidateInputs.shape).filter(field => !entered.has(field as 'name'))).toEqual([])
  })
  it.each(columns.flatMap(c => c.kind === 'input' && c.type !== 'points' ? [c] : []))('reads back what $id shows', (column) => {
    const entry = column.parse(column.text(row.inputs))
    if ('refused' in entry) throw new Error(entry.refused)
    const changed = candidateChange.parse(entry.change)
    for (const field of column.fields) if (field in changed) expect(changed[field]).toEqual(row.inputs[field])
  })
  it.each([['margin', 'margin'], ['netRate', 'netBitRate'], ['occupiedBandwidth', 'occupiedBandwidth'], ['spectralEfficiency', 'spectralEfficiency'], ['papr', 'papr']] as const)(
    'round %s as the verdict\'s words do', (id, kind) => expect(columnOf(id)?.round).toBe(verdictKinds[kind].round),
  )
  it.each(columns.filter(c => c.kind === 'computed'))('explains $id', (column) => {
    expect(whyOf(column, row, context)?.lines.join(' ')).toMatch(/\S/)
  })
})

describe('values of columns', () => {
  it('take the reference off in Δ', () => expect(columnOf('delta')?.value(row, context)).toBeCloseTo(0.42, 12))
  it('have no Δ without a reference', () => expect(columnOf('delta')?.value(row, { ...context, reference: null })).toBeNull())
  it('show the net rate in Mbit/s', () => expect(columnOf('netRate')?.value(row, context)).toBeCloseTo(21.28, 12))
  it('count the points of an APSK set', () => {
    const apsk = sampleRow({ order: 16 }, { family: 'apsk', order: 4, rings: [4, 12], ratios: [2.57] })
    expect(columnOf('order')?.value(apsk, context)).toBe(16)
  })
  it('show rings and ratios of APSK only', () => expect(columnOf('rings')?.value(row, context)).toBeNull())
  it('put the row\'s numbers into the margin', () => {
    expect(whyOf(columnOf('margin')!, row, context)?.lines).toEqual(['23.28 dB − 20.92 dB − 1.50 dB = +0.86 dB'])
  })
  it('take the decoder\'s gap off before the gap to capacity', () => {
    const coded = sampleRow({ requiredBy: 'bitMetricRate', netBits: 3, requiredEsN0Db: 11, gapToCapacityDb: 1.549 }, { decoderGapDb: 1 })
    expect(whyOf(columnOf('gapToCapacity')!, coded, context)?.lines).toEqual(['N = 2, R = 3.000: 10.00 dB − 8.45 dB = 1.55 dB'])
  })
  describe('under a target for the BER', () => {
    const bits = sampleRow({ requiredBy: 'berExact', requiredEsN0Db: 18.23, requiredUnionEsN0Db: null, requiredAllPairsEsN0Db: 18.24, requiredNearestEsN0Db: 18.22, boundPenaltyDb: 0.01 })
    it.each([
      ['boundPenalty', '18.24 dB − 18.23 dB = 1.00e−2 dB'],
      ['requiredUnion', 'a target for the BER is bounded over all pairs only'],
      ['requiredAllPairs', 'all-pairs bound of the BER ≤ — from 18.24 dB'],
      ['requiredNearest', 'approximation of the BER by relevant neighbours ≤ — from 18.22 dB'],
    ])('explain %s by the BER', (id, line) => expect(whyOf(columnOf(id)!, bits, context)?.lines).toEqual([line]))
  })
  it('take both intervals into Δ', () => {
    const [own, other] = [sampleRow({ requiredEsN0Db: { value: 21, low: 20.9, high: 21.1 } }), sampleRow({ requiredEsN0Db: { value: 20, low: 19.8, high: 20.2 } })]
    const delta = columnOf('delta')!
    const interval = delta.kind === 'computed' ? delta.interval!(own, { ...context, reference: other }) : null
    expect([interval!.low, interval!.high].map(end => end.toFixed(6))).toEqual(['0.700000', '1.300000'])
  })
  it('tell that a number is an estimate', () => {
    const estimated = sampleRow({ requiredEsN0Db: { value: 21, low: 20.9, high: 21.1 } })
    expect(whyOf(columnOf('requiredEsN0')!, estimated, context)?.tolerance).toBe('an estimate, by seeded simulation between the bounds; its 95 % interval: 20.90…21.10 dB')
  })
  it('explain nothing while a row is computed', () => expect(whyOf(columnOf('margin')!, { ...row, values: null }, context)).toBeNull())
})
