import { deleteCandidate } from '../../../services/candidate-selection'
import { callerOf, studyOf } from '../../../utils/caller'
import { validParam } from '../../../utils/validate'
import { ifMatch } from '../../../utils/version'

/** DELETE /api/candidates/:id: deletes a row; it can be restored. */
export default defineEventHandler(async (event) => {
  await deleteCandidate(studyOf(event).id, validParam(event, 'id'), ifMatch(event), callerOf(event).account)
  return sendNoContent(event)
})
