import { z } from 'zod'
import { id } from './common'

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
