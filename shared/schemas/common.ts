import { z } from 'zod'
import './sentences'

/** Identifier made by the application: a UUID, version 7, so that ids sort by creation. */
export const id = z.uuid({ error: 'An identifier is a UUID.' })

/** Level or ratio in decibels within anything a link can show. */
export const decibels = z.number({ error: 'Enter a number in dB.' })
  .min(-400, 'Enter at least −400 dB.')
  .max(400, 'Enter at most 400 dB.')

/** Version that a change is based on; carried by If-Match. */
export const version = z.int('A version is a whole number from 1.').min(1, 'A version is a whole number from 1.')

/** Query of a list: how many items and after which cursor. */
export const pageQuery = z.strictObject({
  cursor: z.string({ error: 'Send `next` of the page before.' }).max(200, 'Send `next` of the page before.').optional(),
  limit: z.coerce.number({ error: 'The limit is a whole number from 1 to 2,000.' })
    .int('The limit is a whole number from 1 to 2,000.')
    .min(1, 'The limit is a whole number from 1 to 2,000.')
    .max(2000, 'The limit is a whole number from 1 to 2,000.')
    .default(500),
})

/** What every list answers. */
export const listOf = <T extends z.ZodType>(item: T) => z.object({ items: z.array(item), next: z.string().nullable() })

/** One mistake in what was sent: where, and a sentence that says what is allowed. */
export const issue = z.object({ path: z.string(), message: z.string() })
export type Issue = z.infer<typeof issue>

/** Body of every error answer (RFC 9457). */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string().optional(),
  errors: z.array(issue).optional(),
  current: z.unknown().optional(),
  sent: z.unknown().optional(),
})
export type Problem = z.infer<typeof problem>

/** A name that a person gives to something. */
export const name = (what: string, max = 120) => z.string({ error: `Enter ${what} as text.` })
  .trim()
  .min(1, `Enter ${what}.`)
  .max(max, `Enter ${what} of at most ${max} characters.`)

/** Free text with an upper length. */
export const text = (max: number) => z.string({ error: 'Enter text.' }).max(max, `Enter at most ${max.toLocaleString('en')} characters.`)

/** A finite number within bounds, with one sentence for every way to miss them. */
export const numberBetween = (low: number, high: number, sentence: string) =>
  z.number({ error: sentence }).min(low, sentence).max(high, sentence)

/** A whole number within bounds, with one sentence for every way to miss them. */
export const wholeBetween = (low: number, high: number, sentence: string) =>
  z.number({ error: sentence }).int(sentence).min(low, sentence).max(high, sentence)
