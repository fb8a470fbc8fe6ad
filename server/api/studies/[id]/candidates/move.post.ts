import { candidateMove } from '#shared/schemas/candidates'
import { moveCandidates } from '../../../../services/candidate-selection'
import { studyOf } from '../../../../utils/caller'
import { validBody } from '../../../../utils/validate'

/** POST /api/studies/:id/candidates/move: puts rows behind another one. */
export default defineEventHandler(async (event) => {
  const { ids, after } = await validBody(event, candidateMove)
  return { items: await moveCandidates(studyOf(event).id, ids, after), next: null }
})
