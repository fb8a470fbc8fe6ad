import { and, asc, count, eq, isNull, ne } from 'drizzle-orm'
import type { Member, StudyRole } from '#shared/schemas/members'
import type { Account } from '#shared/schemas/session'
import { useDatabase } from '../database/client'
import type { Transaction } from '../database/client'
import { members, studies, users } from '../database/schema'
import { closeStreams } from '../utils/event-stream'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { appendEvent } from './events'
import { transact } from './transactions'

const columns = { userId: users.id, name: users.name, email: users.email, role: members.role }

/** The people of a study, by role and then by name. */
export async function listMembers(studyId: string): Promise<Member[]> {
  return useDatabase().select(columns).from(members).innerJoin(users, eq(users.id, members.userId))
    .where(eq(members.studyId, studyId)).orderBy(asc(members.role), asc(users.name))
}

/** Takes the study's lock, under which its owners are counted, and reads its name. */
async function lockedName(tx: Transaction, studyId: string): Promise<string> {
  const [study] = await tx.select({ name: studies.name }).from(studies).where(eq(studies.id, studyId)).for('update')
  return study?.name ?? problem(404, 'This study does not exist.')
}

async function memberOf(tx: Transaction, studyId: string, userId: string): Promise<Member | undefined> {
  const [row] = await tx.select(columns).from(members).innerJoin(users, eq(users.id, members.userId))
    .where(and(eq(members.studyId, studyId), eq(members.userId, userId)))
  return row
}

/** Refuses to take the role from a study's last owner; one whose account is disabled owns nothing any more. */
async function requireAnotherOwner(tx: Transaction, studyId: string, leaving: string): Promise<void> {
  const [others] = await tx.select({ n: count() }).from(members).innerJoin(users, eq(users.id, members.userId))
    .where(and(eq(members.studyId, studyId), eq(members.role, 'owner'), ne(members.userId, leaving), isNull(users.disabledAt)))
  if (others!.n > 0) return
  const message = 'A study always keeps an owner: make somebody else one first.'
  problem(422, message, { errors: [{ path: 'role', message }] })
}

/**
 * Adds a person to a study, or changes their role in it.
 * @throws 422 at `email` when there is no such account, at `role` when no owner would remain
 */
export async function putMember(studyId: string, { email, role }: { email: string, role: StudyRole }, by: Account): Promise<Member> {
  return transact(async (tx) => {
    const study = { id: studyId, name: await lockedName(tx, studyId) }
    const [user] = await tx.select({ id: users.id, name: users.name }).from(users).where(and(eq(users.email, email), isNull(users.disabledAt)))
    if (!user) {
      const message = 'There is no account with this address; an administrator can create one.'
      problem(422, message, { errors: [{ path: 'email', message }] })
    }
    const before = await memberOf(tx, studyId, user.id)
    if (before?.role === role) return before
    if (before?.role === 'owner') await requireAnotherOwner(tx, studyId, user.id)
    await tx.insert(members).values({ studyId, userId: user.id, role }).onDuplicateKeyUpdate({ set: { role } })
    await recordActivity(tx, before
      ? { study, by, action: 'changed role of', subject: user.name, from: { role: before.role }, to: { role } }
      : { study, by, action: 'added member', subject: user.name, to: { role } })
    await appendEvent(tx, studyId, { study: true })
    return (await memberOf(tx, studyId, user.id))!
  })
}

/**
 * Removes a person from a study; they lose access at once, in open pages too.
 * @throws 404 when they have no part in it, 422 when no owner would remain
 */
export async function removeMember(studyId: string, userId: string, by: Account): Promise<void> {
  await transact(async (tx) => {
    const study = { id: studyId, name: await lockedName(tx, studyId) }
    const member = await memberOf(tx, studyId, userId) ?? problem(404, 'This person has no part in the study.')
    if (member.role === 'owner') await requireAnotherOwner(tx, studyId, userId)
    await tx.delete(members).where(and(eq(members.studyId, studyId), eq(members.userId, userId)))
    await recordActivity(tx, { study, by, action: 'removed member', subject: member.name, from: { role: member.role } })
    await appendEvent(tx, studyId, { study: true })
  })
  closeStreams(userId)
}
