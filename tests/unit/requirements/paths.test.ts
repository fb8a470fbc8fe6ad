import { describe, expect, it } from 'vitest'
import { dottedPath, readAt, writeAt } from '../../../app/utils/requirement-paths'

const root = {
  mustHaves: [{ id: 'R1', kind: 'margin', value: 1 }, { id: 'R1', kind: 'papr', value: 6 }],
  lines: [{ id: 'a', kind: 'loss', valueDb: 2 }, { id: 'b', kind: 'loss', valueDb: 3 }],
}

describe('a path into the requirements', () => {
  it('finds a must-have by its kind while its ID stands twice', () => expect(readAt(root, ['mustHaves', '@papr', 'value'])).toBe(6))
  it('finds a line by its id', () => expect(readAt(root, ['lines', '#b', 'valueDb'])).toBe(3))
  it('leads nowhere where the item is gone', () => expect(readAt(root, ['mustHaves', '@netBitRate', 'value'])).toBeUndefined())
  it('changes the item of that kind alone', () => {
    expect(writeAt(root, ['mustHaves', '@papr', 'value'], 5).mustHaves.map(({ value }) => value)).toEqual([1, 5])
  })
  it('changes nothing where it leads nowhere', () => expect(writeAt(root, ['lines', '#c', 'valueDb'], 5)).toEqual(root))
  it('is written with indices for the API', () => expect(dottedPath(root, ['mustHaves', '@papr', 'value'])).toBe('mustHaves.1.value'))
})
