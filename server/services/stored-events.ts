import { and, asc, eq, gt, lt } from 'drizzle-orm'
import type { Database } from '../database/client'
import { events, studies } from '../database/schema'
import type { EventPayload } from '../database/schema'

/** How long events are kept for pages that come back, in milliseconds: a day. */
const keptFor = 24 * 60 * 60 * 1000

export interface StoredEvent { number: number, payload: EventPayload }

/** Events of a study behind a number, oldest first. */
export function eventsAfter(db: Database, studyId: string, number: number): Promise<StoredEvent[]> {
  return db.select({ number: events.number, payload: events.payload }).from(events)
    .where(and(eq(events.studyId, studyId), gt(events.number, number)))
    .orderBy(asc(events.number))
}

/** Number of a study's last event; 0 when there is none. */
export async function lastEventNumber(db: Database, studyId: string): Promise<number> {
  const [row] = await db.select({ number: studies.eventNumber }).from(studies).where(eq(studies.id, studyId))
  return row?.number ?? 0
}

/**
 * Several events as one: what was removed and came back counts as changed, and the other way round.
 * @param payloads oldest first
 */
export function coalesce(payloads: readonly EventPayload[]): { candidates: string[], removed: string[], study: boolean, sweeps: string[], jobs: string[] } {
  const changed = new Map<string, 'candidates' | 'removed'>()
  const sweeps = new Set<string>()
  const jobs = new Set<string>()
  for (const payload of payloads) {
    for (const id of payload.candidates ?? []) changed.set(id, 'candidates')
    for (const id of payload.removed ?? []) changed.set(id, 'removed')
    if (payload.sweep) sweeps.add(payload.sweep)
    if (payload.job) jobs.add(payload.job)
  }
  const those = (kind: 'candidates' | 'removed') => [...changed].filter(([, k]) => k === kind).map(([id]) => id)
  return { candidates: those('candidates'), removed: those('removed'), study: payloads.some(p => p.study), sweeps: [...sweeps], jobs: [...jobs] }
}

/** Deletes events older than a day. */
export async function pruneEvents(db: Database): Promise<void> {
  await db.delete(events).where(lt(events.at, new Date(Date.now() - keptFor)))
}
