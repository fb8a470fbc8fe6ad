import { getStudy } from '../../../services/studies'
import { studyOf } from '../../../utils/caller'
import { setVersion } from '../../../utils/version'

/** GET /api/studies/:id: a study with its requirements. */
export default defineEventHandler(async (event) => {
  const study = await getStudy(studyOf(event))
  setVersion(event, study.version)
  return study
})
