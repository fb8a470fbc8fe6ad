import { studyCreation } from '#shared/schemas/studies'
import { createStudy } from '../../services/studies'
import { callerOf } from '../../utils/caller'
import { validBody } from '../../utils/validate'
import { setVersion } from '../../utils/version'

/** POST /api/studies: creates a study, or duplicates one. */
export default defineEventHandler(async (event) => {
  const study = await createStudy(await validBody(event, studyCreation), callerOf(event).account)
  setResponseStatus(event, 201)
  setVersion(event, study.version)
  return study
})
