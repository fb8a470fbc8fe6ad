import { describe, expect, it } from 'vitest'
import { RowVersions } from '~/utils/candidates/row-versions'

/** Versions of a page whose edits have been saved as given: [base, version made of it]. */
const after = (...saved: [number, number][]) => {
  const versions = new RowVersions()
  for (const [base, version] of saved) versions.saved('a', base, version)
  return versions
}

describe('the version that an edit is based on', () => {
  it('is the one that its reader saw', () => expect(after().baseOf('a', 7)).toBe(7))
  it('is what the page\'s own edit before it has made', () => expect(after([1, 2]).baseOf('a', 1)).toBe(2))
  it('is what the last of several own edits has made, all entered on the same row', () => expect(after([1, 2], [2, 3]).baseOf('a', 1)).toBe(3))
  it('is not one that somebody else made after the value was entered', () => {
    // entered at 1, own edit makes 2, somebody else's 3 is shown before the edit is sent
    expect(after([1, 2]).baseOf('a', 1)).not.toBe(3)
  })
  it('is somebody else\'s once the reader has seen it', () => expect(after([1, 2]).baseOf('a', 3)).toBe(3))
  it('does not join own edits across somebody else\'s change', () => expect(after([1, 2], [3, 4]).baseOf('a', 2)).toBe(2))
  it('is the one seen when an own edit has changed nothing', () => expect(after([4, 4]).baseOf('a', 4)).toBe(4))
  it('is not another row\'s', () => expect(after([1, 2]).baseOf('b', 1)).toBe(1))
})
