import { eq } from 'drizzle-orm'
import type { Account } from '#shared/schemas/session'
import { useDatabase } from '../database/client'
import { users } from '../database/schema'
import { problem } from '../utils/problem'
import { attemptSucceeded, takeAttempt } from './attempts'

/** Hash of a random password that nobody has: looking it up costs what a known account's costs. */
const nobodysHash = '$scrypt$n=16384,r=8,p=1$zTjf6ceOTHhOh2xGgAqLQA$6m2chRatfZzEbhz2pFsnWrko4MiNanibI9ANrSoyY48TRIiA+RCa5nhkgwBrl8H9nayzr3F4egNGwmAg01l4SQ'

/**
 * Checks an e-mail address and a password. Whether the account is unknown, disabled or the password wrong, the answer
 * and the work are the same.
 * @param address where the attempt comes from
 * @throws 401 with one sentence for all of these; 429 after too many attempts
 */
export async function checkPassword({ email, password }: { email: string, password: string }, address: string): Promise<Account> {
  const attempt = await takeAttempt(email, address)
  const [user] = await useDatabase().select().from(users).where(eq(users.email, email))
  const right = await verifyPassword(user?.passwordHash ?? nobodysHash, password)
  if (!user || !right || user.disabledAt !== null) problem(401, 'The e-mail address or the password is wrong.')
  await attemptSucceeded(attempt)
  return { id: user.id, email: user.email, name: user.name, role: user.role }
}
