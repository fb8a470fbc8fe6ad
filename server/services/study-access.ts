import { and, eq } from 'drizzle-orm'
import type { StudyRole } from '#shared/schemas/members'
import type { Subject } from '../access/rules'
import { useDatabase } from '../database/client'
import { candidates, members, studies, sweeps } from '../database/schema'

/** A study as far as access needs it. */
export interface StudyStanding {
  id: string
  deleted: boolean
  /** the person's role in it; null: none */
  role: StudyRole | null
}

/**
 * The study that a study, a candidate or a sweep belongs to, and a person's role in it, in one indexed query.
 * @returns null when there is none
 */
export async function studyStanding(of: Subject, id: string, userId: string): Promise<StudyStanding | null> {
  const query = useDatabase().select({ id: studies.id, deletedAt: studies.deletedAt, role: members.role }).from(studies)
    .leftJoin(members, and(eq(members.studyId, studies.id), eq(members.userId, userId))).$dynamic()
  const found = of === 'study'
    ? query.where(eq(studies.id, id))
    : of === 'candidate'
      ? query.innerJoin(candidates, eq(candidates.studyId, studies.id)).where(eq(candidates.id, id))
      : query.innerJoin(sweeps, eq(sweeps.studyId, studies.id)).where(eq(sweeps.id, id))
  const [row] = await found
  return row ? { id: row.id, deleted: row.deletedAt !== null, role: row.role } : null
}
