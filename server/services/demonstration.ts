import { count } from 'drizzle-orm'
import type { StudyRole } from '#shared/schemas/members'
import { defaultRequirements } from '#shared/schemas/requirements'
import type { Requirements } from '#shared/schemas/requirements'
import type { Account } from '#shared/schemas/session'
import { expandSweep } from '#shared/study/expand-sweep'
import type { Database, Transaction } from '../database/client'
import { members, studies, sweeps } from '../database/schema'
import { newId } from '../utils/ids'
import { recordActivity } from './activity'
import { enqueueWritten, insertRows } from './candidate-writing'
import { emptyStudy, ridgeLink, ridgePins, ridgeRows, ringSweep } from './demonstration-study'
import { runSweep } from './sweeps'

/** People of the demonstration, by their role in its studies. */
export type DemonstrationPeople = Record<StudyRole, Account>

async function createStudy(
  tx: Transaction, people: DemonstrationPeople, { name, description, requirements }: { name: string, description: string, requirements: Requirements },
): Promise<string> {
  const id = newId()
  const { owner } = people
  await tx.insert(studies).values({ id, name, description, requirements, createdBy: owner.name })
  await tx.insert(members).values((Object.keys(people) as StudyRole[])
    .map(role => ({ studyId: id, userId: people[role].id, role })))
  await recordActivity(tx, { study: { id, name }, by: owner, action: 'created study', subject: name })
  return id
}

async function write(tx: Transaction, people: DemonstrationPeople) {
  const ridge = await createStudy(tx, people, ridgeLink)
  const rows = await insertRows(tx, { id: ridge, requirements: ridgeLink.requirements }, ridgeRows.map((inputs, i) => ({
    inputs, position: i + 1, pin: i < ridgePins ? i + 1 : null,
  })))
  const rings = await createStudy(tx, people, ringSweep)
  const sweep = newId()
  await tx.insert(sweeps).values({
    id: sweep, studyId: rings, definition: ringSweep.sweep, total: expandSweep(ringSweep.sweep).rows, createdBy: people.owner.name,
  })
  await createStudy(tx, people, { ...emptyStudy, requirements: defaultRequirements })
  return { rows, sweep }
}

/**
 * Writes the demonstration's three studies: the ridge link with its 24 rows, a sweep over ring ratios, an empty one.
 * All of them or none; nothing where there are studies already. The rows are computed like all others.
 */
export async function seedDemonstration(db: Database, { owner, editor, reviewer, observer }: DemonstrationPeople): Promise<void> {
  const [existing] = await db.select({ n: count() }).from(studies)
  if (existing!.n > 0) return
  const { rows, sweep } = await db.transaction(tx => write(tx, { owner, editor, reviewer, observer }))
  await enqueueWritten(rows)
  await runSweep(sweep)
}
