import { closePool } from '../compute/pool'
import { closeDatabase } from '../database/client'
import { closeAllStreams } from '../utils/streams'

/** How long a clean end may take, in milliseconds. */
const patience = 1800

/**
 * Ends the server at SIGTERM and SIGINT. Nitro's own listener waits 30 s for open answers before it closes anything;
 * this one ends event streams, workers and connections at once and then the process.
 */
export default defineNitroPlugin((nitro) => {
  if (import.meta.dev) return
  let ending = false
  const end = async () => {
    if (ending) return
    ending = true
    setTimeout(() => process.exit(0), patience).unref()
    closeAllStreams()
    await nitro.hooks.callHook('close').catch((error: unknown) => console.error(error))
    await Promise.allSettled([closePool(), closeDatabase()])
    process.exit(0)
  }
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void end())
})
