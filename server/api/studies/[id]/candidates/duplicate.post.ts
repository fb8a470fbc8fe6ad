import { candidateSelection } from '#shared/schemas/candidates'
import { duplicateCandidates } from '../../../../services/candidate-selection'
import { callerOf, studyOf } from '../../../../utils/caller'
import { validBody } from '../../../../utils/validate'

/** POST /api/studies/:id/candidates/duplicate: copies rows behind the last of them. */
export default defineEventHandler(async (event) => {
  const { ids } = await validBody(event, candidateSelection)
  const items = await duplicateCandidates(studyOf(event).id, ids, callerOf(event).account)
  setResponseStatus(event, 201)
  return { items, next: null }
})
