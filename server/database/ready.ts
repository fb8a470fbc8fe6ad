import { setTimeout as delay } from 'node:timers/promises'
import { sql } from 'drizzle-orm'
import { useDatabase } from './client'

/** starting: not yet migrated; ok; away: it was there and does not answer now. */
export type DatabaseState = 'starting' | 'ok' | 'away'

let state: DatabaseState = 'starting'
let reason = 'The database is starting.'
let becomeReady = () => {}
const ready = new Promise<void>(resolve => (becomeReady = resolve))

/** How often a database is asked whether it is there: while it is, and while it is not, in milliseconds. */
const pauses = { ok: 2000, away: 250 }
/** How long it may take to answer that, in milliseconds. */
const patience = 3000

/** Resolves when the database has answered and its tables are up to date, once. */
export const databaseReady = (): Promise<void> => ready

/** Whether the database can be used now. */
export const databaseState = (): DatabaseState => state

/** What is wrong, as a sentence; for 503 answers. */
export const databaseReason = (): string => reason

/** The driver's code of an error, which Drizzle wraps. */
export function databaseCode(error: unknown): string | undefined {
  if (!(error instanceof Error)) return undefined
  return 'code' in error && typeof error.code === 'string' ? error.code : databaseCode(error.cause)
}

const gone = new Set([
  'ECONNREFUSED', 'ECONNRESET', 'EPIPE', 'ETIMEDOUT', 'ENOTFOUND', 'EHOSTUNREACH', 'ENETUNREACH', 'EAI_AGAIN', 'PROTOCOL_CONNECTION_LOST', 'POOL_CLOSED',
  'PROTOCOL_ENQUEUE_AFTER_FATAL_ERROR', 'ER_SERVER_SHUTDOWN', 'ER_CON_COUNT_ERROR', 'ER_ACCESS_DENIED_ERROR', 'ER_BAD_DB_ERROR', 'ER_DBACCESS_DENIED_ERROR',
  'ER_CONNECTION_KILLED', 'ER_NEW_ABORTING_CONNECTION',
])

/** Whether an error says that the database is away rather than that a statement is wrong. */
export const isAway = (error: unknown): boolean => gone.has(databaseCode(error) ?? '')

function sentence(error: unknown): string {
  switch (databaseCode(error)) {
    case 'ER_ACCESS_DENIED_ERROR':
    case 'ER_DBACCESS_DENIED_ERROR': return 'The database refuses the application\'s account.'
    case 'ER_BAD_DB_ERROR': return 'The database server has no database of that name.'
    case 'ER_CON_COUNT_ERROR': return 'The database server has too many connections.'
  }
  return isAway(error) ? 'The database cannot be reached.' : 'The database is not usable; the server\'s log says why.'
}

/** Notes that the database is away; a query has just found that out. */
export function noteAway(error: unknown): void {
  reason = sentence(error)
  if (state === 'ok') {
    state = 'away'
    console.error(`${reason} Waiting for it.`)
  }
}

/** Asks the database whether it is there, and notes the answer. */
export async function checkDatabase(): Promise<DatabaseState> {
  if (state === 'starting') return state
  const late = new AbortController()
  try {
    await Promise.race([
      useDatabase().execute(sql`select 1`),
      delay(patience, undefined, { signal: late.signal, ref: false }).then(() => {
        throw Object.assign(new Error('The database does not answer in time.'), { code: 'ETIMEDOUT' })
      }),
    ])
    if (state === 'away') console.info('The database is back.')
    state = 'ok'
  } catch (error) {
    noteAway(error)
  } finally {
    late.abort()
  }
  return state
}

/**
 * Waits for a starting database, prepares it and then watches over it, until the signal.
 * @param prepare brings the tables up to date; tried again until it succeeds
 */
export async function watchDatabase(prepare: () => Promise<void>, signal: AbortSignal): Promise<void> {
  for (let said = ''; state === 'starting' && !signal.aborted;) {
    try {
      await prepare()
      state = 'ok'
      becomeReady()
    } catch (error) {
      reason = isAway(error) ? sentence(error) : 'The database\'s tables could not be brought up to date; the server\'s log says why.'
      if (reason !== said) console.error(said = reason, error)
      await pause(pauses.away * (isAway(error) ? 1 : 8), signal)
    }
  }
  while (!signal.aborted) {
    await pause(state === 'ok' ? pauses.ok : pauses.away, signal)
    if (!signal.aborted) await checkDatabase()
  }
}

const pause = (ms: number, signal: AbortSignal) => delay(ms, undefined, { signal, ref: false }).catch(() => {})
