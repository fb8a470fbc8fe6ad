import { and, asc, eq, inArray, isNull, ne } from 'drizzle-orm'
import type { Account } from '#shared/schemas/session'
import type { Transaction } from '../database/client'
import { members, studies, users } from '../database/schema'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { appendEvent } from './events'

interface Named { id: string, name: string }

/** Most studies that a refusal names. */
const mostNamed = 10
const list = new Intl.ListFormat('en-GB', { type: 'conjunction' })

/**
 * Studies, deleted ones that can be restored included, of which an account is the only owner who may sign in.
 * All that it owns are locked first, in one order, so that no other owner leaves them meanwhile.
 */
async function soleStudies(tx: Transaction, userId: string): Promise<Named[]> {
  const owned = await tx.select({ id: studies.id, name: studies.name }).from(studies)
    .innerJoin(members, and(eq(members.studyId, studies.id), eq(members.userId, userId), eq(members.role, 'owner')))
    .orderBy(asc(studies.id)).for('update')
  if (owned.length === 0) return []
  const others = await tx.select({ studyId: members.studyId }).from(members).innerJoin(users, eq(users.id, members.userId))
    .where(and(inArray(members.studyId, owned.map(({ id }) => id)), eq(members.role, 'owner'), ne(members.userId, userId), isNull(users.disabledAt)))
    .for('update')
  const kept = new Set(others.map(({ studyId }) => studyId))
  return owned.filter(({ id }) => !kept.has(id))
}

async function successorOf(tx: Transaction, id: string, leaving: Named): Promise<Named> {
  const [user] = await tx.select({ id: users.id, name: users.name }).from(users).where(and(eq(users.id, id), isNull(users.disabledAt))).for('update')
  if (user && user.id !== leaving.id) return user
  const message = 'A successor is another account that may sign in.'
  problem(422, message, { errors: [{ path: 'successor', message }] })
}

function askForSuccessor(leaving: Named, orphans: readonly Named[]): never {
  const names = orphans.slice(0, mostNamed).map(({ name }) => `“${name}”`)
  const rest = orphans.length - names.length
  const all = list.format(rest > 0 ? [...names, `${rest} more`] : names)
  const message = `${leaving.name} is the only owner of ${all}. Name a successor, who then owns ${orphans.length === 1 ? 'it' : 'them'}.`
  problem(422, message, { errors: [{ path: 'successor', message }] })
}

/**
 * Passes the studies that an account is the only owner of to a successor; the account stays in them as an editor.
 * @param leaving the account that is being disabled
 * @param successor id of the account that takes over
 * @returns the successor's id when anything passed to them: their open streams are to start anew after the commit
 * @throws 422 at `successor` when there is none to be, naming the studies, or when that account may not sign in
 */
export async function passStudies(tx: Transaction, leaving: Named, successor: string | undefined, by: Account): Promise<string | null> {
  const orphans = await soleStudies(tx, leaving.id)
  const next = successor === undefined ? null : await successorOf(tx, successor, leaving)
  if (orphans.length === 0) return null
  if (!next) askForSuccessor(leaving, orphans)
  for (const study of orphans) {
    await tx.insert(members).values({ studyId: study.id, userId: next.id, role: 'owner' }).onDuplicateKeyUpdate({ set: { role: 'owner' } })
    await tx.update(members).set({ role: 'editor' }).where(and(eq(members.studyId, study.id), eq(members.userId, leaving.id)))
    await recordActivity(tx, { study, by, action: 'passed ownership of', subject: study.name, from: { owner: leaving.name }, to: { owner: next.name } })
    await appendEvent(tx, study.id, { study: true })
  }
  return next.id
}
