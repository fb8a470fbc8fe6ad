import { z } from 'zod'
import { candidate } from './candidates'
import { id } from './common'
import { search } from './searches'
import { sweep } from './sweeps'

/** What GET /api/studies/{id}/events pushes; the stream's id is the event's number in the study. */
export const studyEvent = z.object({
  /** rows as they are now */
  rows: z.array(candidate).optional(),
  /** rows that are gone */
  removed: z.array(id).optional(),
  /** name, requirements, members or state changed: fetch the study again */
  study: z.literal(true).optional(),
  sweep: sweep.optional(),
  /** a search that began, went on or ended */
  job: search.optional(),
  /** more changed than is kept or than is worth sending: load all rows and sweeps again */
  reload: z.literal(true).optional(),
})
export type StudyEvent = z.infer<typeof studyEvent>

/** GET /api/studies/{id}/events: number of the last event that a page has which takes the stream over from another one. */
export const eventsQuery = z.object({
  after: z.string().regex(/^\d{1,15}$/, 'Send the number of the last event that you have.').optional(),
})
