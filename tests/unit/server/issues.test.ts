import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { candidateInputs, candidatesCreationOf } from '#shared/schemas/candidates'
import { issuesOf } from '../../../server/errors/issues'

it('tells the first hundred of many mistakes', () => {
  const unknown = Object.fromEntries(Array.from({ length: 1000 }, (_, i) => [`k${i}`, 0]))
  expect(issuesOf(z.strictObject({}).safeParse(unknown).error!)).toHaveLength(100)
})

it('tells a number that misses its limits in two ways once', () =>
  expect(issuesOf(candidateInputs.pick({ order: true }).safeParse({ order: 1e308 }).error!)).toEqual([{ path: 'order', message: 'Order M is a whole number from 2 to 4096.' }]))

describe('many new rows', () => {
  const mistakes = (body: unknown) => issuesOf(candidatesCreationOf(body).safeParse(body).error!)
  const paths = (body: unknown) => mistakes(body).map(({ path }) => path)
  it('are refused at the field of the row', () => expect(paths({ items: [{}, { order: 'x' }] })).toEqual(['items.1.order']))
  it('are refused at what is no row', () => expect(mistakes({ items: [1] })).toEqual([{ path: 'items.0', message: 'Send an object here.' }]))
  it('are refused when they are no list', () => expect(mistakes({ items: 'x' })).toEqual([{ path: 'items', message: 'Send a list of rows.' }]))
  it('are refused at the place where they cannot stand', () => expect(mistakes({ items: [{}], after: 5 })).toEqual([{ path: 'after', message: 'An identifier is a UUID.' }]))
  it('are no list alone', () => expect(mistakes([])).toEqual([{ path: '', message: 'Send an object here.' }]))
})
