import type { H3Event } from 'h3'
import { join } from '../services/event-hub'
import { sessionAccount } from '../services/sessions'
import { studyStanding } from '../services/study-access'
import { tokenAccount } from '../services/tokens'
import type { Caller } from './caller'
import { problem } from './problem'
import { registerStream } from './streams'

/** Streams of each account, to be closed when its session ends or it leaves a study. */
const open = new Map<string, Set<() => void>>()

export const eventStreamType = 'text/event-stream; charset=utf-8'
/** How often a stream says that it is alive, in milliseconds: proxies close silent connections. */
const heartbeatEvery = 15_000
/** How long a page waits before it connects again, in milliseconds. */
const retryAfter = 1000
/** Unsent bytes above which a slow reader is let go; it comes back and gets what it missed as few messages. */
const mostUnsent = 16e6
/** How long a reader may take to accept the end of its stream, in milliseconds; one that has stalled never would. */
const endPatience = 1000
/** Most open streams of an account: a browser needs one, whatever it shows. */
const mostStreams = 50

/** Closes an account's streams at once: when its session has ended or it has been removed from a study. Pages that may come back do. */
export function closeStreams(userId: string): void {
  for (const close of open.get(userId) ?? []) close()
}

/**
 * Number of the last event that a page has; null when it has none. A browser that connects again names it by
 * Last-Event-ID; a page that takes the stream over from another one can only say it in the address.
 */
function lastEventId(event: H3Event, after: string | undefined): number | null {
  const id = event.node.req.headers['last-event-id'] ?? after
  return typeof id === 'string' && /^\d{1,15}$/.test(id) ? Number(id) : null
}

/** The account of a caller as it is now; null when the session or the token works no more. */
const accountNow = async ({ sessionId, tokenId }: Caller) =>
  sessionId !== null ? sessionAccount(sessionId) : tokenId !== null ? tokenAccount(tokenId) : null

/** Whether a caller may still read a study: the session or the token may have ended, the account's role or the members changed. */
async function mayRead(studyId: string, caller: Caller): Promise<boolean> {
  const account = await accountNow(caller)
  if (!account) return false
  const standing = await studyStanding('study', studyId, account.id)
  return standing !== null && (standing.role !== null || account.role === 'admin')
}

/**
 * Answers with a study's events as they come (server-sent events), each with the number of the last event in it.
 * @param after number of the last event that the page has, unless its Last-Event-ID says so
 * @returns when the stream has ended
 * @throws 429 when the account has too many open streams
 */
export async function streamEvents(event: H3Event, studyId: string, caller: Caller, after?: string): Promise<void> {
  const { res } = event.node
  const userId = caller.account.id
  if ((open.get(userId)?.size ?? 0) >= mostStreams) problem(429, `An account has at most ${mostStreams} open event streams.`, { headers: { 'retry-after': '60' } })
  // The connection ends with its stream: a caller that took it up again would find it closed.
  res.writeHead(200, {
    'content-type': eventStreamType, 'cache-control': 'no-store', 'x-accel-buffering': 'no', 'connection': 'close',
  })
  res.write(`retry: ${retryAfter}\n\n`)
  const ended = new Promise<void>(resolve => res.once('close', resolve))
  const close = () => {
    res.end()
    res.socket?.destroySoon()
    setTimeout(() => res.destroy(), endPatience).unref()
  }
  const streams = open.get(userId) ?? new Set()
  open.set(userId, streams.add(close))
  const unregister = registerStream(close)
  const check = () => mayRead(studyId, caller).then(may => may || close(), () => {})
  const heartbeat = setInterval(() => {
    if (res.writableEnded) return
    res.write(': alive\n\n')
    void check()
  }, heartbeatEvery)
  let leave = () => {}
  try {
    leave = await join(studyId, lastEventId(event, after), (message, number) => {
      if (res.writableEnded) return
      if (res.writableLength > mostUnsent) return void res.destroy()
      if (message.study) void check()
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
