import { describe, expect, it } from 'vitest'
import { RowList, isNewer } from '~/utils/candidates/row-list'
import { sampleRow } from '../columns/sample-row'

const row = (id: string, position: number, version = 1) => ({ ...sampleRow({}), id, position, version })
const listed = (...rows: ReturnType<typeof row>[]) => {
  const list = new RowList()
  list.put(rows)
  return list
}

describe('the list of rows', () => {
  it('stands in the order of positions', () => expect(listed(row('b', 2), row('a', 1)).rows.map(r => r.id)).toEqual(['a', 'b']))
  it('tells a new row as a change of structure', () => expect(listed(row('a', 1)).put([row('b', 2)])).toEqual({ structure: true, ids: ['b'] }))
  it('tells a changed row as content alone', () => expect(listed(row('a', 1)).put([row('a', 1, 2)])).toEqual({ structure: false, ids: ['a'] }))
  it('gives a changed row in its place', () => {
    const list = listed(row('a', 1), row('b', 2))
    list.put([row('a', 1, 7)])
    expect(list.rows[0]?.version).toBe(7)
  })
  it('follows a row that moves', () => {
    const list = listed(row('a', 1), row('b', 2))
    list.put([row('a', 3)])
    expect(list.rows.map(r => r.id)).toEqual(['b', 'a'])
  })
  it('forgets removed rows', () => {
    const list = listed(row('a', 1))
    list.remove(['a'])
    expect(list.get('a')).toBeUndefined()
  })
  it('knows the place of a row', () => expect(listed(row('b', 2), row('a', 1)).placeOf('b')).toBe(1))
  it('counts places anew when a row goes', () => {
    const list = listed(row('a', 1), row('b', 2))
    list.remove(['a'])
    expect(list.placeOf('b')).toBe(0)
  })
  it('keeps pinned rows and the reference at hand', () => {
    const list = listed(row('a', 1), { ...row('b', 2), pin: 3 }, { ...row('c', 3), inputs: { ...row('c', 3).inputs, role: 'reference' } })
    expect(list.marked.map(r => r.id)).toEqual(['b', 'c'])
  })
  it('leaves them as they are when another row changes', () => {
    const list = listed(row('a', 1), { ...row('b', 2), pin: 3 })
    const before = list.marked
    list.put([row('a', 1, 2)])
    expect(list.marked).toBe(before)
  })
  it('lets a row that is unpinned go from them', () => {
    const list = listed({ ...row('b', 2), pin: 3 })
    list.put([row('b', 2, 2)])
    expect(list.marked).toEqual([])
  })
  it('tells nothing of rows that it never had', () => expect(listed(row('a', 1)).remove(['x'])).toEqual({ structure: false, ids: [] }))
})

describe('an answer beside what is shown', () => {
  it('is taken when its version is higher', () => expect(isNewer(row('a', 1, 2), row('a', 1, 1))).toBe(true))
  it('is left when its version is lower', () => expect(isNewer(row('a', 1, 1), row('a', 1, 2))).toBe(false))
  it('does not bring "computing" back over values of the same version', () =>
    expect(isNewer({ ...row('a', 1), state: 'computing', values: null }, row('a', 1))).toBe(false))
  it('replaces "computing" of the same version', () =>
    expect(isNewer(row('a', 1), { ...row('a', 1), state: 'computing', values: null })).toBe(true))
})
