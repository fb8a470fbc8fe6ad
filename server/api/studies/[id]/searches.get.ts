import { listSearches } from '../../../services/searches'
import { studyOf } from '../../../utils/caller'

/** GET /api/studies/:id/searches: the study's searches, the newest first. */
export default defineEventHandler(event => listSearches(studyOf(event).id))
