import { STATUS_CODES } from 'node:http'
import type { H3Error, H3Event } from 'h3'
import { send, setResponseHeaders, setResponseStatus } from 'h3'
import type { Problem } from '#shared/schemas/common'
import { Refusal } from '../utils/problem'
import { toRefusal } from './to-refusal'

const unknown = () => new Refusal(500, 'Something went wrong on our side. Nothing was half-written; the server\'s log says what it was.')

/** Turns whatever was thrown below /api into application/problem+json (RFC 9457); pages keep Nuxt's own handler, which comes after this one. */
export default async function handleError(thrown: H3Error, event: H3Event): Promise<void> {
  const path = event.path.split('?')[0]!
  const refusal = toRefusal(thrown)
  if (!refusal) console.error(`${event.method} ${path} failed.`, thrown.cause ?? thrown)
  if (path !== '/api' && !path.startsWith('/api/')) return
  const { statusCode: status, message: detail, parts: { errors, current, sent, headers } } = refusal ?? unknown()
  const body: Problem = { type: 'about:blank', title: STATUS_CODES[status] ?? 'Error', status, detail, errors, current, sent }
  if (event.node.res.headersSent) {
    event.node.res.destroy()
    return
  }
  setResponseStatus(event, status)
  setResponseHeaders(event, { ...headers, 'cache-control': 'no-store', 'content-type': 'application/problem+json' })
  await send(event, JSON.stringify(body))
}
