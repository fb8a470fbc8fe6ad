import { and, asc, count, eq, gte, inArray, lt, min } from 'drizzle-orm'
import { useDatabase } from '../database/client'
import { signInFailures } from '../database/schema'
import { newId } from '../utils/ids'
import { problem } from '../utils/problem'

/** Failed sign-ins that an account and an address may have within the window. */
const limits = { account: 10, address: 30 } as const
/** in milliseconds */
const window = 15 * 60 * 1000

/** Attempts of one sign-in, taken before the password is looked at. */
export interface Attempt {
  ids: string[]
  accountSubject: string
}

/**
 * Takes an attempt for an account and an address: counted as failed until it is given back, so that many at once cannot
 * get past the limit.
 * @throws 429 with Retry-After when either has used up its attempts
 */
export async function takeAttempt(email: string, address: string): Promise<Attempt> {
  const db = useDatabase()
  const subjects = { account: `account ${email}`, address: `address ${address}` }
  const kinds = ['account', 'address'] as const
  const rows = kinds.map(kind => ({ id: newId(), subject: subjects[kind], at: new Date() }))
  const ids = rows.map(row => row.id)
  await db.delete(signInFailures).where(lt(signInFailures.at, new Date(Date.now() - window)))
  await db.insert(signInFailures).values(rows)
  const counts = await db.select({ subject: signInFailures.subject, n: count(), first: min(signInFailures.at) }).from(signInFailures)
    .where(and(inArray(signInFailures.subject, Object.values(subjects)), gte(signInFailures.at, new Date(Date.now() - window))))
    .groupBy(signInFailures.subject).orderBy(asc(signInFailures.subject))
  const over = counts.filter(({ subject, n }) => n > (subject === subjects.account ? limits.account : limits.address))
  if (over.length > 0) {
    await giveBack(ids)
    const until = Math.max(...over.map(({ first }) => (first ?? new Date()).getTime() + window))
    const seconds = Math.max(1, Math.ceil((until - Date.now()) / 1000))
    problem(429, `Too many attempts to sign in. Try again in ${Math.ceil(seconds / 60)} min.`, { headers: { 'retry-after': String(seconds) } })
  }
  return { ids, accountSubject: subjects.account }
}

/** Forgets a successful attempt, and the account's failed ones before it. */
export async function attemptSucceeded({ ids, accountSubject }: Attempt): Promise<void> {
  await giveBack(ids)
  await useDatabase().delete(signInFailures).where(eq(signInFailures.subject, accountSubject))
}

const giveBack = (ids: string[]) => useDatabase().delete(signInFailures).where(inArray(signInFailures.id, ids))
