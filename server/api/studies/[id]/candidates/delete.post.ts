import { candidateSelection } from '#shared/schemas/candidates'
import { deleteCandidates } from '../../../../services/candidate-selection'
import { callerOf, studyOf } from '../../../../utils/caller'
import { validBody } from '../../../../utils/validate'

/** POST /api/studies/:id/candidates/delete: deletes rows; they can be restored. */
export default defineEventHandler(async (event) => {
  const { ids } = await validBody(event, candidateSelection)
  await deleteCandidates(studyOf(event).id, ids, callerOf(event).account)
  return sendNoContent(event)
})
