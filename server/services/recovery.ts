import { and, isNotNull, lt } from 'drizzle-orm'
import { useDatabase } from '../database/client'
import { candidates } from '../database/schema'
import { requeueRows } from './candidate-keys'
import { requeueParts } from './parts'
import { continueSearches } from './search-runs'
import { pruneEvents } from './stored-events'
import { continueSweeps } from './sweeps'

/** Rows that wait this long for their numbers are looked after, whoever was to compute them; milliseconds. */
const overdue = 60_000
/** How long a deleted row can be restored: 30 days. */
const restorable = 30 * 24 * 60 * 60 * 1000
const lookEvery = 60_000

/** Takes up again what an ended server left behind: rows without results, sweeps that have not ended. */
export async function recover(): Promise<void> {
  await requeueRows(0)
  await requeueParts(0)
  await continueSearches(0)
  await continueSweeps()
}

async function lookAfter() {
  const db = useDatabase()
  await requeueRows(overdue)
  await requeueParts(overdue)
  await continueSearches(overdue)
  await continueSweeps()
  await pruneEvents(db)
  await db.delete(candidates).where(and(isNotNull(candidates.deletedAt), lt(candidates.deletedAt, new Date(Date.now() - restorable))))
}

/** Looks through the tables every minute, one look at a time. @returns how to stop */
export function keepLooking(): () => void {
  let looking = false
  const timer = setInterval(() => {
    if (looking) return
    looking = true
    lookAfter().catch((error: unknown) => console.error('The look through the tables failed; it is repeated.', error))
      .finally(() => looking = false)
  }, lookEvery)
  return () => clearInterval(timer)
}
