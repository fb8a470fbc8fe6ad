import { and, asc, eq, gt, isNull, sql } from 'drizzle-orm'
import type { z } from 'zod'
import type { Person, personChange, personCreation } from '#shared/schemas/people'
import type { Account } from '#shared/schemas/session'
import { useDatabase } from '../database/client'
import type { Transaction } from '../database/client'
import { databaseCode } from '../database/ready'
import { users } from '../database/schema'
import { closeStreams } from '../utils/event-stream'
import { newId } from '../utils/ids'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { endSessions } from './sessions'
import { passStudies } from './succession'
import { transact } from './transactions'

const shown = (row: typeof users.$inferSelect): Person => ({
  id: row.id, email: row.email, name: row.name, role: row.role,
  disabledAt: row.disabledAt?.toISOString() ?? null, createdAt: row.createdAt.toISOString(),
})

/** A page of all accounts, the oldest first. */
export async function listPeople({ cursor, limit }: { cursor?: string, limit: number }): Promise<{ items: Person[], next: string | null }> {
  const rows = await useDatabase().select().from(users).where(cursor ? gt(users.id, cursor) : undefined).orderBy(asc(users.id)).limit(limit + 1)
  return { items: rows.slice(0, limit).map(shown), next: rows.length > limit ? rows[limit - 1]!.id : null }
}

/**
 * Creates an account with a password that the administrator hands over.
 * @throws 422 at `email` when there is such an account
 */
export async function createPerson({ password, ...person }: z.infer<typeof personCreation>, by: Account): Promise<Person> {
  const id = newId()
  const passwordHash = await hashPassword(password)
  try {
    return await transact(async (tx) => {
      await tx.insert(users).values({ id, ...person, passwordHash })
      await recordActivity(tx, { by, action: 'created account', subject: person.name, to: { email: person.email, role: person.role } })
      return personOf(tx, id)
    })
  } catch (error) {
    if (databaseCode(error) !== 'ER_DUP_ENTRY') throw error
    problem(422, 'There is an account with this address already.', { errors: [{ path: 'email', message: 'There is an account with this address already.' }] })
  }
}

async function personOf(tx: Transaction, id: string): Promise<Person> {
  const [row] = await tx.select().from(users).where(eq(users.id, id))
  return row ? shown(row) : problem(404, 'There is no such account.')
}

/**
 * Changes an account. Disabling it or giving it a password ends its sessions at once; with another role its streams start anew.
 * Studies that a disabled account would leave without an owner pass to a successor.
 * @throws 404 without such an account, 422 when no administrator would remain, or at `successor` when one is needed
 */
export async function changePerson(id: string, change: z.infer<typeof personChange>, by: Account): Promise<Person> {
  const { password, disabled, successor, ...plain } = change
  if (successor !== undefined && disabled !== true) {
    const message = 'A successor is named when an account is disabled.'
    problem(422, message, { errors: [{ path: 'successor', message }] })
  }
  const passwordHash = password === undefined ? undefined : await hashPassword(password)
  const ends = disabled === true || passwordHash !== undefined
  const { after, heir } = await transact(async (tx) => {
    // All administrators' rows are the lock under which the last one is told from the others.
    const admins = await tx.select({ id: users.id }).from(users).where(and(eq(users.role, 'admin'), isNull(users.disabledAt))).for('update')
    const before = await personOf(tx, id)
    if ((disabled === true || plain.role === 'member') && admins.length === 1 && admins[0]!.id === id) {
      const message = 'This is the last administrator; make somebody else one first.'
      problem(422, message, { errors: [{ path: disabled ? 'disabled' : 'role', message }] })
    }
    const disabledAt = disabled === undefined ? undefined : disabled ? sql`coalesce(${users.disabledAt}, current_timestamp(3))` : null
    const heir = disabled === true ? await passStudies(tx, before, successor, by) : null
    const set = { ...plain, disabledAt, passwordHash }
    if (Object.values(set).some(value => value !== undefined)) await tx.update(users).set(set).where(eq(users.id, id))
    if (ends) await endSessions(tx, id)
    const after = await personOf(tx, id)
    await note(tx, before, after, passwordHash !== undefined, by)
    return { after, heir }
  })
  if (ends || plain.role !== undefined) closeStreams(id)
  if (heir !== null) closeStreams(heir)
  return after
}

async function note(tx: Transaction, before: Person, after: Person, password: boolean, by: Account) {
  const state = ({ name, role, disabledAt }: Person) => ({ name, role, disabled: disabledAt !== null })
  const [from, to] = [state(before), state(after)]
  if (JSON.stringify(from) !== JSON.stringify(to)) await recordActivity(tx, { by, action: 'changed account', subject: after.name, from, to })
  if (password) await recordActivity(tx, { by, action: 'reset password of', subject: after.name })
}
