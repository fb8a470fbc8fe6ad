import { describe, expect, it } from 'vitest'
import { arrange, compareCells, holds, keepArranged } from '~/utils/candidates/arrange'
import { columnOf } from '#shared/columns'
import { sampleRow } from '../columns/sample-row'

const context = { reference: null, requirements: null }
const row = (id: string, requiredEsN0Db: number | null) => ({ ...sampleRow({ requiredEsN0Db }), id })
const failed = { ...row('failed', 0), state: 'failed' as const, values: null }
const rows = [row('b', 20.9), failed, row('a', 19.1), row('blank', null), row('c', 24.97)]
const ids = (list: { id: string }[]) => list.map(({ id }) => id)

describe('sorting', () => {
  it('puts the least required SNR first', () =>
    expect(ids(arrange(rows, { column: 'requiredEsN0', descending: false }, [], context))).toEqual(['a', 'b', 'c', 'failed', 'blank']))
  it('keeps blanks and failures last the other way round', () =>
    expect(ids(arrange(rows, { column: 'requiredEsN0', descending: true }, [], context))).toEqual(['c', 'b', 'a', 'failed', 'blank']))
  it('leaves the study\'s order where nothing is sorted', () => expect(ids(arrange(rows, null, [], context))).toEqual(['b', 'failed', 'a', 'blank', 'c']))
  it('orders numbers within words as numbers', () => expect(compareCells('8-PSK', '16-PSK', false)).toBeLessThan(0))
})

describe('filtering', () => {
  const required = columnOf('requiredEsN0')!
  const name = columnOf('name')!
  it('keeps rows at a limit', () => expect(holds(20, required, { column: 'requiredEsN0', test: 'atMost', operand: '20' })).toBe(true))
  it('drops rows beyond a limit', () => expect(holds(20.01, required, { column: 'requiredEsN0', test: 'atMost', operand: '20' })).toBe(false))
  it('drops blanks from a limit', () => expect(holds(null, required, { column: 'requiredEsN0', test: 'atMost', operand: '20' })).toBe(false))
  it('reads a true minus sign', () => expect(holds(-1, required, { column: 'requiredEsN0', test: 'atLeast', operand: '−2' })).toBe(true))
  it('narrows nothing down while the limit is unreadable', () => expect(holds(30, required, { column: 'requiredEsN0', test: 'atMost', operand: '2x' })).toBe(true))
  it('finds words in any case', () => expect(holds('Hexagonal 16', name, { column: 'name', test: 'contains', operand: 'HEXA' })).toBe(true))
  it('finds blanks', () => expect(holds(null, name, { column: 'name', test: 'blank', operand: '' })).toBe(true))
  it('asks every condition', () => expect(ids(arrange(rows, null, [
    { column: 'requiredEsN0', test: 'atLeast', operand: '19.5' }, { column: 'requiredEsN0', test: 'atMost', operand: '22' },
  ], context))).toEqual(['b']))
})

describe('an arrangement that is kept', () => {
  const [a, b, c, d] = ['a', 'b', 'c', 'd'].map(id => row(id, 1)) as [ReturnType<typeof row>, ReturnType<typeof row>, ReturnType<typeof row>, ReturnType<typeof row>]
  it('leaves rows in their places', () => expect(keepArranged(['c', 'a', 'b'], new Set(), [a, b, c])).toEqual(['c', 'a', 'b']))
  it('lets rows go that are gone', () => expect(keepArranged(['c', 'a', 'b'], new Set(), [a, c])).toEqual(['c', 'a']))
  it('puts a new row behind its predecessor', () => expect(keepArranged(['c', 'a'], new Set(), [a, b, c])).toEqual(['c', 'a', 'b']))
  it('puts a new first row first', () => expect(keepArranged(['c', 'b'], new Set(), [a, b, c])).toEqual(['a', 'c', 'b']))
  it('keeps rows hidden that a filter hides', () => expect(keepArranged(['a'], new Set(['b']), [a, b, d])).toEqual(['a', 'd']))
})
