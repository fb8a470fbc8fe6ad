import { activityQuery } from '#shared/schemas/activity'
import { listActivity } from '../../../services/activity'
import { studyOf } from '../../../utils/caller'
import { validQuery } from '../../../utils/validate'

/** GET /api/studies/:id/activity: who did what in the study, the latest first. */
export default defineEventHandler(event => listActivity(studyOf(event).id, validQuery(event, activityQuery)))
