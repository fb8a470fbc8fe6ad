import { setTimeout as delay } from 'node:timers/promises'
import { closePool } from '../compute/pool'
import { closeDatabase } from '../database/client'
import { countRequest, requestsAnswered } from '../utils/requests'
import { closeAllStreams } from '../utils/streams'

/** How long requests that are being answered may take to end, and the whole end, in milliseconds. */
const patience = { requests: 900, all: 1800 }

/**
 * Ends the server at SIGTERM and SIGINT. Nitro's own listener waits 30 s for open answers before it closes anything; this one ends
 * event streams at once, lets short requests finish, and then ends workers, connections and the process.
 */
export default defineNitroPlugin((nitro) => {
  if (import.meta.dev) return
  nitro.hooks.hook('request', ({ node: { req, res } }) => {
    // Calls within the server have no socket, and are part of a request that has.
    if (req.socket?.remoteAddress) countRequest(res)
  })

  let ending = false
  const end = async () => {
    if (ending) return
    ending = true
    setTimeout(() => process.exit(0), patience.all).unref()
    closeAllStreams()
    await Promise.race([requestsAnswered(), delay(patience.requests)])
    await nitro.hooks.callHook('close').catch((error: unknown) => console.error(error))
    await Promise.allSettled([closePool(), closeDatabase()])
    process.exit(0)
  }
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void end())
})
