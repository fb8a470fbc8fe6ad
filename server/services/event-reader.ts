import type { StudyEvent } from '#shared/schemas/events'
import type { Database } from '../database/client'
import { rowsOf } from './candidate-rows'
import { searchOf } from './search-rows'
import { coalesce, eventsAfter } from './stored-events'
import { sweepOf } from './sweep-rows'

/** Receives what changed; `number` is the last event that the message completes, null when more of it follows. */
export type Send = (message: StudyEvent, number: number | null) => void

/** Rows in one message. */
const rowsAMessage = 500
/** Above this many changed rows a page loads them itself, page by page. */
const rowsWorthSending = 3000

/**
 * Reads a study's events from one number to another as few messages, the rows in them as they are now.
 * Rows are read once, however many pages listen.
 * @param after number of the last event that the reader has
 * @param upTo number of the last event wanted
 * @param send gets each message; when events between the two are no longer kept, one that asks to load the rows again
 * @returns number of the last event read
 */
export async function readEvents(db: Database, studyId: string, after: number, upTo: number, send: Send): Promise<number> {
  if (after === upTo) return upTo
  const stored = (await eventsAfter(db, studyId, after)).filter(event => event.number <= upTo)
  const last = stored.at(-1)?.number ?? upTo
  const complete = stored[0]?.number === after + 1
  const { candidates, removed, study, sweeps, jobs } = coalesce(stored.map(event => event.payload))
  if (!complete || candidates.length > rowsWorthSending) {
    send({ reload: true, study: true }, last)
    return last
  }
  for (const id of sweeps) {
    const sweep = await sweepOf(db, id)
    if (sweep) send({ sweep }, null)
  }
  for (const id of jobs) {
    const job = await searchOf(db, id)
    if (job) send({ job }, null)
  }
  for (let i = 0; i < candidates.length; i += rowsAMessage) {
    const ids = candidates.slice(i, i + rowsAMessage)
    const rows = await rowsOf(db, ids)
    // A row that a later event removes is gone already; that event says so as well.
    const found = new Set(rows.map(row => row.id))
    removed.push(...ids.filter(id => !found.has(id)))
    if (rows.length > 0) send({ rows }, null)
  }
  send({ ...(removed.length > 0 ? { removed } : {}), ...(study ? { study: true as const } : {}) }, last)
  return last
}
