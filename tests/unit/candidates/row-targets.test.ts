import { describe, expect, it } from 'vitest'
import { rowTargets } from '~/utils/candidates/row-targets'

const shown = ['a', 'b', 'c', 'd']

describe('commands on rows act', () => {
  it('on the selected rows, in the order shown, when the active one is among them', () => expect(rowTargets(['d', 'b'], 'b', shown)).toEqual(['b', 'd']))
  it('on the active row alone when it is not selected', () => expect(rowTargets(['b', 'd'], 'c', shown)).toEqual(['c']))
  it('on the active row where none is selected', () => expect(rowTargets([], 'a', shown)).toEqual(['a']))
  it('on the selected rows before any is active', () => expect(rowTargets(['b'], null, shown)).toEqual(['b']))
  it('on no row that is not shown', () => expect(rowTargets(['x'], 'y', shown)).toEqual([]))
})
