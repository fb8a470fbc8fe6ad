import { z } from 'zod'
import { id, pageQuery } from './common'

/** Who did what, when; items of GET /api/studies/{id}/activity, the latest first. */
export const activityEntry = z.object({
  id,
  /** name as it was then */
  userName: z.string(),
  action: z.string(),
  subject: z.string(),
  from: z.unknown().optional(),
  to: z.unknown().optional(),
  at: z.string(),
})
export type ActivityEntry = z.infer<typeof activityEntry>

/** Query of GET /api/studies/{id}/activity; the cursor is the last entry's id. */
export const activityQuery = pageQuery.extend({ cursor: id.optional() })
