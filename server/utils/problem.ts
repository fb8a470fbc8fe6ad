import { H3Error } from 'h3'
import type { Issue } from '#shared/schemas/common'

export interface ProblemParts {
  /** mistakes in what was sent, each with its path */
  errors?: Issue[]
  /** what the server has now, after a change that was based on an older version */
  current?: unknown
  /** the change that was refused for that, so that both values stand in one answer */
  sent?: unknown
  headers?: Record<string, string>
}

/** A refusal on its way to the caller as application/problem+json. */
export class Refusal extends H3Error {
  constructor(status: number, detail: string, readonly parts: ProblemParts = {}) {
    super(detail)
    this.name = 'Refusal'
    this.statusCode = status
  }
}

/**
 * Refuses a request. The only way to do so.
 * @param status HTTP status
 * @param detail a whole sentence for the reader
 */
export function problem(status: number, detail: string, parts: ProblemParts = {}): never {
  throw new Refusal(status, detail, parts)
}
