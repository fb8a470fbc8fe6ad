import { describe, expect, it } from 'vitest'
import { sources } from '../../shared/methods'
import { allowedOf, checks, publishedOf } from '../../shared/methods/checks'

// The values, their sources and their tolerances: shared/methods/checks, which the Methods page shows as well.
describe.each([...new Set(checks.map(({ source }) => source))])('%s', (source) => {
  it.each(checks.filter(check => check.source === source))(`${sources[source]}: $what`, (check) => {
    expect(Math.abs(check.compute() - publishedOf(check))).toBeLessThanOrEqual(allowedOf(check))
  })
})

describe('the list', () => {
  it('has at least 60 checks', () => expect(checks.length).toBeGreaterThanOrEqual(60))
  it('has at least 15 sources', () => expect(new Set(checks.map(({ source }) => source)).size).toBeGreaterThanOrEqual(15))
})
