import { pinChange } from '#shared/schemas/candidates'
import { pinCandidate } from '../../../services/candidate-selection'
import { studyOf } from '../../../utils/caller'
import { validBody } from '../../../utils/validate'

/** PUT /api/studies/:id/pins: pins a row to the overlay's lowest free slot, or unpins it. */
export default defineEventHandler(async (event) => {
  const { candidate, pinned } = await validBody(event, pinChange)
  return pinCandidate(studyOf(event).id, candidate, pinned)
})
