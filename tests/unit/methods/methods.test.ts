import katex from 'katex'
import { describe, expect, it } from 'vitest'
import { columns } from '../../../shared/columns'
import { methodIds, methods, sections, sources } from '../../../shared/methods'

const formulas = methodIds.flatMap(id => methods[id].formulas.map(({ tex }, n) => ({ name: `${id} ${n + 1}`, tex })))

describe('the methods', () => {
  it('explain every computed column', () => {
    expect(columns.filter(column => column.kind === 'computed' && !(column.method in methods)).map(({ id }) => id)).toEqual([])
  })
  it('stand in a section that exists', () => expect(methodIds.filter(id => !sections[methods[id].section])).toEqual([]))
  it('stand in the order of the sections', () => {
    const places = methodIds.map(id => methods[id].section)
    expect(places).toEqual([...places].sort((a, b) => a - b))
  })
  it('each name a source', () => expect(methodIds.filter(id => methods[id].sources.length === 0)).toEqual([]))
  it('name each source once', () => expect(new Set(Object.values(sources)).size).toBe(Object.keys(sources).length))
  it.each(formulas)('$name is set without a mistake', ({ tex }) => {
    expect(katex.renderToString(tex, { displayMode: true, throwOnError: true, strict: 'error' })).toContain('<math')
  })
})
