import { resumeSearch } from '../../../services/searches'
import { callerOf, studyOf } from '../../../utils/caller'
import { validParam } from '../../../utils/validate'

/** POST /api/searches/:id/resume: goes on with a search that was cancelled or has failed, from where it stood. */
export default defineEventHandler(event => resumeSearch(studyOf(event).id, validParam(event, 'id'), callerOf(event).account))
