import { candidatesCreationOf } from '#shared/schemas/candidates'
import { createCandidates } from '../../../../services/candidates'
import { callerOf, studyOf } from '../../../../utils/caller'
import { validBody } from '../../../../utils/validate'

/** POST /api/studies/:id/candidates: creates one row or many; their computed cells follow as events. */
export default defineEventHandler(async (event) => {
  const creation = await validBody(event, candidatesCreationOf)
  const items = await createCandidates(studyOf(event).id, creation, callerOf(event).account)
  setResponseStatus(event, 201)
  return 'items' in creation ? { items, next: null } : items[0]
})
