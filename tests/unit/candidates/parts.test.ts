import { describe, expect, it } from 'vitest'
import { partsOf, settled, unasked } from '~/utils/candidates/parts'
import { sampleRow } from '../columns/sample-row'

const row = { ...sampleRow({}), parts: {} }
const known = sampleRow({})

describe('parts of rows', () => {
  it('are those of the columns shown, each once', () => expect(partsOf(['name', 'berExact', 'berNearest', 'bitMetricRate'])).toEqual(['bits', 'rates']))
  it('are asked for where nobody has', () => expect(unasked([row, known], 'bits', new Set())).toEqual([row]))
  it('are asked for once', () => expect(unasked([row], 'bits', new Set([`bits ${row.id} ${row.version} ${row.updatedAt}`]))).toEqual([]))
  it('are asked for again once a row has changed', () =>
    expect(unasked([{ ...row, version: 2 }], 'bits', new Set([`bits ${row.id} 1 ${row.updatedAt}`]))).toHaveLength(1))
  it('are not asked for while their row is computed', () => expect(unasked([{ ...row, state: 'computing' }], 'bits', new Set())).toEqual([]))
  it('are not asked for in entered rows', () => expect(unasked([{ ...row, inputs: { ...row.inputs, family: 'entered' } }], 'bits', new Set())).toEqual([]))
  it('are settled once all rows have them', () => expect([settled([row, known], 'bits'), settled([known], 'bits')]).toEqual([false, true]))
  it('are settled in rows that cannot have them', () => expect(settled([{ ...row, state: 'failed' }], 'bits')).toBe(true))
})
