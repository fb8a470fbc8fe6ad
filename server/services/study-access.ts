import { and, eq } from 'drizzle-orm'
import type { StudyRole } from '#shared/schemas/members'
import type { Subject } from '../access/rules'
import { useDatabase } from '../database/client'
import { candidates, jobs, members, studies, sweeps } from '../database/schema'

/** Why an archived study does not take a change. */
export const archivedSentence = 'This study is archived: it can be read and exported. Take it back into work to change it.'

/** A study as far as access needs it. */
export interface StudyStanding {
  id: string
  deleted: boolean
  archived: boolean
  /** the person's role in it; null: none */
  role: StudyRole | null
}

/**
 * The study that a study, a candidate, a sweep or a search belongs to, and a person's role in it, in one indexed query.
 * @returns null when there is none
 */
export async function studyStanding(of: Subject, id: string, userId: string): Promise<StudyStanding | null> {
  const query = useDatabase().select({ id: studies.id, deletedAt: studies.deletedAt, archivedAt: studies.archivedAt, role: members.role }).from(studies)
    .leftJoin(members, and(eq(members.studyId, studies.id), eq(members.userId, userId))).$dynamic()
  const found = {
    study: () => query.where(eq(studies.id, id)),
    candidate: () => query.innerJoin(candidates, eq(candidates.studyId, studies.id)).where(eq(candidates.id, id)),
    sweep: () => query.innerJoin(sweeps, eq(sweeps.studyId, studies.id)).where(eq(sweeps.id, id)),
    search: () => query.innerJoin(jobs, eq(jobs.studyId, studies.id)).where(eq(jobs.id, id)),
  }[of]
  const [row] = await found()
  return row ? { id: row.id, deleted: row.deletedAt !== null, archived: row.archivedAt !== null, role: row.role } : null
}
