import { eq } from 'drizzle-orm'
import { useDatabase } from '../database/client'
import { studies } from '../database/schema'
import { readEvents } from './event-reader'
import type { Send } from './event-reader'
import { lastEventNumber } from './stored-events'

/** Open pages of one study, and how far they have been told. */
interface Room {
  pages: Set<Send>
  /** pages that are about to join */
  joining: number
  /** number of the last event that all of them have */
  seen: number
  /** the last job of the room: jobs run one after another, so that nobody misses or sees twice an event */
  tail: Promise<unknown>
  /** whether a transaction of this process is about to commit an event; `again`: one more began meanwhile */
  announced: 'no' | 'once' | 'again'
}

const rooms = new Map<string, Room>()
let poll: NodeJS.Timeout | undefined

/** How often the database is asked for what other servers wrote, in milliseconds. */
const pollEvery = 200

/** Runs a job behind the room's earlier ones, whether those succeeded or not. */
function inTurn<T>(room: Room, job: () => Promise<T>): Promise<T> {
  const done = room.tail.then(job, job)
  room.tail = done.catch(() => {})
  return done
}

async function deliver(studyId: string, room: Room) {
  if (room.pages.size === 0) return
  const db = useDatabase()
  const last = await lastEventNumber(db, studyId)
  room.seen = await readEvents(db, studyId, room.seen, last, (message, number) => {
    for (const send of room.pages) send(message, number)
  })
}

/** Sends a study's new events to its open pages in this process; a database that is away is asked again at the next poll. */
export async function publish(studyId: string): Promise<void> {
  const room = rooms.get(studyId)
  if (room) await inTurn(room, () => deliver(studyId, room)).catch(() => {})
}

/** Resolves when no transaction holds the study's row lock any more. */
export async function unlocked(studyId: string): Promise<void> {
  await useDatabase().select({ id: studies.id }).from(studies).where(eq(studies.id, studyId)).for('update')
}

/**
 * Says that a transaction of this process is about to commit an event of the study. It holds the study's row lock,
 * so who asks for that lock now gets it at the commit: that is when the pages are told.
 */
export function announce(studyId: string): void {
  const room = rooms.get(studyId)
  if (!room) return
  if (room.announced !== 'no') {
    room.announced = 'again'
    return
  }
  room.announced = 'once'
  void unlocked(studyId).catch(() => {}).then(() => publish(studyId)).then(() => {
    const again = room.announced === 'again'
    room.announced = 'no'
    if (again) announce(studyId)
  })
}

function leave(studyId: string, room: Room, send: Send) {
  room.pages.delete(send)
  leaveIfEmpty(studyId, room)
}

function leaveIfEmpty(studyId: string, room: Room) {
  if (room.pages.size === 0 && room.joining === 0) rooms.delete(studyId)
  if (rooms.size === 0) {
    clearInterval(poll)
    poll = undefined
  }
}

/**
 * Joins a page to a study's events.
 * @param from number of the last event that the page has; null: it loads the rows once it has joined
 * @param send is first called for what the page missed, then for everything new
 * @returns how to leave
 */
export async function join(studyId: string, from: number | null, send: Send): Promise<() => void> {
  const room: Room = rooms.get(studyId) ?? { pages: new Set(), joining: 0, seen: 0, tail: Promise.resolve(), announced: 'no' }
  rooms.set(studyId, room)
  room.joining++
  try {
    await inTurn(room, async () => {
      const db = useDatabase()
      if (room.pages.size === 0) room.seen = await lastEventNumber(db, studyId)
      if (from === null) send({}, room.seen)
      else await readEvents(db, studyId, from, room.seen, send)
      room.pages.add(send)
    })
    poll ??= setInterval(() => {
      for (const id of rooms.keys()) void publish(id)
    }, pollEvery)
    return () => leave(studyId, room, send)
  } finally {
    room.joining--
    leaveIfEmpty(studyId, room)
  }
}
