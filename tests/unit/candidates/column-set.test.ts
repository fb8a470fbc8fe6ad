import { describe, expect, it } from 'vitest'
import { firstOpening, repaired, withColumn } from '~/utils/candidates/column-set'

const ids = (set: { id: string }[]) => set.map(({ id }) => id)

describe('sets of columns', () => {
  it('always lead with the name', () => expect(ids(repaired([{ id: 'papr' }]))).toEqual(['name', 'papr']))
  it('lose columns that do not exist', () => expect(ids(repaired([{ id: 'name' }, { id: 'gone' }]))).toEqual(['name']))
  it('lose a column that comes twice', () => expect(ids(repaired([{ id: 'papr' }, { id: 'papr' }]))).toEqual(['name', 'papr']))
  it('take a column in where it stands among all', () =>
    expect(ids(withColumn([{ id: 'name' }, { id: 'papr' }, { id: 'note' }], 'netRate', true))).toEqual(['name', 'papr', 'netRate', 'note']))
  it('let a column go', () => expect(ids(withColumn([{ id: 'name' }, { id: 'papr' }], 'papr', false))).toEqual(['name']))
  it('never let the name go', () => expect(ids(withColumn([{ id: 'name' }], 'name', false))).toEqual(['name']))
  it('open with 26 columns', () => expect(firstOpening()).toHaveLength(26))
})
