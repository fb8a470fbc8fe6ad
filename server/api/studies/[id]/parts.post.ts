import { partsRequest } from '#shared/schemas/parts'
import { requestParts } from '../../../services/parts'
import { studyOf } from '../../../utils/caller'
import { validBody } from '../../../utils/validate'

/** POST /api/studies/:id/parts: has columns that need heavy work computed for some rows; they follow as events. */
export default defineEventHandler(async (event) => {
  const body = await validBody(event, partsRequest)
  setResponseStatus(event, 202)
  return requestParts(studyOf(event).id, body)
})
