import { searchCreation } from '#shared/schemas/searches'
import { createSearch } from '../../../services/searches'
import { callerOf, studyOf } from '../../../utils/caller'
import { goneSignal } from '../../../utils/gone'
import { validBody, validParam } from '../../../utils/validate'

/** POST /api/candidates/:id/searches: begins a search for labels or parameters from a row; how far it is follows as events. */
export default defineEventHandler(async (event) => {
  const asked = await validBody(event, searchCreation)
  const search = await createSearch(studyOf(event).id, validParam(event, 'id'), asked, callerOf(event).account, goneSignal(event))
  setResponseStatus(event, 202)
  return search
})
