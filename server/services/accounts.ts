import { eq } from 'drizzle-orm'
import type { z } from 'zod'
import type { passwordChange } from '#shared/schemas/session'
import { useDatabase } from '../database/client'
import { users } from '../database/schema'
import type { Caller } from '../utils/caller'
import { closeStreams } from '../utils/event-stream'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { attemptSucceeded, takeAttempt } from './attempts'
import { endSessions } from './sessions'
import { revokeTokens } from './tokens'
import { transact } from './transactions'

/**
 * Changes the caller's own password; their other sessions end, and their API tokens when that is asked for.
 * @param address where the attempt comes from: guessing the present password is limited as signing in is
 * @throws 422 at `current` when the present password is wrong
 */
export async function changePassword({ account, sessionId }: Caller, { current, password, endTokens }: z.infer<typeof passwordChange>, address: string): Promise<void> {
  const attempt = await takeAttempt(account.email, address)
  const [user] = await useDatabase().select({ hash: users.passwordHash }).from(users).where(eq(users.id, account.id))
  if (!user || !await verifyPassword(user.hash, current)) {
    problem(422, 'This is not your present password.', { errors: [{ path: 'current', message: 'This is not your present password.' }] })
  }
  await attemptSucceeded(attempt)
  const passwordHash = await hashPassword(password)
  await transact(async (tx) => {
    await tx.update(users).set({ passwordHash }).where(eq(users.id, account.id))
    await endSessions(tx, account.id, sessionId)
    await recordActivity(tx, { by: account, action: 'changed password of', subject: account.name })
    if (endTokens) await revokeTokens(tx, account)
  })
  closeStreams(account.id)
}
