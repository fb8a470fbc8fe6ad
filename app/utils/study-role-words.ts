import type { StudyRole } from '#shared/schemas/members'

/** What each role in a study allows, in words; the server decides. */
export const studyRoleWords: Record<StudyRole, { title: string, may: string }> = {
  owner: { title: 'Owner', may: 'edit requirements and candidates, manage the members, delete and restore the study' },
  editor: { title: 'Editor', may: 'edit requirements and candidates' },
  reviewer: { title: 'Reviewer', may: 'read and export everything, as somebody who checks the study' },
  observer: { title: 'Observer', may: 'read and export everything' },
}

/** Roles as a choice offers them, the most able first. */
export const studyRoleChoices = (Object.keys(studyRoleWords) as StudyRole[]).map(value => ({ value, title: studyRoleWords[value].title }))
