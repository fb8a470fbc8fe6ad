import { z } from 'zod'
import { id, name, pageQuery, text } from './common'
import { studyRole } from './members'
import { requirements } from './requirements'

/** POST /api/studies */
export const studyCreation = z.strictObject({
  name: name('the study\'s name'),
  description: text(2000).default(''),
  /** duplicate this study's requirements and candidates */
  copyOf: id.optional(),
})

/** PATCH /api/studies/{id} */
export const studyChange = z.strictObject({
  name: name('the study\'s name').optional(),
  description: text(2000).optional(),
  requirements: requirements.optional(),
  archived: z.boolean({ error: 'Archived is true or false.' }).optional(),
})
export type StudyChange = z.infer<typeof studyChange>

/** A study as its pages see it. */
export const study = z.object({
  id, name: z.string(), description: z.string(),
  requirements,
  version: z.int(),
  role: studyRole.nullable(),
  archivedAt: z.string().nullable(),
  deletedAt: z.string().nullable(),
  createdAt: z.string(),
  updatedAt: z.string(),
  createdBy: z.string(),
})
export type Study = z.infer<typeof study>

export const studyStates = ['draft', 'archived', 'deleted'] as const
export type StudyState = (typeof studyStates)[number]

/** Query of GET /api/studies. */
export const studiesQuery = pageQuery.extend({ state: z.enum(studyStates, { error: 'The state is draft, archived or deleted.' }).default('draft') })

/** A study in the list: who works on it, its leading candidate and that one's worst surplus. */
export const studySummary = z.object({
  id, name: z.string(), description: z.string(), role: studyRole.nullable(), version: z.int(),
  state: z.enum(studyStates),
  members: z.array(z.object({ name: z.string(), role: studyRole })),
  candidates: z.int(), computing: z.int(), passing: z.int(),
  leading: z.object({ name: z.string(), surplusDb: z.number() }).nullable(),
  updatedAt: z.string(), deletedAt: z.string().nullable(),
})
export type StudySummary = z.infer<typeof studySummary>
