import { cancelSearch } from '../../../services/searches'
import { callerOf, studyOf } from '../../../utils/caller'
import { validParam } from '../../../utils/validate'

/** DELETE /api/searches/:id: cancels a search; what it has found is kept, and it may be resumed. */
export default defineEventHandler(event => cancelSearch(studyOf(event).id, validParam(event, 'id'), callerOf(event).account))
