import { restoreStudy } from '../../../services/study-removal'
import { callerOf, studyOf } from '../../../utils/caller'
import { setVersion } from '../../../utils/version'

/** POST /api/studies/:id/restore: brings a deleted study back. */
export default defineEventHandler(async (event) => {
  const study = await restoreStudy(studyOf(event), callerOf(event).account)
  setVersion(event, study.version)
  return study
})
