import { and, eq, gt, isNull, lt, ne, sql } from 'drizzle-orm'
import type { Account } from '#shared/schemas/session'
import { useDatabase } from '../database/client'
import type { Database, Transaction } from '../database/client'
import { sessions, users } from '../database/schema'
import { closeStreams } from '../utils/event-stream'
import { newId } from '../utils/ids'

/** How long a session lives, in seconds; its cookie lives as long. */
export const sessionSeconds = 14 * 24 * 60 * 60

/** How old the time of the last request may be before it is written again, in milliseconds. */
const seenEvery = 5 * 60 * 1000

/** Columns of an account as it is shown. */
export const accountColumns = { id: users.id, email: users.email, name: users.name, role: users.role }

/** Makes a session of an account. */
export async function createSession(userId: string, userAgent: string): Promise<string> {
  const id = newId()
  await useDatabase().insert(sessions).values({
    id, userId, userAgent: userAgent.slice(0, 300), expiresAt: new Date(Date.now() + sessionSeconds * 1000),
  })
  return id
}

/** The account of a session that has neither ended nor expired and whose account is not disabled. */
export async function sessionAccount(id: string): Promise<Account | null> {
  const [row] = await useDatabase().select({ account: accountColumns, lastSeenAt: sessions.lastSeenAt }).from(sessions)
    .innerJoin(users, eq(users.id, sessions.userId))
    .where(and(eq(sessions.id, id), gt(sessions.expiresAt, new Date()), isNull(users.disabledAt)))
  if (!row) return null
  if (Date.now() - row.lastSeenAt.getTime() > seenEvery) {
    await useDatabase().update(sessions).set({ lastSeenAt: sql`current_timestamp(3)` }).where(eq(sessions.id, id))
  }
  return row.account
}

/** Ends one session, and its account's open streams; pages of its other sessions connect again. */
export async function endSession(id: string): Promise<void> {
  const db = useDatabase()
  const [row] = await db.select({ userId: sessions.userId }).from(sessions).where(eq(sessions.id, id))
  if (!row) return
  await db.delete(sessions).where(eq(sessions.id, id))
  closeStreams(row.userId)
}

/**
 * Ends an account's sessions within a transaction; close its streams after the commit.
 * @param except the session that stays
 */
export async function endSessions(tx: Database | Transaction, userId: string, except: string | null = null): Promise<void> {
  await tx.delete(sessions).where(and(eq(sessions.userId, userId), except === null ? undefined : ne(sessions.id, except)))
}

/** Deletes expired sessions. */
export async function pruneSessions(): Promise<void> {
  await useDatabase().delete(sessions).where(lt(sessions.expiresAt, new Date()))
}
