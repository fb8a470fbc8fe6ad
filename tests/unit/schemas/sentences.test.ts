import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { operations } from '../../../server/api-description/operations'
import { issuesOf } from '../../../server/errors/issues'
import { candidatesCreationOf } from '#shared/schemas/candidates'
import { mustHave } from '#shared/schemas/requirements'

/** Values that hardly any field allows. */
const wrong = [undefined, null, true, -1e308, 1e308, 0.5, '', 'x'.repeat(20_000), [], {}, { colour: 'red' }, Array.from({ length: 20_000 }, () => null)]

type Def = { type: string, shape?: Record<string, z.ZodType>, element?: z.ZodType, options?: z.ZodType[], innerType?: z.ZodType, values?: unknown[], in?: z.ZodType }
const defOf = (schema: z.ZodType) => schema.def as unknown as Def

/** Wrong values of a schema: those above in its own place, and wrong ones of each of its parts in theirs. */
function wrongFor(schema: z.ZodType, depth = 0): unknown[] {
  const { shape, element, options, innerType, in: from } = defOf(schema)
  if (depth > 12) return wrong
  const parts = shape
    ? Object.entries(shape).flatMap(([key, part]) => wrongFor(part, depth + 1).map(value => ({ ...literals(shape), [key]: value })))
    : element
      ? wrongFor(element, depth + 1).map(value => [value])
      : [...options ?? [], ...innerType ? [innerType] : [], ...from ? [from] : []].flatMap(part => wrongFor(part, depth + 1))
  return [...wrong, ...parts]
}

/** What tells one kind of an object from another, so that the mistakes are found in the kind itself. */
const literals = (shape: Record<string, z.ZodType>) => Object.fromEntries(Object.entries(shape).flatMap(([key, part]) => {
  const { type, values } = defOf(part)
  return type === 'literal' ? [[key, values![0]]] : []
}))

const inputs = Object.entries(operations).flatMap(([route, { body, query }]) => [...body ? [[`body of ${route}`, body] as const] : [], ...query ? [[`query of ${route}`, query] as const] : []])

/** Words that zod alone uses, and those of the net under the schemas, which say little. */
const zods = /^(?:Invalid|Too (?:small|big)|Unrecognized|Expected|String must|Number must)|expected /
const sentencesOf = (schema: z.ZodType, values: readonly unknown[]) => new Set(values.flatMap((value) => {
  const { error } = schema.safeParse(value)
  return error ? issuesOf(error).map(({ message }) => message) : []
}))

describe('every mistake is told in a sentence of ours', () => {
  it.each(inputs)('%s', (_, schema) => {
    const sentences = [...sentencesOf(schema, wrongFor(schema))]
    expect(sentences.filter(sentence => zods.test(sentence) || !/^[A-Z].*\.$/s.test(sentence))).toEqual([])
  })
  it.each(inputs)('%s: a limit has a sentence of its own', (_, schema) => {
    expect([...sentencesOf(schema, wrongFor(schema))].filter(sentence => /^Send at (?:least|most) .* here\.$/.test(sentence))).toEqual([])
  })
  it('in what is chosen by the body', () => expect([...sentencesOf(candidatesCreationOf({ items: [] }), wrong)].filter(sentence => zods.test(sentence))).toEqual([]))
  it('by the net under the schemas', () => {
    const bare = z.object({ a: z.string().min(2).max(3), b: z.number().min(2), c: z.enum(['x', 'y']), d: z.literal(4), e: z.email(), f: z.array(z.int()), g: z.number().gt(1) })
    expect(issuesOf(bare.safeParse({ a: 'x', b: 1, c: 'z', d: 5, e: 'x', f: [1.5], g: 1 }).error!).map(({ message }) => message)).toEqual([
      'Send at least 2 characters here.', 'Send at least 2 here.', 'Send one of x, y here.', 'Send 4 here.',
      'This value is not of a kind that is allowed here.', 'Send a whole number here.', 'Send more than 1 here.',
    ])
  })
  it('also of a kind of must-have that there is not', () => expect([...sentencesOf(mustHave, [{ id: 'R', kind: 'price', value: 1, reason: '' }])]).toEqual(['Choose what the requirement limits.']))
})
