import { describe, expect, it } from 'vitest'
import { columnOf } from '#shared/columns'
import type { CellSave } from '~/utils/candidates/cell-saves'
import { CellLooks } from '~/utils/candidates/cell-looks'
import { sampleRow } from '../columns/sample-row'

const margin = columnOf('margin')!
const row = sampleRow({ marginDb: 0.8677 })
/** Looks whose cells have the save state that is in `now`, and how often one was worked out. */
const counted = () => {
  const now: { save: CellSave | null, asked: number } = { save: null, asked: 0 }
  const looks = new CellLooks((of, column) => {
    now.asked++
    return { row: of, column, context: { reference: null, requirements: null }, save: now.save, stale: false }
  })
  return { looks, now }
}

describe('looks of cells', () => {
  it('hold the text as shown', () => expect(counted().looks.of(row, margin).text).toBe('+0.86'))
  it('are worked out once', () => {
    const { looks, now } = counted()
    for (let i = 0; i < 3; i++) looks.of(row, margin)
    expect(now.asked).toBe(1)
  })
  it('are worked out again for a changed row', () => {
    const { looks } = counted()
    looks.of(row, margin)
    expect(looks.of(sampleRow({ marginDb: 2 }), margin).text).toBe('+2.00')
  })
  it('follow a save once they are forgotten', () => {
    const { looks, now } = counted()
    looks.of(row, margin)
    now.save = { state: 'saving', text: '3' }
    looks.forget(row)
    expect(looks.of(row, margin).text).toBe('3')
  })
  it('follow a change of what all rows depend on', () => {
    const { looks, now } = counted()
    looks.of(row, margin)
    looks.forgetAll()
    looks.of(row, margin)
    expect(now.asked).toBe(2)
  })
})
