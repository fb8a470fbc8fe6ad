import type { H3Event } from 'h3'

/** Aborts when the caller has gone before the answer was complete. */
export function goneSignal(event: H3Event): AbortSignal {
  const gone = new AbortController()
  const { res } = event.node
  res.once('close', () => {
    if (!res.writableEnded) gone.abort(new Error('The caller has gone.'))
  })
  return gone.signal
}
