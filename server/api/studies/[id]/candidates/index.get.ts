import { pageQuery } from '#shared/schemas/common'
import { listCandidates } from '../../../../services/candidates'
import { studyOf } from '../../../../utils/caller'
import { validQuery } from '../../../../utils/validate'

/** GET /api/studies/:id/candidates: a page of the study's rows in the order of the grid. */
export default defineEventHandler(async (event) => {
  return listCandidates(studyOf(event).id, await validQuery(event, pageQuery))
})
