import { z } from 'zod'
import { id } from './common'
import { email } from './session'

/** Roles in a study, the most able first. */
export const studyRoles = ['owner', 'editor', 'reviewer', 'observer'] as const
export const studyRole = z.enum(studyRoles, { error: 'A role is owner, editor, reviewer or observer.' })
export type StudyRole = z.infer<typeof studyRole>

export const member = z.object({ userId: id, name: z.string(), email: z.string(), role: studyRole })
export type Member = z.infer<typeof member>

/** PUT /api/studies/{id}/members: adds a person or changes the role. */
export const memberChange = z.strictObject({ email, role: studyRole })
