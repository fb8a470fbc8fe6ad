import type { H3Event } from 'h3'
import { join } from '../services/event-hub'
import { registerStream } from './streams'

/** Streams of each account, to be closed when its session ends or it leaves a study. */
const open = new Map<string, Set<() => void>>()

/** How often an idle stream says that it is alive, in milliseconds: proxies close silent connections. */
const heartbeatEvery = 20_000
/** How long a page waits before it connects again, in milliseconds. */
const retryAfter = 1000
/** Unsent bytes above which a slow reader is let go; it comes back and gets what it missed as few messages. */
const mostUnsent = 16e6

/** Closes an account's streams at once: when its session has ended or it has been removed from a study. Pages that may come back do. */
export function closeStreams(userId: string): void {
  for (const close of open.get(userId) ?? []) close()
}

/** Number of the last event that a page has, by its Last-Event-ID; null when it has none. */
function lastEventId(event: H3Event): number | null {
  const id = event.node.req.headers['last-event-id']
  return typeof id === 'string' && /^\d{1,15}$/.test(id) ? Number(id) : null
}

/**
 * Answers with a study's events as they come (server-sent events), each with the number of the last event in it.
 * @returns when the stream has ended
 */
export async function streamEvents(event: H3Event, studyId: string, userId: string): Promise<void> {
  const { res } = event.node
  res.writeHead(200, {
    'content-type': 'text/event-stream; charset=utf-8', 'cache-control': 'no-store', 'x-accel-buffering': 'no', 'connection': 'keep-alive',
  })
  res.write(`retry: ${retryAfter}\n\n`)
  const ended = new Promise<void>(resolve => res.once('close', resolve))
  const close = () => {
    res.end()
    res.destroySoon()
  }
  const streams = open.get(userId) ?? new Set()
  open.set(userId, streams.add(close))
  const unregister = registerStream(close)
  const heartbeat = setInterval(() => res.write(': alive\n\n'), heartbeatEvery)
  let leave = () => {}
  try {
    leave = await join(studyId, lastEventId(event), (message, number) => {
      if (res.writableLength > mostUnsent) return close()
      res.write(`${number === null ? '' : `id: ${number}\n`}data: ${JSON.stringify(message)}\n\n`)
    })
    await ended
  } finally {
    clearInterval(heartbeat)
    leave()
    unregister()
    streams.delete(close)
    if (streams.size === 0) open.delete(userId)
    res.end()
  }
}
