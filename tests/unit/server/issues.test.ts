import { expect, it } from 'vitest'
import { z } from 'zod'
import { issuesOf } from '../../../server/errors/issues'

it('tells the first hundred of many mistakes', () => {
  const unknown = Object.fromEntries(Array.from({ length: 1000 }, (_, i) => [`k${i}`, 0]))
  expect(issuesOf(z.strictObject({}).safeParse(unknown).error!)).toHaveLength(100)
})
