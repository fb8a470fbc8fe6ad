import { z } from 'zod'
import { candidate } from './candidates'
import { id } from './common'
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
  /** more changed than is kept or than is worth sending: load all rows and sweeps again */
  reload: z.literal(true).optional(),
})
export type StudyEvent = z.infer<typeof studyEvent>
