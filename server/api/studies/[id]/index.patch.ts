import { studyChange } from '#shared/schemas/studies'
import { changeStudy } from '../../../services/studies'
import { callerOf, studyOf } from '../../../utils/caller'
import { validBody } from '../../../utils/validate'
import { ifMatch, setVersion } from '../../../utils/version'

/** PATCH /api/studies/:id: changes name, description or requirements, archives or takes out of the archive. */
export default defineEventHandler(async (event) => {
  const version = ifMatch(event)
  const study = await changeStudy(studyOf(event), await validBody(event, studyChange), version, callerOf(event).account)
  setVersion(event, study.version)
  return study
})
