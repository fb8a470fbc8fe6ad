import { candidateSelection } from '#shared/schemas/candidates'
import { restoreCandidates } from '../../../../services/candidate-selection'
import { callerOf, studyOf } from '../../../../utils/caller'
import { validBody } from '../../../../utils/validate'

/** POST /api/studies/:id/candidates/restore: brings deleted rows back to their places. */
export default defineEventHandler(async (event) => {
  const { ids } = await validBody(event, candidateSelection)
  return { items: await restoreCandidates(studyOf(event).id, ids, callerOf(event).account), next: null }
})
