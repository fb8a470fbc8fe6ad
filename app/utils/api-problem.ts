import type { Issue, Problem } from '#shared/schemas/common'

/**
 * A refusal of the API (RFC 9457), or the lack of an answer (status 0).
 * `detail` is a whole sentence for the reader; `errors` name the fields; `current` is the server's copy after a stale change.
 */
export class ApiProblem extends Error {
  readonly status: number
  readonly detail: string
  readonly errors: Issue[]
  readonly current: unknown
  /** seconds to wait before trying again, where the server says so */
  readonly retryAfter: number | null

  constructor(status: number, body: Partial<Problem> | undefined, retryAfter: number | null = null) {
    const detail = body?.detail ?? body?.title ?? fallback(status)
    super(detail)
    this.name = 'ApiProblem'
    this.status = status
    this.detail = detail
    this.errors = body?.errors ?? []
    this.current = body?.current
    this.retryAfter = retryAfter
  }

  /** Sentence for the field at a path, if it has one. */
  at(path: string): string | undefined {
    return this.errors.find(error => error.path === path)?.message
  }
}

const fallback = (status: number) => status === 0
  ? 'The server cannot be reached. Check the connection and try again.'
  : `The server answered with status ${status}.`

/** Any thrown thing as a sentence for the reader. */
export function sentenceOf(thrown: unknown): string {
  return thrown instanceof ApiProblem ? thrown.detail : 'Something went wrong in this page. Reload it and try again.'
}
