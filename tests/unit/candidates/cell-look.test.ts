import { describe, expect, it } from 'vitest'
import { columnOf } from '#shared/columns'
import { cellClasses, cellHint, cellSentence, cellText, fullText, isEditable } from '~/utils/candidates/cell-look'
import type { CellView } from '~/utils/candidates/cell-look'
import { sampleRow } from '../columns/sample-row'

const view = (column: string, change: Partial<CellView> = {}): CellView =>
  ({ row: sampleRow({ marginDb: 0.8677 }), column: columnOf(column)!, context: { reference: null, requirements: null }, save: null, stale: false, ...change })
const failed = { ...sampleRow({}), state: 'failed' as const, values: null, errors: [{ path: 'order', message: 'QAM has a power of two of points from 4 to 4096.' }] }

describe('what a cell says', () => {
  it('is its number, a margin rounded down', () => expect(cellText(view('margin'))).toBe('+0.86'))
  it('is the full value when copied', () => expect(fullText(view('margin'))).toBe('0.8677'))
  it('is never a stale number', () => expect(cellText(view('margin', { stale: true }))).toBe('computing'))
  it('is the input while its row is computed', () => expect(cellText(view('name', { stale: true }))).toBe('16-QAM'))
  it('is the typed text until it is saved', () => expect(cellText(view('order', { save: { state: 'saving', text: '64' } }))).toBe('64'))
  it('is the refused text', () => expect(cellText(view('order', { save: { state: 'refused', text: 'ten', sentence: '' } }))).toBe('ten'))
  it('is the reason of a failure in the verdict', () =>
    expect(cellText(view('verdict', { row: failed }))).toBe('cannot be computed: QAM has a power of two of points from 4 to 4096.'))
})

describe('a cell of an estimate', () => {
  const row = sampleRow({ requiredEsN0Db: { value: 20.8449, low: 20.7911, high: 20.9011 }, surplusDb: { value: 0.02, low: -0.04, high: 0.08 } })
  it('says its interval', () => expect(cellText(view('requiredEsN0', { row }))).toBe('(20.79…20.91) 20.84'))
  it('is copied in full', () => expect(fullText(view('requiredEsN0', { row }))).toBe('20.8449 (20.7911…20.9011)'))
  it('is on the wrong side when its unfavourable end is', () => expect(cellClasses(view('surplus', { row }))).toContain('cell-wrong-side'))
  it('says that it is an estimate', () => expect(cellHint(view('requiredEsN0', { row }))).toBe('An estimate: (20.79…20.91) 20.84'))
})

describe('a cell that is computed when it is shown', () => {
  const row = sampleRow({})
  const failing = { state: 'failed' as const, values: null, errors: [{ path: 'labels', message: 'A bit error rate needs labels.' }] }
  it('is its number once computed', () => expect(cellText(view('berExact', { row }))).toBe('2.50e−10'))
  it('says computing before anybody has asked', () => expect(cellText(view('berExact', { row: { ...row, parts: {} } }))).toBe('computing'))
  it('fails alone', () => expect(cellText(view('berExact', { row: { ...row, parts: { bits: failing } } }))).toBe('failed'))
  it('says why it failed', () => expect(cellSentence(view('berExact', { row: { ...row, parts: { bits: failing } } }))).toBe('A bit error rate needs labels.'))
  it('leaves other cells of its row alone', () => expect(cellText(view('papr', { row: { ...row, parts: { bits: failing } } }))).toBe('2.55'))
  it('is blank in an entered row', () => expect(cellText(view('berExact', { row: { ...sampleRow({}, { family: 'entered' }), parts: {} } }))).toBe(''))
})

describe('marks of a cell', () => {
  it('tell an input from a computed cell', () => expect([cellClasses(view('name'))[0], cellClasses(view('papr'))[0]]).toEqual(['cell-input', 'cell-computed']))
  it('do not look saved while saving', () => expect(cellClasses(view('order', { save: { state: 'saving', text: '64' } }))).toContain('cell-saving'))
  it('show a refusal', () => expect(cellClasses(view('order', { save: { state: 'refused', text: 'x', sentence: 's' } }))).toContain('cell-refused'))
  it('show the row\'s mistake at its input', () => expect(cellClasses(view('order', { row: failed }))).toContain('cell-refused'))
  it('leave other inputs of that row alone', () => expect(cellClasses(view('name', { row: failed }))).not.toContain('cell-refused'))
  it('show the wrong side of a must-have', () => expect(cellClasses(view('verdict'))).toContain('cell-wrong-side'))
})

describe('the sentence of a cell', () => {
  it('is the mistake at its input', () => expect(cellSentence(view('order', { row: failed }))).toBe('QAM has a power of two of points from 4 to 4096.'))
  it('is why a cell is not used', () => expect(cellSentence(view('rings'))).toBe('QAM does not use rings and ratios; entering them makes it APSK.'))
  it('is the server\'s after a refusal, with what the row goes on counting with', () => expect(cellSentence(view('order', { save: { state: 'refused', text: 'x', sentence: 'No.' } }))).toBe('No. Until then the row counts with 16.'))
})

describe('editing', () => {
  it('is for inputs', () => expect(isEditable(sampleRow({}), columnOf('name')!, true)).toBe(true))
  it('is not for computed cells', () => expect(isEditable(sampleRow({}), columnOf('papr')!, true)).toBe(false))
  it('is not for readers', () => expect(isEditable(sampleRow({}), columnOf('name')!, false)).toBe(false))
  it('is not for inputs that the family does not use', () => expect(isEditable(sampleRow({}), columnOf('phasesDeg')!, true)).toBe(false))
  it('is for rings in a row of any family, for they bring APSK', () => expect(isEditable(sampleRow({}), columnOf('rings')!, true)).toBe(true))
})
