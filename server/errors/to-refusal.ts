import { H3Error } from 'h3'
import { ZodError } from 'zod'
import { ModulationError } from '#shared/modulation'
import { isAway, noteAway } from '../database/ready'
import { Refusal } from '../utils/problem'
import { issuesOf, pathText } from './issues'

/** What the framework says with a status and nothing for the reader. */
const sentences: Record<number, string> = {
  400: 'The request is not well formed.',
  404: 'The API has nothing at this address.',
  405: 'This address does not answer this method.',
  413: 'The body is too large.',
}

const causeOf = (error: Error): unknown => error.cause instanceof Error ? error.cause : error

/**
 * What a thrown error means for the caller.
 * @returns undefined when it is a mistake of ours, which the caller learns nothing about
 */
export function toRefusal(thrown: Error): Refusal | undefined {
  if (thrown instanceof Refusal) return thrown
  // H3 wraps what is thrown at it.
  const error = thrown instanceof H3Error && thrown.unhandled ? causeOf(thrown) : thrown
  if (error instanceof Refusal) return error
  if (error instanceof ZodError) return new Refusal(422, 'Some inputs are not allowed.', { errors: issuesOf(error) })
  if (error instanceof ModulationError) return new Refusal(422, error.message, { errors: [{ path: pathText(error.path), message: error.message }] })
  if (isAway(error)) {
    noteAway(error)
    return new Refusal(503, 'The database cannot be reached. Try again in a moment.', { headers: { 'retry-after': '2' } })
  }
  if (error instanceof H3Error && error.statusCode < 500) {
    return new Refusal(error.statusCode, sentences[error.statusCode] ?? 'The request was refused.')
  }
  return undefined
}
